import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { GridAxes } from "../../../../core/model/axis";
import { gridGeometry } from "../../../../core/ocean/grid-geometry";
import { planesFrom } from "../../../../core/ocean/quantities/evaluate";
import { quantities } from "../../../../core/ocean/quantities/index";
import { expectAllClose } from "../../../expect-close";
import { evenAxes, planeFrom, sphere } from "../grids";

const degree = Math.PI / 180;
const columns = 36;
const rows = 11;
const global = evenAxes({ west: 0, south: 20, step: 10, columns, rows: 5 });
const axes: GridAxes = {
  longitude: global.longitude,
  latitude: {
    kind: "latitude",
    values: Float64Array.from({ length: rows }, (_, i) => 20 + 4 * i),
    step: 4,
    even: true,
    periodic: false,
  },
};
const settings = { ...sphere, stencil: 5 } as const;

/** A random smooth field: a few waves round the globe, of amplitude and phase drawn. */
const field = fc
  .array(
    fc.record({
      a: fc.double({ min: 0.05, max: 0.3, noNaN: true }),
      k: fc.integer({ min: 1, max: 4 }),
      phase: fc.double({ min: 0, max: 6.28, noNaN: true }),
    }),
    {
      minLength: 2,
      maxLength: 4,
    },
  )
  .map(
    (waves) => (longitude: number, latitude: number) =>
      waves.reduce(
        (sum, { a, k, phase }) =>
          sum + a * Math.cos(k * longitude * degree + phase) * Math.cos((k + 1) * latitude * degree + phase),
        0,
      ),
  );
const holes = fc.array(fc.integer({ min: 0, max: rows * columns - 1 }), { maxLength: 40 });

function planesOf(grid: GridAxes, heights: Float64Array) {
  return planesFrom(heights, gridGeometry(grid, settings, "test"));
}

/** Plane with the cells named turned to gaps. */
function withGaps(plane: Float64Array, gaps: readonly number[]): Float64Array {
  const holed = plane.slice();
  for (const gap of gaps) holed[gap] = Number.NaN;
  return holed;
}

describe.each(quantities.map((quantity) => [quantity.id, quantity] as const))("%s", (id, quantity) => {
  const rounding = { relative: 1e-7, because: "two differences of rounded sines; a ratio of them" };

  test("shifting longitudes round the globe moves it along and changes nothing else", () => {
    fc.assert(
      fc.property(field, holes, fc.integer({ min: 1, max: columns - 1 }), (height, gaps, shift) => {
        const shifted: GridAxes = {
          ...axes,
          longitude: { ...axes.longitude, values: axes.longitude.values.map((value) => value + shift * 10) },
        };
        const plane = withGaps(planeFrom(axes, height), gaps);
        const rolled = (values: Float64Array) =>
          values.map((_, i) => values[Math.floor(i / columns) * columns + (((i % columns) + shift) % columns)]);
        expectAllClose(planesOf(shifted, rolled(plane))(id), rolled(planesOf(axes, plane)(id)), rounding);
      }),
      { numRuns: 25 },
    );
  });

  test("turning the order of latitudes turns it and changes nothing else", () => {
    fc.assert(
      fc.property(field, (height) => {
        const flippedAxes: GridAxes = {
          ...axes,
          latitude: { ...axes.latitude, values: axes.latitude.values.toReversed(), step: -axes.latitude.step },
        };
        const flipped = (values: Float64Array) =>
          values.map((_, i) => values[(rows - 1 - Math.floor(i / columns)) * columns + (i % columns)]);
        const plane = planeFrom(axes, height);
        expectAllClose(planesOf(flippedAxes, flipped(plane))(id), flipped(planesOf(axes, plane)(id)), rounding);
      }),
      { numRuns: 25 },
    );
  });

  test("it scales as its unit does when all lengths are told in centimetres", () => {
    // Height, radius and gravity in centimetres: m a s-b becomes 100 to the a.
    const power = [...quantity.units.matchAll(/\bm(-?\d*)(?= |$)/g)]
      .map(([, exponent]) => (exponent === "" ? 1 : Number(exponent)))
      .reduce((sum: number, exponent) => sum + exponent, 0);
    fc.assert(
      fc.property(field, (height) => {
        const plane = planeFrom(axes, height);
        const centimetres = { ...settings, radius: settings.radius * 100, gravity: 981 };
        // The iteration of cyclogeostrophy stops at a speed that is fixed in m/s: see its own tests.
        if (id.endsWith("-cyclogeostrophic")) return;
        const scaled = planesFrom(
          plane.map((value) => value * 100),
          gridGeometry(axes, centimetres, "test"),
        )(id);
        const wanted = planesOf(axes, plane)(id).map((value) => value * 100 ** power);
        expectAllClose(scaled, wanted, rounding);
      }),
      { numRuns: 25 },
    );
  });

  test("a random gap gives no value and no infinite one beside it", () => {
    fc.assert(
      fc.property(field, holes, (height, gaps) => {
        const plane = planesOf(axes, withGaps(planeFrom(axes, height), gaps))(id);
        for (const gap of gaps) expect(plane[gap]).toBeNaN();
        expect(plane.some((value) => Math.abs(value) === Number.POSITIVE_INFINITY)).toBe(false);
      }),
      { numRuns: 25 },
    );
  });
});

describe("straight slopes with random gaps", () => {
  test("u and v are exact wherever they have a value: every stencil that gaps leave differentiates a line exactly", () => {
    const local = evenAxes({ west: 0, south: 20, step: 1, columns: 12, rows: 12 });
    const geometry = gridGeometry(local, settings, "test");
    fc.assert(
      fc.property(fc.uint8Array({ minLength: 144, maxLength: 144 }), (draw) => {
        const planes = planesFrom(
          planeFrom(local, (a, p) => 0.02 * a - 0.03 * p).map((value, i) => (draw[i] < 80 ? Number.NaN : value)),
          geometry,
        );
        const factor = (row: number) => geometry.gravity[row] / geometry.coriolis[row] / degree;
        for (const [id, slope, metric] of [
          ["u", 0.03, geometry.north],
          ["v", 0.02, geometry.east],
        ] as const) {
          planes(id).forEach((value, i) => {
            const row = Math.floor(i / 12);
            const truth = (slope * factor(row)) / metric[row];
            if (!Number.isNaN(value)) expect(Math.abs(value / truth - 1)).toBeLessThan(1e-10);
          });
        }
      }),
      { numRuns: 60 },
    );
  });
});
