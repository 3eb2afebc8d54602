import { expect, test } from "vitest";
import { zonality, zonalityByAveraging } from "../../../core/jets/zonality";
import { randomStream } from "../../../core/numeric/statistics/random";
import { expectClose } from "../../expect-close";

test("a plane wave of 1000 km by 300 km has (l² - k²) / (l² + k²) = 0.83486", () => {
  const [k, l] = [2 * Math.PI, (2 * Math.PI * 10) / 3];
  const cells = Array.from({ length: 60 * 60 }, (_, i) => {
    const phase = k * ((i % 60) / 60) + l * 0.3 * (Math.floor(i / 60) / 60);
    return [l * Math.sin(phase), -k * Math.sin(phase)];
  });
  const u = Float64Array.from(cells, ([each]) => each);
  const v = Float64Array.from(cells, ([, each]) => each);
  expectClose(zonality(u, v), 0.8348623853211009, { relative: 1e-12, because: "ratio of squares, same phases" });
});

test("gaps and cells without weight are left out; nothing at all is NaN", () => {
  const gap = Number.NaN;
  const u = Float64Array.from([1, gap, 5, 0]);
  const v = Float64Array.from([0, 3, gap, 2]);
  expectClose(zonality(u, v), (1 - 4) / (1 + 4), { relative: 1e-15, because: "exact" });
  expect(zonality(u, v, Float64Array.from([1, 1, 1, 0]))).toBe(1);
  expect(zonality(Float64Array.from([gap]), Float64Array.from([1]))).toBeNaN();
});

test("averaging brings out a steady zonal flow under isotropic noise as 1 / (1 + 2 noise² / (n flow²))", () => {
  const random = randomStream(5);
  const [cells, dates, flow] = [400, 256, 0.3];
  const weights = new Float64Array(cells).fill(1);
  const u = Float64Array.from({ length: cells * dates }, () => flow + random.normal());
  const v = Float64Array.from({ length: cells * dates }, () => random.normal());
  const lengths = [1, 4, 16, 64];
  const got = zonalityByAveraging({ u, v, dates, weights }, lengths);
  lengths.forEach((length, i) => {
    const wanted = 1 / (1 + 2 / (length * flow * flow));
    expectClose(got[i], wanted, { absolute: 0.03, because: "1600 blocks at the least, deviation below 0.015" });
  });
});

test("a block counts where half of its dates are valid, and the incomplete last block does not", () => {
  const gap = Number.NaN;
  const u = Float64Array.from([1, gap, gap, gap, 9]);
  const v = Float64Array.from([0, gap, gap, gap, 9]);
  const weights = Float64Array.from([1]);
  expect([...zonalityByAveraging({ u, v, dates: 5, weights }, [2, 4])]).toEqual([1, Number.NaN]);
});
