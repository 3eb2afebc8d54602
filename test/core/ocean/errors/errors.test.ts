import { describe, expect, test } from "vitest";
import { stencilNoiseGain, stencilPoints } from "../../../../core/numeric/stencils";
import { errorPlanes } from "../../../../core/ocean/errors/error-planes";
import { errorOfSums } from "../../../../core/ocean/errors/height-error";
import { heightOperators } from "../../../../core/ocean/errors/height-operators";
import { errorOfTimeMean, errorOfZonalMean } from "../../../../core/ocean/errors/mean-error";
import { addWeight, clearWeights, weightSum } from "../../../../core/ocean/errors/weight-sum";
import { geostrophicVelocity } from "../../../../core/ocean/geostrophy";
import { type GridGeometry, gridGeometry } from "../../../../core/ocean/grid-geometry";
import { relativeVorticity } from "../../../../core/ocean/vorticity";
import { cpuMilliseconds } from "../../../cpu-time";
import { expectAllClose, expectClose } from "../../../expect-close";
import { evenAxes, planeFrom, sphere } from "../grids";

const axes = evenAxes({ west: 200, south: 27, step: 0.5, columns: 14, rows: 13 });
const size = 14 * 13;
const bumpy = planeFrom(axes, (x, y) => 0.3 * Math.sin(x * 2.1) * Math.cos(y * 1.7) + 0.02 * y);
bumpy.fill(Number.NaN, 0, 3);
for (const cell of [33, 34, 90, 121, 150]) bumpy[cell] = Number.NaN;

/** Applies the weights to the heights themselves: the values must come out, NaN in the same places. */
function expectReproduced(height: Float64Array, geometry: GridGeometry): void {
  const velocity = geostrophicVelocity(height, geometry);
  const values = { ...velocity, vorticity: relativeVorticity(velocity, geometry) };
  const operators = heightOperators(height, geometry);
  const sum = weightSum(height.length);
  for (const name of ["u", "v", "vorticity"] as const) {
    const applied = values[name].map((_, cell) => {
      const hasValue = operators[name](sum, cell);
      let value = 0;
      for (let k = 0; k < sum.count; k++) value += sum.weights[sum.cells[k]] * height[sum.cells[k]];
      clearWeights(sum);
      return hasValue ? value : Number.NaN;
    });
    expectAllClose(applied, values[name], { relative: 1e-11, because: "the same sums in another order" }, name);
  }
}

describe("the weights of u, v and vorticity", () => {
  test.each(stencilPoints)(
    "reproduce each value as a weighted sum of heights, gaps included (%i points)",
    (stencil) => {
      const geometry = gridGeometry(axes, { ...sphere, stencil }, "test");
      expectReproduced(bumpy, geometry);
    },
  );
});

describe("the weights in a belt blended across the equator", () => {
  const belt = evenAxes({ west: 200, south: -8, step: 0.5, columns: 12, rows: 33 });
  const height = planeFrom(belt, (x, y) => 0.1 * Math.cos(0.4 * y) * Math.sin(x) + 0.01 * y * y);
  for (const cell of [40, 100, 101, 197, 260]) height[cell] = Number.NaN;
  const geometry = gridGeometry(belt, { ...sphere, stencil: 5, equator: "blend" }, "test");

  test("reproduce u, v and vorticity, gaps included", () => {
    const velocity = geostrophicVelocity(height, geometry);
    expect(velocity.u[16 * 12 + 11]).not.toBeNaN();
    expectReproduced(height, geometry);
  });

  test("leave u at the equator a finite error", () => {
    const { u } = errorPlanes(height, belt, geometry, { sigmaMetres: 0.01, correlationKm: 0 });
    expect(u[16 * 12 + 11]).toBeGreaterThan(0);
    expect(u[16 * 12 + 11]).toBeLessThan(0.5);
  });
});

describe("white height error", () => {
  test.each(stencilPoints)(
    "leaves u and v with the stencil's noise gain times g sigma / (f dx), %i points",
    (stencil) => {
      const geometry = gridGeometry(axes, { ...sphere, stencil }, "test");
      const errors = errorPlanes(new Float64Array(size), axes, geometry, { sigmaMetres: 0.02, correlationKm: 0 });
      const [row, column] = [6, 7];
      const cell = row * 14 + column;
      const published = { 3: Math.SQRT1_2, 5: 0.9501, 7: 1.0819, 9: 1.1674 }[stencil];
      const unit = (9.81 * 0.02) / (geometry.coriolis[row] * ((0.5 * Math.PI) / 180));
      const because = "the gains are given to four decimals";
      expectClose((errors.u[cell] / unit) * geometry.north[row], published, { absolute: 1e-4, because });
      expectClose((errors.v[cell] / unit) * geometry.east[row], published, { absolute: 1e-4, because });
      expectClose(stencilNoiseGain(stencil), published, { absolute: 1e-4, because });
    },
  );

  test("of 1 cm at 0.25 degrees and 30 N is 0.107 f in a compact five-point Laplacian: g √20 sigma / (f dx)²", () => {
    const f = 2 * sphere.omega * 0.5;
    const spacing = (0.25 * Math.PI * 6371000) / 180;
    const sum = weightSum(size);
    for (const [cell, weight] of [
      [90, -4],
      [89, 1],
      [91, 1],
      [76, 1],
      [104, 1],
    ]) {
      addWeight(sum, cell, (9.81 / f / spacing ** 2) * weight);
    }
    const error = errorOfSums(axes, { sigmaMetres: 0.01, correlationKm: 0 })(sum);
    expectClose(error / f, 0.107, { absolute: 5e-4, because: "three digits are given" });
  });

  test("is the limit of correlated error over ever shorter lengths", () => {
    const geometry = gridGeometry(axes, sphere, "test");
    const white = errorPlanes(bumpy, axes, geometry, { sigmaMetres: 0.02, correlationKm: 0 });
    const short = errorPlanes(bumpy, axes, geometry, { sigmaMetres: 0.02, correlationKm: 5 });
    for (const name of ["u", "v", "vorticity"] as const) {
      expectAllClose(short[name], white[name], { relative: 1e-9, because: "neighbours lie nine lengths apart" }, name);
    }
  });
});

describe("correlated height error", () => {
  test("over L ≫ dx has the slope error sigma/L of a smooth random field", () => {
    const geometry = gridGeometry(axes, { ...sphere, stencil: 9 }, "test");
    const errors = errorPlanes(new Float64Array(size), axes, geometry, { sigmaMetres: 0.02, correlationKm: 400 });
    const exact = ((9.81 / geometry.coriolis[6]) * 0.02) / 400e3;
    const because = "a nine-point difference at 50 km of a field 400 km wide; curvature of the sphere (L/R)²";
    expectClose(errors.u[6 * 14 + 7], exact, { relative: 4e-3, because });
    expectClose(errors.v[6 * 14 + 7], exact, { relative: 4e-3, because });
  });
});

test.each([3, 70])("two heights %i columns apart are correlated by their distance through the earth", (apart) => {
  const wide = evenAxes({ west: 200, south: 27, step: 0.5, columns: 90, rows: 4 });
  const sum = weightSum(360);
  // Added in falling order of cells: the order must not matter.
  addWeight(sum, 2 * 90 + 5 + apart, 1);
  addWeight(sum, 5, 1);
  const place = (row: number, column: number) => {
    const [phi, lambda] = [(27 + row / 2) * (Math.PI / 180), (column / 2) * (Math.PI / 180)];
    return [Math.cos(phi) * Math.cos(lambda), Math.cos(phi) * Math.sin(lambda), Math.sin(phi)];
  };
  const [one, other] = [place(2, 5 + apart), place(0, 5)];
  const distance = 6371 * Math.hypot(...one.map((value, axis) => value - other[axis]));
  const correlation = Math.exp(-(distance ** 2) / (2 * 2000 ** 2));
  const error = errorOfSums(wide, { sigmaMetres: 0.01, correlationKm: 2000 })(sum);
  expectClose(error, 0.01 * Math.sqrt(2 + 2 * correlation), { relative: 1e-12, because: "closed form" });
});

describe("the error of a zonal mean", () => {
  test.each([0, 120])(
    "of u is what the row's own weighted sum of heights has (errors correlated over %i km)",
    (length) => {
      const geometry = gridGeometry(axes, sphere, "test");
      const heights = new Float64Array(size);
      const error = { sigmaMetres: 0.02, correlationKm: length };
      const got = errorOfZonalMean(errorPlanes(heights, axes, geometry, error).u, axes, length);
      const { u } = heightOperators(heights, geometry);
      const errorOf = errorOfSums(axes, error);
      for (let row = 0; row < 13; row++) {
        const sum = weightSum(size);
        for (let column = 0; column < 14; column++) u(sum, row * 14 + column, 1 / 14);
        const because = "distances between meridians change by 1 % over the rows that one difference uses";
        expectClose(got.standardError[row], errorOf(sum), { relative: length === 0 ? 1e-12 : 0.01, because });
      }
    },
  );

  test("counts every value as independent for length 0, one for a length far above the span", () => {
    const sigmas = Float64Array.of(0.1, 0.1, Number.NaN, 0.1, 0.1);
    const days = Float64Array.of(0, 7, 14, 21, 28);
    const because = "closed form";
    expectClose(errorOfTimeMean(sigmas, days, 0).effectiveCount, 4, { relative: 1e-12, because });
    expectClose(errorOfTimeMean(sigmas, days, 0).standardError, 0.05, { relative: 1e-12, because });
    expectClose(errorOfTimeMean(sigmas, days, 1e6).effectiveCount, 1, { relative: 1e-6, because });
  });

  test("tends to span / (L √2π) independent values for a long record", () => {
    const count = 2000;
    const days = Float64Array.from({ length: count }, (_, i) => i);
    const { effectiveCount } = errorOfTimeMean(new Float64Array(count).fill(1), days, 10);
    const because = "the ends count L/span more";
    expectClose(effectiveCount, count / (10 * Math.sqrt(2 * Math.PI)), { relative: 0.01, because });
  });

  test("is NaN with a count of 0 where there is no value", () => {
    const none = errorOfTimeMean(Float64Array.of(Number.NaN), Float64Array.of(0), 5);
    expect(none).toEqual({ standardError: Number.NaN, effectiveCount: 0, count: 0 });
  });
});

describe("an error is NaN", () => {
  const geometry = gridGeometry(axes, sphere, "test");

  test("exactly where the value is NaN", () => {
    const velocity = geostrophicVelocity(bumpy, geometry);
    const values = { ...velocity, vorticity: relativeVorticity(velocity, geometry) };
    const errors = errorPlanes(bumpy, axes, geometry, { sigmaMetres: 0.01, correlationKm: 0 });
    for (const name of ["u", "v", "vorticity"] as const) {
      expect([...errors[name]].map(Number.isNaN)).toEqual([...values[name]].map(Number.isNaN));
    }
  });

  test("where a height that is used has no error of its own, and only there", () => {
    const sigmaMetres = new Float64Array(size).fill(0.01);
    sigmaMetres[6 * 14 + 7] = Number.NaN;
    const error = { sigmaMetres, correlationKm: 0 };
    const { u } = errorPlanes(new Float64Array(size), axes, geometry, error);
    const lost = [...u.keys()].filter((cell) => Number.isNaN(u[cell]));
    expect(lost).toEqual([3, 4, 5, 7, 8, 9].map((row) => row * 14 + 7));
  });

  test("never for a legal error; wrong sizes, negative errors and lengths are refused", () => {
    const attempt = (sigmaMetres: number | Float64Array, correlationKm: number) => () =>
      errorPlanes(bumpy, axes, geometry, { sigmaMetres, correlationKm });
    expect(attempt(new Float64Array(3), 0)).toThrow(/an error at each of 182 cells, got 3 values/);
    expect(attempt(-0.01, 0)).toThrow(/0 m or more, got -0.01 m/);
    expect(attempt(0.01, -5)).toThrow(/0 km or more, got -5/);
  });
});

test("a plane of 90 × 100 cells with seven points and correlated error takes below half a second", () => {
  const wide = evenAxes({ west: 200, south: 20, step: 0.25, columns: 100, rows: 90 });
  const geometry = gridGeometry(wide, sphere, "test");
  const height = planeFrom(wide, (x, y) => Math.sin(x) * Math.cos(y));
  const times = [1, 2, 3].map(() => {
    const start = cpuMilliseconds();
    errorPlanes(height, wide, geometry, { sigmaMetres: 0.02, correlationKm: 100 });
    return cpuMilliseconds() - start;
  });
  expect(Math.min(...times)).toBeLessThan(500);
});
