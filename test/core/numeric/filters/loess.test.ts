import { describe, expect, test } from "vitest";
import { crossingPeriods } from "../../../../core/numeric/filters/crossing-periods";
import { cubicWeights } from "../../../../core/numeric/filters/lattice-weights";
import { surfaceFit } from "../../../../core/numeric/filters/loess-fit";
import { loessLine } from "../../../../core/numeric/filters/loess-line";
import { loessSurface, removeLargeScale } from "../../../../core/numeric/filters/loess-surface";
import type { PlaneGeometry } from "../../../../core/numeric/filters/spatial";
import { expectAllClose, expectClose } from "../../../expect-close";
import { referenceJson, withNaN } from "../../../reference-json";

interface Reference {
  readonly loess: {
    readonly name: string;
    readonly position: number[];
    readonly input: (number | null)[];
    readonly halfSpan: number;
    readonly output: (number | null)[];
  }[];
  readonly loessSurface: {
    readonly rows: number;
    readonly columns: number;
    readonly northStepKilometres: number;
    readonly eastSpacingKilometres: number[];
    readonly eastSpanKilometres: number;
    readonly northSpanKilometres: number;
    readonly input: (number | null)[];
    readonly cases: { readonly periodic: boolean; readonly output: number[] }[];
    readonly halfAmplitudeInSpans: number;
    readonly halfPowerInSpans: number;
  };
}

const reference = referenceJson<Reference>("filters");

describe("loess along a line", () => {
  test.each(reference.loess.map((each) => [each.name, each] as const))("agrees with numpy: %s", (_, each) => {
    const out = loessLine(Float64Array.from(each.position), withNaN(each.input), each.halfSpan);
    expectAllClose(out, each.output, { relative: 1e-10, because: "normal equations against an orthogonal solve" });
  });

  test("half the amplitude is left at 1.16 half-spans, half the power at 1.40", () => {
    const positions = Float64Array.from({ length: 801 }, (_, i) => (i - 400) / 300);
    const gain = (f: number) =>
      loessLine(
        positions,
        positions.map((x) => Math.cos(2 * Math.PI * f * x)),
        1,
        Float64Array.of(0),
      )[0];
    const found = [0.5, Math.SQRT1_2].map((level) => crossingPeriods(gain, level, 0.9, 3));
    expect(found.map((each) => each.length)).toEqual([1, 1]);
    expectAllClose(found.flat(), [1.16, 1.4], { absolute: 0.005, because: "published to two decimals" });
  });

  test("a parabola is kept exactly, ends, gaps and places between samples included", () => {
    const positions = Float64Array.from({ length: 60 }, (_, i) => 3 * i + Math.sin(i));
    const parabola = (x: number) => 1 - 0.02 * x + 3e-4 * x * x;
    const values = positions.map(parabola).fill(Number.NaN, 20, 26);
    const at = Float64Array.of(0, 17.3, 66, 100, 170, 5);
    const close = { absolute: 1e-11, because: "normal equations with a condition number of about a thousand" };
    expectAllClose(loessLine(positions, values, 30, at), at.map(parabola), close);
  });

  test("fewer than three points give nothing", () => {
    const out = loessLine(Float64Array.of(0, 1, 2, 50), Float64Array.of(1, 2, 1, 4), 3);
    expect([...out].map(Number.isNaN)).toEqual([false, false, false, true]);
  });
});

const km = 1000;

function flat(rows: number, columns: number, cell: number, periodic = false): PlaneGeometry {
  return {
    rows,
    columns,
    northMetres: Float64Array.from({ length: rows }, (_, row) => row * cell),
    eastSpacingMetres: new Float64Array(rows).fill(cell),
    periodic,
  };
}

describe("loess over a plane", () => {
  const surface = reference.loessSurface;
  test.each(surface.cases.map((each) => [each.periodic ? "periodic" : "open", each] as const))(
    "agrees with numpy on a sphere with gaps, %s",
    (_, { periodic, output }) => {
      const geometry: PlaneGeometry = {
        rows: surface.rows,
        columns: surface.columns,
        northMetres: Float64Array.from({ length: surface.rows }, (_, row) => row * surface.northStepKilometres * km),
        eastSpacingMetres: Float64Array.from(surface.eastSpacingKilometres, (each) => each * km),
        periodic,
      };
      const plane = withNaN(surface.input);
      const spans = { eastKilometres: surface.eastSpanKilometres, northKilometres: surface.northSpanKilometres };
      const { values, stride, interpolationError } = loessSurface(plane, geometry, spans);
      expect([stride, interpolationError]).toEqual([{ rows: 1, columns: 1 }, 0]);
      const wanted = output.map((value, cell) => (Number.isNaN(plane[cell]) ? null : value));
      expectAllClose(values, wanted, { relative: 1e-9, because: "normal equations against an orthogonal solve" });
    },
  );

  test("what is left of a wave along one axis halves where numpy's fine disk says", () => {
    const [rows, columns] = [61, 61];
    const geometry = flat(rows, columns, 10 * km);
    // The asked cell is the centre, 30 cells from each edge: half-spans of 300 km end there.
    const gain = (f: number) => {
      const plane = Float64Array.from({ length: rows * columns }, (_, i) =>
        Math.cos(2 * Math.PI * f * ((i % columns) - 30) * 10),
      );
      return surfaceAt(plane, geometry, 300, 30, 30);
    };
    const closest = { relative: 0.002, because: "30 cells a half-span against 80" };
    const found = [0.5, Math.SQRT1_2].map((level) => bisect((period) => gain(1 / period) - level, 250, 600) / 300);
    expectClose(found[0], surface.halfAmplitudeInSpans, closest);
    expectClose(found[1], surface.halfPowerInSpans, closest);
  });

  test("a quadratic surface is taken off whole, gaps and interpolation included", () => {
    const geometry = flat(40, 60, 25 * km);
    const plane = Float64Array.from({ length: 2400 }, (_, i) => {
      const [row, column] = [Math.floor(i / 60), i % 60];
      return 0.3 + 0.01 * row - 0.02 * column + 3e-4 * row * column - 2e-4 * row * row + 1e-4 * column * column;
    });
    for (let row = 5; row < 25; row++) plane.fill(Number.NaN, row * 60 + 8, row * 60 + 20);
    const smooth = loessSurface(plane, geometry, { eastKilometres: 500, northKilometres: 400 });
    expect(smooth.stride).toEqual({ rows: 2, columns: 2 });
    const left = removeLargeScale(plane, smooth);
    const wanted = plane.map((value) => (Number.isNaN(value) ? value : 0));
    expectAllClose(left, wanted, { absolute: 1e-9, because: "normal equations of six terms, values up to one" });
    expect(smooth.interpolationError).toBeLessThan(1e-9);
  });

  test("the stated interpolation error holds: every cell lies within twice of the direct fit's, and under 1 % of the signal", () => {
    const geometry = flat(48, 80, 25 * km, true);
    const plane = Float64Array.from({ length: 48 * 80 }, (_, i) => {
      const [row, column] = [Math.floor(i / 80), i % 80];
      return Math.sin((2 * Math.PI * column) / 40) * Math.cos(row / 6) + ((i * 7919) % 1009) / 5045;
    });
    plane.fill(Number.NaN, 1500, 1540).fill(Number.NaN, 1590, 1620);
    const smooth = loessSurface(plane, geometry, { eastKilometres: 800, northKilometres: 800 });
    expect(smooth.stride).toEqual({ rows: 4, columns: 4 });
    let worst = 0;
    for (let cell = 0; cell < plane.length; cell += 13) {
      if (Number.isNaN(plane[cell])) continue;
      const direct = surfaceAt(plane, geometry, 800, Math.floor(cell / 80), cell % 80);
      worst = Math.max(worst, Math.abs(direct - smooth.values[cell]));
    }
    expect(smooth.interpolationError).toBeGreaterThan(0);
    expect(worst).toBeLessThan(2 * smooth.interpolationError);
    expect(worst).toBeLessThan(0.01);
  });

  test("a cell with unknown lattice nodes beside it is fitted directly", () => {
    const geometry = flat(41, 41, 25 * km);
    const plane = new Float64Array(41 * 41).fill(Number.NaN);
    const lonely = 20 * 41 + 11;
    plane[lonely] = 0.4;
    for (let row = 15; row < 26; row++)
      for (let column = 24; column < 28; column++) plane[row * 41 + column] = row * column * 1e-3;
    // Sixteen cells a half-span: the westernmost of the lonely cell's four nodes, three cells off, sees none of the block.
    const { values, stride } = loessSurface(plane, geometry, { eastKilometres: 400, northKilometres: 400 });
    expect(stride).toEqual({ rows: 2, columns: 2 });
    const spans = { eastKilometres: 400, northKilometres: 400 };
    expect(surfaceFit(plane, geometry, spans, 20)(8)).toBeNaN();
    const direct = surfaceAt(plane, geometry, 400, 20, 11);
    expect(direct).not.toBeNaN();
    expect(values[lonely]).toBe(direct);
  });

  test("values are given only where there are data, none where too few cells weigh", () => {
    const geometry = flat(20, 20, 25 * km);
    const lone = new Float64Array(400).fill(Number.NaN);
    for (const cell of [0, 1, 2, 20, 21, 22, 40]) lone[cell] = 1;
    const { values } = loessSurface(lone, geometry, { eastKilometres: 100, northKilometres: 100 });
    expect(values.every(Number.isNaN)).toBe(true);
  });
});

describe("lattice weights", () => {
  test.each([null, 20])("keep cubics (turn %s), nodes included", (turn) => {
    const nodes = [0, 4, 8, 12, 16, 19].slice(0, turn === null ? 6 : 5);
    const cubic = (x: number) => 1 + x - 0.2 * x * x + 0.03 * x ** 3;
    for (let at = 4; at < 12; at++) {
      const { nodes: used, weights } = cubicWeights(nodes, at, turn);
      const value = weights.reduce((sum, weight, i) => sum + weight * cubic(nodes[used[i]]), 0);
      expectClose(value, cubic(at), { absolute: 1e-11, because: "four products of values up to 60" });
    }
  });

  test("go round a turn", () => {
    const { nodes, weights } = cubicWeights([0, 5, 10, 15], 18, 20);
    expect(nodes).toEqual([2, 3, 0, 1]);
    expectClose(
      weights.reduce((a, b) => a + b, 0),
      1,
      { absolute: 1e-15, because: "rounding" },
    );
  });
});

/** The value fitted at one cell, with no lattice between. */
function surfaceAt(
  plane: Float64Array,
  geometry: PlaneGeometry,
  spanKilometres: number,
  row: number,
  column: number,
): number {
  return surfaceFit(plane, geometry, { eastKilometres: spanKilometres, northKilometres: spanKilometres }, row)(column);
}

function bisect(off: (at: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  const below = off(low) < 0;
  for (let step = 0; step < 40; step++) {
    const middle = (low + high) / 2;
    if (off(middle) < 0 === below) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
