import { expect, test } from "vitest";
import { deformationRadiusAt } from "../../../../core/study/scales/deformation";
import { parseRadiusTable } from "../../../../core/study/scales/radius-table";
import { expectClose } from "../../../expect-close";

const earth = { earth: "sphere", radius: 6371000, gravity: 9.81, omega: 7.292115e-5 } as const;

test("a table with a header, comments, falling latitudes and Windows line ends is read", () => {
  const table = parseRadiusTable(
    "\uFEFFlatitude [degrees_north],radius [km]\r\n# ours\r\n40,25\r\n\r\n30, 35\r\n",
    "a.csv",
  );
  expect(table).toEqual({ latitude: [30, 40], radiusKm: [35, 25], symmetric: false });
  expect(deformationRadiusAt({ table }, 32, earth)).toBe(33000);
  expect(deformationRadiusAt({ table }, -32, earth)).toBeNaN();
});

test.each([
  ["30,35\n31,x", /a\.csv, line 2: expected a latitude from -90 to 90 and a radius/],
  ["30,35\n95,20", /line 2/],
  ["30,35\n31,-4", /line 2/],
  ["30,35,1\n31,4", /line 1/],
  ["30,35", /at least two lines of latitude, km, got 1/],
  ["", /at least two lines/],
  ["30,35\n30,36", /every latitude once, got 30 twice/],
])("%j is refused with one line that says where", (text, pattern) => {
  expect(() => parseRadiusTable(text, "a.csv")).toThrow(pattern);
});

test("a wave speed of 2.7 m/s makes 37.0 km at 30 degrees and 106.6 km at 10", () => {
  for (const [latitude, km] of [
    [30, 37.0],
    [10, 106.6],
  ]) {
    expectClose(deformationRadiusAt({ waveSpeed: 2.7 }, latitude, earth) / 1000, km, {
      absolute: 0.05,
      because: "published to a tenth",
    });
  }
});
