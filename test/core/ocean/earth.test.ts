import { describe, test } from "vitest";
import {
  coriolisParameter,
  gravityAt,
  metresPerRadianEast,
  metresPerRadianNorth,
  planetaryVorticityGradient,
} from "../../../core/ocean/earth";
import { expectClose } from "../../expect-close";
import { sphere } from "./grids";

const ellipsoid = { ...sphere, earth: "ellipsoid", gravity: "latitude" } as const;
const degree = Math.PI / 180;

/** latitude, f (1e-5 s-1), beta on the sphere (1e-11), gravity (TEOS-10), metres a degree of latitude and of longitude (WGS-84). */
const table = [
  [0, 0, 2.289159, 9.780327, 110574.3, 111319.5],
  [10, 2.532525, 2.254381, 9.781884, 110607.8, 109639.4],
  [30, 7.292115, 1.98247, 9.793249, 110852.4, 96486.3],
  [45, 10.31261, 1.61868, 9.8062, 111131.8, 78846.8],
  [60, 12.63031, 1.144579, 9.819179, 111412.3, 55800.0],
] as const;

describe("the earth's constants against tabulated values", () => {
  test.each(table)("at %d degrees", (latitude, f, beta, gravity, north, east) => {
    const lastDigit = (value: number) => ({ absolute: value, because: "last printed digit of the table" });
    expectClose(coriolisParameter(latitude, sphere.omega) * 1e5, f, lastDigit(1e-5), "f");
    expectClose(planetaryVorticityGradient(latitude, sphere) * 1e11, beta, lastDigit(1e-6), "beta");
    expectClose(gravityAt(latitude, ellipsoid), gravity, lastDigit(1e-6), "gravity");
    // Degree lengths agree with the tables of nautical manuals to the metre [from memory].
    expectClose(metresPerRadianNorth(latitude * degree, ellipsoid) * degree, north, lastDigit(0.06), "a degree north");
    expectClose(metresPerRadianEast(latitude * degree, ellipsoid) * degree, east, lastDigit(0.06), "a degree east");
  });

  test("a degree on the 6371 km sphere is 111 194.93 m", () => {
    expectClose(metresPerRadianNorth(0.3, sphere) * degree, 111194.93, { absolute: 0.006, because: "printed digits" });
  });

  test("the Coriolis parameter changes sign at the equator", () => {
    expectClose(coriolisParameter(-30, sphere.omega), -7.292115e-5, { relative: 1e-12, because: "sin 30° is a half" });
  });
});
