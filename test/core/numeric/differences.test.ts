import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type DifferenceAxis, differentiateLine, planDifferences } from "../../../core/numeric/differences";
import { type StencilPoints, stencilPoints } from "../../../core/numeric/stencils";
import { expectAllClose, expectClose } from "../../expect-close";

function axis(coordinates: number[], options: Partial<DifferenceAxis> = {}): DifferenceAxis {
  return { coordinates: Float64Array.from(coordinates), even: true, periodic: false, turn: 2 * Math.PI, ...options };
}

function derivative(
  values: number[],
  on: DifferenceAxis,
  points: StencilPoints,
): { out: Float64Array; widths: Int8Array } {
  const out = new Float64Array(values.length);
  const widths = new Int8Array(values.length);
  differentiateLine(Float64Array.from(values), { offset: 0, stride: 1 }, planDifferences(on, points), out, widths);
  return { out, widths };
}

const range = (count: number, step = 1) => Array.from({ length: count }, (_, i) => i * step);

describe("differences along a line", () => {
  test.each(stencilPoints)(
    "a %i-point difference is exact inside for a polynomial of its order, and second order at the ends",
    (points) => {
      const x = range(20, 0.1);
      const inside = derivative(
        x.map((value) => value ** (points - 1)),
        axis(x),
        points,
      ).out;
      const half = (points - 1) / 2;
      for (let i = half; i < 20 - half; i++) {
        expectClose(inside[i], (points - 1) * x[i] ** (points - 2), {
          relative: 1e-9,
          absolute: 1e-9,
          because: "cancellation",
        });
      }
      const parabola = derivative(
        x.map((value) => value * value),
        axis(x),
        points,
      ).out;
      expectAllClose(
        parabola,
        x.map((value) => 2 * value),
        { absolute: 1e-12, because: "exact for a parabola, ends included" },
      );
    },
  );

  test.each([
    [3, 2],
    [5, 4],
    [7, 6],
    [9, 8],
  ] as const)("the observed order of the %i-point difference is %i", (points, order) => {
    const errorOn = (count: number) => {
      const x = range(count, 2 / (count - 1));
      const out = derivative(
        x.map((value) => Math.sin(3 * value)),
        axis(x),
        points,
      ).out;
      const half = (points - 1) / 2;
      let worst = 0;
      for (let i = half; i < count - half; i++) worst = Math.max(worst, Math.abs(out[i] - 3 * Math.cos(3 * x[i])));
      return worst;
    };
    const counts = points === 9 ? [17, 33] : [33, 65];
    const observed = Math.log(errorOn(counts[0]) / errorOn(counts[1])) / Math.log((counts[1] - 1) / (counts[0] - 1));
    expectClose(observed, order, { absolute: 0.1, because: "the bound asked of an observed order" });
  });

  test("uneven coordinates keep the order: a quartic is exact for five points on a stretched axis", () => {
    const x = range(16).map((i) => 0.1 * i + 0.01 * i * i);
    const out = derivative(
      x.map((value) => value ** 4),
      axis(x, { even: false }),
      5,
    ).out;
    for (let i = 2; i < 14; i++) {
      expectClose(out[i], 4 * x[i] ** 3, { relative: 1e-9, because: "cancellation in float64" });
    }
  });

  test("a periodic axis is differenced across its seam", () => {
    const count = 36;
    const x = range(count, (2 * Math.PI) / count);
    const out = derivative(x.map(Math.sin), axis(x, { periodic: true }), 9).out;
    expectAllClose(out, x.map(Math.cos), { absolute: 1e-7, because: "eighth-order truncation at 36 points a wave" });
  });

  test("a descending axis gives the same derivative", () => {
    const x = range(12, 0.2);
    const up = derivative(
      x.map((value) => value ** 3),
      axis(x),
      7,
    ).out;
    const down = derivative(
      x.toReversed().map((value) => value ** 3),
      axis(x.toReversed()),
      7,
    ).out;
    expectAllClose(down.toReversed(), up, { relative: 1e-12, because: "same arithmetic in another order" });
  });

  test("stencils narrow symmetrically beside a gap, then go one-sided, and the widths say so", () => {
    const x = range(12);
    const values = x.map((value) => value * value);
    values[5] = Number.NaN;
    const { out, widths } = derivative(values, axis(x), 9);
    expect([...widths]).toEqual([-3, 3, 5, 3, -3, 0, -3, 3, 5, 5, 3, -3]);
    x.forEach((value, i) => {
      expectClose(out[i], i === 5 ? Number.NaN : 2 * value, { absolute: 1e-12, because: "a parabola is exact" });
    });
  });

  test("a lone cell and a pair of cells have no slope", () => {
    const values = [1, Number.NaN, 4, 5, Number.NaN];
    expect([...derivative(values, axis(range(5)), 3).out].every(Number.isNaN)).toBe(true);
  });

  test("differencing is linear and never draws a value from a gap", () => {
    const cell = fc.option(fc.double({ min: -10, max: 10, noNaN: true }), { nil: Number.NaN });
    fc.assert(
      fc.property(
        fc.array(cell, { minLength: 5, maxLength: 24 }),
        fc.double({ min: -3, max: 3, noNaN: true }),
        fc.constantFrom(...stencilPoints),
        (values, factor, points) => {
          const on = axis(range(values.length, 0.5));
          const once = derivative(values, on, points).out;
          const scaled = derivative(
            values.map((value) => factor * value + 7),
            on,
            points,
          ).out;
          expectAllClose(
            scaled,
            once.map((value) => factor * value),
            { absolute: 1e-10, because: "rounding" },
          );
          values.forEach((value, i) => {
            if (Number.isNaN(value)) expect(once[i]).toBeNaN();
          });
        },
      ),
    );
  });
});
