import { planeOf } from "../model/cube";
import type { BackgroundBasis } from "../numeric/background";
import { type BandFilter, leastWeightShare } from "../numeric/band-filter";
import type { HeightRecord } from "./record";

export interface Background {
  readonly basis: BackgroundBasis;
  /** `coefficients[term * cells + cell]`. */
  readonly coefficients: Float64Array;
}

/**
 * Height in the band on one date, in metres: one weighted sum of height planes less the background, cell by cell. Equals
 * filtering every cell's own series (filterSeries after removeBackground) to rounding, gaps included: each low-pass is a
 * weighted mean over the cell's valid dates. NaN where a cell has too little data. `filter` null: only the background is
 * taken off.
 */
export function bandHeightPlane(
  record: HeightRecord,
  date: number,
  filter: BandFilter | null,
  background: Background,
): Float64Array {
  if (!filter) return anomalyPlane(record, date, background);
  const fast = filter.fast
    ? lowPassPlane(record, date, filter.fast, filter.halfWidth, background)
    : anomalyPlane(record, date, background);
  if (!filter.slow) return fast;
  const slow = lowPassPlane(record, date, filter.slow, filter.halfWidth, background);
  return fast.map((value, cell) => value - slow[cell]);
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

function lowPassPlane(
  record: HeightRecord,
  date: number,
  weights: Float64Array,
  halfWidth: number,
  { basis, coefficients }: Background,
): Float64Array {
  const { cube, hasData, complete } = record;
  const { values } = cube;
  const cells = cube.rows * cube.columns;
  const terms = basis.names.length;
  const sum = new Float64Array(cells);
  const termWeight = new Float64Array(terms);
  const missed = new MissedWeight(record, basis);
  let total = 0;
  const from = Math.max(0, date - halfWidth);
  const to = Math.min(cube.dates - 1, date + halfWidth);
  for (let s = from; s <= to; s++) {
    if (!hasData[s]) continue;
    const weight = weights[s - date + halfWidth];
    total += weight;
    for (let term = 0; term < terms; term++) termWeight[term] += weight * basis.values[term * basis.samples + s];
    const start = s * cells;
    if (complete[s]) {
      for (let cell = 0; cell < cells; cell++) sum[cell] += weight * values[start + cell];
    } else {
      for (let cell = 0; cell < cells; cell++) {
        const value = values[start + cell];
        if (Number.isNaN(value)) missed.add(cell, s, weight);
        else sum[cell] += weight * value;
      }
    }
  }
  for (let cell = 0; cell < cells; cell++) {
    const gone = missed.at(cell);
    const share = total - (gone ? gone[terms] : 0);
    let expected = 0;
    for (let term = 0; term < terms; term++) {
      expected += (termWeight[term] - (gone ? gone[term] : 0)) * coefficients[term * cells + cell];
    }
    const known = record.ocean[cell] && share >= leastWeightShare;
    sum[cell] = known ? (sum[cell] - expected) / share : Number.NaN;
  }
  return sum;
}

/** Weights, and basis sums, that single cells miss on dates where others are there. */
class MissedWeight {
  readonly #cells = new Map<number, Float64Array>();

  constructor(
    private readonly record: HeightRecord,
    private readonly basis: BackgroundBasis,
  ) {}

  add(cell: number, date: number, weight: number): void {
    if (!this.record.ocean[cell]) return;
    const terms = this.basis.names.length;
    let own = this.#cells.get(cell);
    if (!own) {
      own = new Float64Array(terms + 1);
      this.#cells.set(cell, own);
    }
    own[terms] += weight;
    for (let term = 0; term < terms; term++) own[term] += weight * this.basis.values[term * this.basis.samples + date];
  }

  at(cell: number): Float64Array | undefined {
    return this.#cells.get(cell);
  }
}
