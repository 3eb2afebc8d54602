import { describe, expect, test } from "vitest";
import type { GridAxes } from "../../../core/model/axis";
import type { StencilPoints } from "../../../core/numeric/stencils";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { relativeVorticity } from "../../../core/ocean/vorticity";
import { expectClose } from "../../expect-close";
import { evenAxes, planeFrom, sphere } from "./grids";
import {
  cosineLatitude,
  evenLongitudes,
  exactWaveFlow,
  mercatorLatitude,
  stretchedAxes,
  waveHeight,
} from "./spherical-wave";

const names = ["u", "v", "vorticity"] as const;

/** u, v and vorticity of the wave by differences. */
function flowOf(axes: GridAxes, stencil: StencilPoints) {
  const geometry = gridGeometry(axes, { ...sphere, stencil }, "test");
  const velocity = geostrophicVelocity(planeFrom(axes, waveHeight), geometry);
  return [velocity.u, velocity.v, relativeVorticity(velocity, geometry)] as const;
}

/** Largest errors of u, v, vorticity at every `every`-th cell between a quarter and three quarters of each axis. */
function worstErrors(axes: GridAxes, stencil: StencilPoints, every: number): number[] {
  const planes = flowOf(axes, stencil);
  const { latitude, longitude } = axes;
  const columns = longitude.values.length;
  const errors = [0, 0, 0];
  for (let row = 0; row < latitude.values.length; row += every) {
    if (row * 4 < latitude.values.length || row * 4 > 3 * latitude.values.length) continue;
    for (let column = 0; column < columns; column += every) {
      if (column * 4 < columns || column * 4 > 3 * columns) continue;
      const exact = exactWaveFlow(longitude.values[column], latitude.values[row]);
      exact.forEach((truth, k) => {
        errors[k] = Math.max(errors[k], Math.abs(planes[k][row * columns + column] - truth));
      });
    }
  }
  return errors;
}

describe.each([
  ["Mercator", mercatorLatitude],
  ["cosine-stretched", cosineLatitude],
] as const)("on %s latitudes and stretched longitudes", (_, latitudeAt) => {
  const longitudeAt = (s: number) => evenLongitudes(s) + 1.2 * Math.sin(2 * Math.PI * s);

  test.each([
    [3, 2, 64],
    [5, 4, 64],
    [7, 6, 32],
    [9, 8, 32],
  ] as const)("the %i-point stencil keeps its order %i for u, v and vorticity", (points, order, cells) => {
    const coarse = worstErrors(stretchedAxes({ latitudeAt, longitudeAt, step: 1 / cells }), points, 1);
    const fine = worstErrors(stretchedAxes({ latitudeAt, longitudeAt, step: 1 / (2 * cells) }), points, 2);
    coarse.forEach((error, k) => {
      const observed = Math.log2(error / fine[k]);
      expectClose(observed, order, { absolute: 0.25, because: "next order's share at this spacing" }, names[k]);
    });
  });
});

describe("a global grid with uneven longitudes", () => {
  const longitudeAt = (s: number) => 360 * s + 10 * Math.sin(2 * Math.PI * s);
  const axes = (step: number, periodic: boolean) =>
    stretchedAxes({ latitudeAt: (s) => 30 + 24 * s, longitudeAt, step, periodic });

  test("differences across the seam are as good as elsewhere", () => {
    const global = axes(1 / 240, true);
    const planes = flowOf(global, 7);
    const [row, columns] = [120, global.longitude.values.length];
    const error = (column: number, k: number) =>
      Math.abs(
        planes[k][row * columns + column] -
          exactWaveFlow(global.longitude.values[column], global.latitude.values[row])[k],
      );
    const scale = [0.5, 0.5, 5e-6];
    for (const column of [0, 1, 2, columns - 3, columns - 2, columns - 1]) {
      names.forEach((name, k) => {
        expect(error(column, k), `${name}, column ${column}`).toBeLessThan(2e-4 * scale[k]);
      });
    }
  });

  test("the same cells as a regional grid do not see each other across the seam", () => {
    const [global, regional] = [axes(1 / 48, true), axes(1 / 48, true)];
    const cut = { ...regional, longitude: { ...regional.longitude, periodic: false } };
    const [wrapped, open] = [flowOf(global, 7)[1], flowOf(cut, 7)[1]];
    const at = 24 * 48;
    expect(wrapped[at]).not.toBe(open[at]);
    expectClose(open[at + 24], wrapped[at + 24], { relative: 1e-12, because: "the same stencil inside" });
  });
});

describe("cells at a pole", () => {
  const geometryOf = (values: number[], even: boolean) =>
    gridGeometry(
      {
        latitude: {
          kind: "latitude",
          values: Float64Array.from(values),
          step: values[1] - values[0],
          even,
          periodic: false,
        },
        longitude: evenAxes({ west: 0, south: 0, step: 1, columns: 5, rows: 3 }).longitude,
      },
      sphere,
      "grid A",
    );

  test("a row on either pole is refused with where, why and what to do", () => {
    for (const values of [
      [88, 89, 90],
      [-90, -89, -88],
      [90, 89, 88],
    ]) {
      expect(() => geometryOf(values, true)).toThrow(
        /grid A: .*touch a pole.*latitude -?90; keep the region within 89 /,
      );
    }
  });

  test("a cell that reaches over the pole is refused, one that ends there is not", () => {
    expect(() => geometryOf([89.1, 89.5, 89.9], true)).toThrow(/touch a pole/);
    expect(() => geometryOf([89.1, 89.5, 89.9], false)).toThrow(/touch a pole/);
    expect(() => geometryOf([89.25, 89.55, 89.85], true)).not.toThrow();
  });

  test("uneven rows that shrink polewards are judged by their own spacing", () => {
    expect(() => geometryOf([80, 88, 89.6, 89.9], false)).toThrow(/touch a pole/);
    expect(() => geometryOf([80, 88, 89.6, 89.85], false)).not.toThrow();
  });
});
