import { describe, expect, test } from "vitest";
import type { GridAxes } from "../../../core/model/axis";
import { blendedRows } from "../../../core/ocean/equator";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { northwardDerivative } from "../../../core/ocean/gradients";
import { type GeometrySettings, gridGeometry } from "../../../core/ocean/grid-geometry";
import { planesFrom } from "../../../core/ocean/quantities/evaluate";
import { expectAllClose, expectClose } from "../../expect-close";
import { evenAxes, planeFrom, sphere } from "./grids";

const degree = Math.PI / 180;
const R = sphere.radius;
const g = 9.7803;
const blend: GeometrySettings = { ...sphere, gravity: g, equator: "blend" };
const beta = (2 * sphere.omega) / R;
const columns = 9;
const axes = evenAxes({ west: -140, south: -8, step: 0.25, columns, rows: 65 });
const geometry = gridGeometry(axes, blend, "test");
const rowAt = (latitude: number) => Math.round((latitude + 8) / 0.25);
const at = (latitude: number) => rowAt(latitude) * columns + 4;

const c = 2.7;
const kelvinHeight = (_: number, p: number) => 0.05 * Math.exp((-beta * (p * degree * R) ** 2) / (2 * c));

describe("an equatorial Kelvin wave (c = 2.7 m/s, 5 cm; u = g/c times height, v = 0 at every latitude)", () => {
  const height = planeFrom(axes, kelvinHeight);
  const { u, v } = geostrophicVelocity(height, geometry);

  test("-g/beta times the second derivative of height is its 0.18112 m/s at the equator", () => {
    const bend = northwardDerivative(northwardDerivative(height, geometry), geometry);
    const truth = { relative: 1e-4, because: "sixth-order differences, twice, at a quarter degree" };
    expectClose((-g / beta) * bend[at(0)], (g * 0.05) / c, truth);
    expectClose((-g / beta) * bend[at(0)], 0.18112, truth);
  });

  test("the cubic fit of slopes, blended, gives what numpy's least squares gives", () => {
    // numpy.linalg.lstsq on the same slopes, weights exp(-(latitude/2.2)^2).
    for (const [latitude, wanted] of [
      [0, 0.15761],
      [1, 0.15651],
      [2.25, 0.13728],
      [3, 0.11351],
      [5, 0.04887],
    ]) {
      for (const signed of [latitude, -latitude]) {
        expectClose(u[at(signed)], wanted, { absolute: 6e-6, because: "printed digits" }, `${signed}°`);
      }
    }
  });

  test("blended u stays within 15 % of the wave's all over the belt, and v vanishes", () => {
    for (let latitude = -5; latitude <= 5; latitude += 0.25) {
      const truth = (g / c) * height[at(latitude)];
      // A cubic over ten degrees cannot follow the wave's crest: 13 % low at the equator.
      expectClose(u[at(latitude)], truth, { relative: 0.15, because: "what a cubic can follow" }, `${latitude}°`);
      expectClose(v[at(latitude)], 0, { absolute: 1e-9, because: "the height does not change eastward" });
    }
  });

  test("beyond the belt it is the plain geostrophic flow", () => {
    const plain = geostrophicVelocity(height, gridGeometry(axes, { ...blend, equator: "blank" }, "test"));
    for (let row = 0; row < 65; row++) {
      if (Math.abs(axes.latitude.values[row]) > 5) expect(u[row * columns + 4]).toBe(plain.u[row * columns + 4]);
    }
  });
});

describe("the beta-plane solution", () => {
  const y = (p: number) => p * degree * R;

  test("is exact where the slope's cubic is: h = a y² + b y⁴ gives -g/beta (2a + 4b y²) at full weight", () => {
    const [a, b] = [-1e-13, 4e-26];
    const height = planeFrom(axes, (_, p) => a * y(p) ** 2 + b * y(p) ** 4);
    const heavy = gridGeometry(axes, { ...blend, equatorBlend: { lengthScaleDegrees: 1e6 } }, "test");
    const { u } = geostrophicVelocity(height, heavy);
    for (const p of [-5, -1.25, 0, 2, 4.75]) {
      const truth = (-g / beta) * (2 * a + 4 * b * y(p) ** 2);
      expectClose(u[at(p)], truth, { relative: 1e-9, because: "differences of a quartic are exact" }, `${p}°`);
    }
  });

  test("v at the equator is g/beta times the mixed second derivative of height", () => {
    const x = (a: number) => (a + 140) * degree * R;
    const height = planeFrom(axes, (a, p) => 3e-14 * x(a) * y(p) * Math.cos(p * degree));
    const { v } = geostrophicVelocity(height, geometry);
    // The cosine undoes the narrowing of the parallels, so that the eastward slope is linear in y.
    for (let column = 0; column < columns; column++) {
      const got = v[rowAt(0) * columns + column];
      expectClose(got, (g / beta) * 3e-14, { relative: 1e-9, because: "differences of a straight slope are exact" });
    }
  });

  test("a slope that is constant across the equator moves nothing there", () => {
    const tilted = planeFrom(axes, (_, p) => 1e-7 * y(p));
    const { u } = geostrophicVelocity(tilted, geometry);
    expectClose(u[at(0)], 0, { absolute: 1e-9, because: "the fit's constant is dropped" });
  });

  test.each([
    ["symmetric about the equator", 1],
    ["antisymmetric", -1],
  ] as const)("a height %s gives u of the same symmetry and v of the other", (_, sign) => {
    const half = (a: number, p: number) => 0.1 * Math.cos(a / 2) * (sign === 1 ? Math.cos(p / 3) : Math.sin(p / 3));
    const { u, v } = geostrophicVelocity(planeFrom(axes, half), geometry);
    for (let row = 0; row < 65; row++) {
      for (let column = 0; column < columns; column++) {
        const [i, mirrored] = [row * columns + column, (64 - row) * columns + column];
        const rounding = { absolute: 1e-9, because: "sums in another order" };
        expectClose(u[i], sign * u[mirrored], rounding, "u");
        expectClose(v[i], -sign * v[mirrored], rounding, "v");
      }
    }
  });

  test("blended velocities are linear in height, so that filtering after reduction stays valid", () => {
    const one = planeFrom(axes, (a, p) => 0.1 * Math.sin(a) * Math.cos(p));
    const two = planeFrom(axes, (a, p) => 0.2 * Math.cos(a * p * 0.01));
    const sum = geostrophicVelocity(
      one.map((value, i) => 2 * value - 3 * two[i]),
      geometry,
    );
    const [first, second] = [geostrophicVelocity(one, geometry), geostrophicVelocity(two, geometry)];
    for (const key of ["u", "v"] as const) {
      const parts = first[key].map((value, i) => 2 * value - 3 * second[key][i]);
      expectAllClose(sum[key], parts, { relative: 1e-11, because: "rounding" });
    }
  });

  test("rows may run from north to south", () => {
    const downward: GridAxes = {
      ...axes,
      latitude: { ...axes.latitude, values: axes.latitude.values.toReversed(), step: -0.25 },
    };
    const field = (a: number, p: number) => 0.1 * Math.sin(a) * Math.cos(p + 0.3);
    const up = geostrophicVelocity(planeFrom(axes, field), geometry);
    const down = geostrophicVelocity(planeFrom(downward, field), gridGeometry(downward, blend, "test"));
    for (let row = 0; row < 65; row++) {
      const there = (64 - row) * columns + 4;
      expectClose(down.u[there], up.u[row * columns + 4], { absolute: 1e-9, because: "sums in another order" });
    }
  });
});

describe("where the blend comes from and where there is none", () => {
  const height = planeFrom(axes, kelvinHeight);

  test("rows with more than a hundredth of it are marked: within 2.2 √ln 100 = 4.72 degrees", () => {
    blendedRows(geometry).forEach((mark, row) => {
      expect(mark).toBe(Math.abs(axes.latitude.values[row]) < 4.72 ? 1 : 0);
    });
    expect(blendedRows(gridGeometry(axes, { ...blend, equator: "blank" }, "test"))).toEqual(new Uint8Array(65));
  });

  test('with "blank", and with no word of it, the belt is empty and all else as before', () => {
    const blank = geostrophicVelocity(height, gridGeometry(axes, { ...blend, equator: "blank" }, "test"));
    const silent = geostrophicVelocity(height, gridGeometry(axes, { ...sphere, gravity: g }, "test"));
    expect(blank).toEqual(silent);
    axes.latitude.values.forEach((latitude, row) => {
      expect(Number.isNaN(blank.u[row * columns + 4]), `${latitude}°`).toBe(Math.abs(latitude) < 5);
    });
  });

  test.each([
    ["does not reach the belt's southern edge", { south: -3, step: 0.25, rows: 60 }, /rows reach from -3 to .*-5 to 5/],
    ["has two rows to a side", { south: -10.5, step: 3, rows: 8 }, /2 rows south and 2 north.*needs 3 on each side/],
  ] as const)("a grid that %s keeps the belt blank and says why", (_, box, reason) => {
    const local = evenAxes({ west: 0, columns, ...box });
    const partial = gridGeometry(local, blend, "test");
    expect(partial.equatorBlend).toBeNull();
    expect(partial.equatorNote).toMatch(reason);
    const { u } = geostrophicVelocity(planeFrom(local, kelvinHeight), partial);
    local.latitude.values.forEach((latitude, row) => {
      expect(Number.isNaN(u[row * columns + 4])).toBe(Math.abs(latitude) < 5);
    });
  });

  test("a grid far from the equator has nothing to blend and nothing to say", () => {
    const far = gridGeometry(evenAxes({ west: 0, south: 20, step: 1, columns, rows: 9 }), blend, "test");
    expect([far.equatorBlend, far.equatorNote]).toEqual([null, ""]);
  });

  test("a gap stays a gap, and a column with land over half of one side is blank in the whole belt", () => {
    const holed = height.slice();
    const gap = at(1.5);
    holed[gap] = Number.NaN;
    for (let latitude = 1; latitude <= 5; latitude += 0.25) holed[rowAt(latitude) * columns + 7] = Number.NaN;
    const { u } = geostrophicVelocity(holed, geometry);
    expect(u[gap]).toBeNaN();
    expect(u[at(1)]).not.toBeNaN();
    for (let latitude = -5; latitude <= 5; latitude += 0.25) expect(u[rowAt(latitude) * columns + 7]).toBeNaN();
    expect(u[rowAt(-5.25) * columns + 7]).not.toBeNaN();
    // Its neighbour's u rests on its own column alone.
    expectClose(u[rowAt(0) * columns + 6], 0.15761, { absolute: 6e-6, because: "printed digits" });
  });

  test("vorticity follows from the blended flow; what divides by f stays blank", () => {
    const planes = planesFrom(planeFrom(axes, kelvinHeight), geometry);
    expect(planes("vorticity")[at(1)]).not.toBeNaN();
    for (const id of ["rossby-number", "u-cyclogeostrophic"]) {
      expect(planes(id)[at(1)]).toBeNaN();
      expect(planes(id)[at(6)]).not.toBeNaN();
    }
  });
});
