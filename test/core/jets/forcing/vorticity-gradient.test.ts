import { describe, expect, test } from "vitest";
import { planMeridian } from "../../../../core/jets/forcing/meridian";
import { absoluteVorticityGradient, signChanges } from "../../../../core/jets/forcing/vorticity-gradient";
import { planetaryVorticityGradient } from "../../../../core/ocean/earth";
import { expectAllClose, expectClose } from "../../../expect-close";
import { sphere } from "../earths";

const latitude = Float64Array.from({ length: 401 }, (_, i) => 25 + i * 0.025);
const meridian = planMeridian(latitude, 7, sphere);
const inner = (values: Float64Array) => values.subarray(2, -2);

test("solid rotation U0 cos(latitude) adds 2 U0 cos(latitude) / R² to beta", () => {
  const flow = latitude.map((value) => 10 * Math.cos((value * Math.PI) / 180));
  const wanted = latitude.map(
    (value, row) => meridian.beta[row] + (20 * Math.cos((value * Math.PI) / 180)) / 6371000 ** 2,
  );
  const got = absoluteVorticityGradient(flow, meridian);
  expectAllClose(inner(got), inner(wanted), { relative: 3e-6, because: "stencils narrow to three points by the ends" });
  expect([got[0], got[1], got[399], got[400]].every(Number.isNaN)).toBe(true);
});

describe("Bickley jets U0 sech²((y - y0) / L) on either side of the bound of the Rayleigh-Kuo condition", () => {
  const beta = planetaryVorticityGradient(30, sphere);
  const width = 60e3;

  function jet(speed: number) {
    return latitude.map((value) => {
      const y = ((value - 30) * Math.PI * 6371000) / 180;
      return speed / Math.cosh(y / width) ** 2;
    });
  }

  // Metric terms and the change of beta over a jet shift the bound by about L tan(latitude) / R, under 1 % here.
  const eastwardBound = 1.5 * beta * width ** 2;
  const westwardBound = (beta * width ** 2) / 2;

  test.each([
    ["eastward", eastwardBound],
    ["westward", -westwardBound],
  ])("%s: stable 5 %% below the bound of speed, a sign change 5 %% above", (_, bound) => {
    const below = absoluteVorticityGradient(jet(0.95 * bound), meridian);
    const above = absoluteVorticityGradient(jet(1.05 * bound), meridian);
    expect(signChanges(below, latitude)).toEqual([]);
    expect(signChanges(above, latitude).length).toBeGreaterThanOrEqual(2);
  });

  test("a westward jet of twice the bound changes sign where beta = U_yy on its flanks", () => {
    const got = signChanges(absoluteVorticityGradient(jet(-2 * westwardBound), meridian), latitude);
    expect(got).toHaveLength(2);
    // U_yy = (U0 / L²) (4 s - 6 s²), s = sech²: with U0 = -beta L² it equals beta where 6 s² - 4 s - 1 = 0.
    const s = (4 + Math.sqrt(16 + 24)) / 12;
    const off = (width * Math.acosh(1 / Math.sqrt(s)) * 180) / (Math.PI * 6371000);
    got.forEach((each, i) => {
      expectClose(Math.abs(each - 30), off, { relative: 0.02, because: `metric and beta vary over the jet (${i})` });
    });
  });
});

describe("sign changes", () => {
  const at = Float64Array.from([10, 11, 12, 13, 14]);

  test("are interpolated between rows", () => {
    expect(signChanges(Float64Array.from([1, 3, -1, -2, 2]), at)).toEqual([11.75, 13.5]);
  });

  test("are not counted across gaps, and a zero row is one crossing at most", () => {
    expect(signChanges(Float64Array.from([1, Number.NaN, -1, -1, -1]), at)).toEqual([]);
    expect(signChanges(Float64Array.from([1, 1, 0, -1, -1]), at)).toEqual([12]);
    expect(signChanges(Float64Array.from([1, 1, 0, 1, 1]), at)).toEqual([]);
  });
});
