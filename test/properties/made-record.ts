import type { BackgroundBasis } from "../../core/numeric/background";
import { backgroundBasis } from "../../core/numeric/background";
import { gridGeometry } from "../../core/ocean/grid-geometry";
import { backgroundPlanes } from "../../core/study/background-planes";
import type { Background } from "../../core/study/band-plane";
import { type HeightRecord, surveyValidity } from "../../core/study/record";
import { evenAxes, sphere } from "../core/ocean/grids";

export const [rows, columns, dates] = [9, 11, 90] as const;
export const cells = rows * columns;
export const axes = evenAxes({ west: -150, south: 25, step: 0.5, columns, rows });
export const geometry = gridGeometry(axes, sphere, "test");
export const days = Float64Array.from({ length: dates }, (_, t) => 22000 + 3 * t);
export const time = { kind: "time", values: days, step: 3, even: true, periodic: false, calendar: "standard" } as const;

/** A small record of heights `height[t * cells + cell]` in metres; NaN where missing. */
export function recordOf(values: Float64Array): HeightRecord {
  const cube = { dates, rows, columns, values };
  return { cube, axes, time, ...surveyValidity(cube) };
}

/** Mean, trend and annual cycle fitted to every cell. */
export function backgroundOf(record: HeightRecord): Background {
  const terms = { mean: true, trend: true, annual: true, semiannual: false };
  const basis: BackgroundBasis = backgroundBasis(days, terms, 365.2425);
  const coefficients = new Float64Array(basis.names.length * cells);
  backgroundPlanes(record, basis, [0, rows], coefficients, () => {});
  return { basis, coefficients };
}

/** Wandering heights of about a decimetre; `seed` makes others. */
export function wandering(seed: number): Float64Array {
  return Float64Array.from({ length: dates * cells }, (_, i) => {
    const [t, cell] = [Math.floor(i / cells), i % cells];
    const phase = seed * 1.7 + (cell % columns) / 2 - Math.floor(cell / columns) / 3;
    return (
      0.4 +
      0.1 * Math.sin(t / (3 + (seed % 4)) + phase) +
      0.05 * Math.cos(t / 11 - phase) +
      1e-3 * ((i * (37 + seed)) % 29)
    );
  });
}
