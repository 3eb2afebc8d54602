import { planeOf } from "../model/cube";
import type { BackgroundBasis } from "../numeric/background";
import type { HeightRecord } from "./record";
import type { TimeFilter } from "./time-filter";

export interface Background {
  readonly basis: BackgroundBasis;
  /** `coefficients[term * cells + cell]`. */
  readonly coefficients: Float64Array;
}

/**
 * Height in the band on one date, in metres: one weighted sum of height planes less the background. Equals filtering every
 * cell's own series after its background is off, gaps included: cells that miss dates which others have are filtered by
 * themselves. NaN where a cell has no height on the date or too little data around it. `filter` null: only the background is
 * taken off.
 */
export function bandHeightPlane(
  record: HeightRecord,
  date: number,
  filter: TimeFilter | null,
  background: Background,
): Float64Array {
  if (!filter) return anomalyPlane(record, date, background);
  const plane = weightedSum(record, filter.row(record.hasData, date), background);
  const { values } = record.cube;
  record.irregular.forEach((cell) => {
    // A filter bridges a short gap; what it finds there is no measurement and is not shown as one.
    const isKnown = !Number.isNaN(values[date * plane.length + cell]);
    plane[cell] = isKnown ? filter.apply(anomalySeries(record, cell, background), Int32Array.of(date))[0] : Number.NaN;
  });
  return plane;
}

/** One date's plane less its background. */
export function anomalyPlane({ cube }: HeightRecord, date: number, { basis, coefficients }: Background): Float64Array {
  const plane = planeOf(cube, date);
  for (let term = 0; term < basis.names.length; term++) {
    const weight = basis.values[term * basis.samples + date];
    for (let cell = 0; cell < plane.length; cell++) plane[cell] -= weight * coefficients[term * plane.length + cell];
  }
  return plane;
}

/** Sum of planes with the row's weights, less the same sum of the background; NaN for land, and everywhere for no row. */
function weightedSum(
  { cube, ocean }: HeightRecord,
  row: Float64Array | null,
  { basis, coefficients }: Background,
): Float64Array {
  const cells = cube.rows * cube.columns;
  if (!row) return new Float64Array(cells).fill(Number.NaN);
  const sum = new Float64Array(cells);
  const termWeight = new Float64Array(basis.names.length);
  for (let date = 0; date < cube.dates; date++) {
    const weight = row[date];
    if (weight === 0) continue;
    for (let term = 0; term < termWeight.length; term++) {
      termWeight[term] += weight * basis.values[term * basis.samples + date];
    }
    const start = date * cells;
    for (let cell = 0; cell < cells; cell++) sum[cell] += weight * cube.values[start + cell];
  }
  for (let cell = 0; cell < cells; cell++) {
    for (let term = 0; term < termWeight.length; term++) {
      sum[cell] -= termWeight[term] * coefficients[term * cells + cell];
    }
    if (!ocean[cell]) sum[cell] = Number.NaN;
  }
  return sum;
}

/** One cell's series less its background. */
function anomalySeries({ cube }: HeightRecord, cell: number, { basis, coefficients }: Background): Float64Array {
  const cells = cube.rows * cube.columns;
  return Float64Array.from({ length: cube.dates }, (_, date) => {
    let value = cube.values[date * cells + cell];
    for (let term = 0; term < basis.names.length; term++) {
      value -= coefficients[term * cells + cell] * basis.values[term * basis.samples + date];
    }
    return value;
  });
}
