import { firstDerivativeWeights, type StencilPoints } from "./stencils";

/** Ready-made weights for differences along one axis, for its actual coordinates. */
export interface DifferencePlan {
  readonly count: number;
  readonly periodic: boolean;
  readonly halfWidth: number;
  /** `centred[m]`: for each index the 2m + 1 weights of the centred stencil (NaN where it leaves an axis that is not periodic). */
  readonly centred: readonly Float64Array[];
  /** Three weights an index for points i, i+1, i+2. */
  readonly forward: Float64Array;
  /** Three weights an index for points i, i-1, i-2. */
  readonly backward: Float64Array;
}

/** `turn` is the period of a periodic axis in the coordinates' unit. */
export interface DifferenceAxis {
  readonly coordinates: Float64Array;
  readonly even: boolean;
  readonly periodic: boolean;
  readonly turn: number;
}

/**
 * Plans first derivatives along an axis. Evenly spaced axes use the mean step, so that rounding in stored coordinates does
 * not enter the weights; uneven ones get weights for the coordinates as they are (order of accuracy kept).
 */
export function planDifferences(axis: DifferenceAxis, points: StencilPoints): DifferencePlan {
  const { coordinates, periodic } = axis;
  const count = coordinates.length;
  const halfWidth = (points - 1) / 2;
  const place = coordinateAt(axis);
  const centred: Float64Array[] = [new Float64Array(0)];
  for (let m = 1; m <= halfWidth; m++) {
    const width = 2 * m + 1;
    const weights = new Float64Array(count * width).fill(Number.NaN);
    for (let i = 0; i < count; i++) {
      const fits = periodic ? width <= count : i >= m && i + m < count;
      if (fits) weights.set(weightsFor(place, i, -m, m), i * width);
    }
    centred.push(weights);
  }
  const forward = new Float64Array(count * 3).fill(Number.NaN);
  const backward = new Float64Array(count * 3).fill(Number.NaN);
  for (let i = 0; i < count; i++) {
    if (count < 3) break;
    if (periodic || i + 2 < count) forward.set(weightsFor(place, i, 0, 2), i * 3);
    if (periodic || i >= 2) backward.set(weightsFor(place, i, -2, 0).reverse(), i * 3);
  }
  return { count, periodic, halfWidth, centred, forward, backward };
}

function coordinateAt(axis: DifferenceAxis): (index: number) => number {
  const { coordinates, even, periodic, turn } = axis;
  const count = coordinates.length;
  if (even) {
    const ascending = coordinates[count - 1] >= coordinates[0] ? 1 : -1;
    const step = periodic ? (ascending * turn) / count : (coordinates[count - 1] - coordinates[0]) / (count - 1);
    return (index) => index * step;
  }
  const direction = coordinates[count - 1] >= coordinates[0] ? turn : -turn;
  return (index) => {
    const lap = Math.floor(index / count);
    return coordinates[index - lap * count] + lap * direction;
  };
}

function weightsFor(place: (index: number) => number, i: number, from: number, to: number): Float64Array {
  const origin = place(i);
  const nodes = Float64Array.from({ length: to - from + 1 }, (_, k) => place(i + from + k) - origin);
  return firstDerivativeWeights(nodes, 0);
}

/** Where a line of values lies in a larger array. */
export interface Line {
  readonly offset: number;
  readonly stride: number;
}

/**
 * First derivative along one line, written to `out` at the same places. Unit: values' unit over the coordinates' unit.
 *
 * At each valid cell the widest centred stencil up to the planned one whose points are all valid is used; where not even
 * three points fit, a second-order one-sided difference (forward tried first); else NaN. A NaN cell stays NaN. `widths`, if
 * given, receives the points used: 3 to 9 centred, -3 one-sided, 0 none. Ref: Fornberg 1988; narrowing is common practice,
 * no source.
 */
export function differentiateLine(
  values: Float64Array,
  line: Line,
  plan: DifferencePlan,
  out: Float64Array,
  widths?: Int8Array,
): void {
  const { count, periodic, halfWidth } = plan;
  const { offset, stride } = line;
  for (let i = 0; i < count; i++) {
    const here = offset + i * stride;
    const centre = values[here];
    let result = Number.NaN;
    let used = 0;
    if (!Number.isNaN(centre)) {
      const reach = periodic ? Math.min(halfWidth, (count - 1) >> 1) : Math.min(halfWidth, i, count - 1 - i);
      const m = validReach(values, line, i, reach, count);
      if (m > 0) {
        result = applyCentred(values, line, i, m, plan.centred[m], count);
        used = 2 * m + 1;
      } else if (count >= 3) {
        result = applyOneSided(values, line, i, 1, plan, centre);
        if (Number.isNaN(result)) result = applyOneSided(values, line, i, -1, plan, centre);
        used = !Number.isNaN(result) ? -3 : 0;
      }
    }
    out[here] = result;
    if (widths) widths[here] = used;
  }
}

/** Largest m up to `reach` with all of i-m … i+m valid. */
function validReach(values: Float64Array, line: Line, i: number, reach: number, count: number): number {
  for (let m = 1; m <= reach; m++) {
    const left = values[line.offset + wrap(i - m, count) * line.stride];
    const right = values[line.offset + wrap(i + m, count) * line.stride];
    if (Number.isNaN(left) || Number.isNaN(right)) return m - 1;
  }
  return reach;
}

function applyCentred(
  values: Float64Array,
  line: Line,
  i: number,
  m: number,
  weights: Float64Array,
  count: number,
): number {
  const base = i * (2 * m + 1) + m;
  let sum = weights[base] === 0 ? 0 : weights[base] * values[line.offset + i * line.stride];
  for (let j = 1; j <= m; j++) {
    sum += weights[base + j] * values[line.offset + wrap(i + j, count) * line.stride];
    sum += weights[base - j] * values[line.offset + wrap(i - j, count) * line.stride];
  }
  return sum;
}

function applyOneSided(
  values: Float64Array,
  line: Line,
  i: number,
  side: 1 | -1,
  plan: DifferencePlan,
  centre: number,
): number {
  const weights = side === 1 ? plan.forward : plan.backward;
  if (Number.isNaN(weights[i * 3])) return Number.NaN;
  const near = values[line.offset + wrap(i + side, plan.count) * line.stride];
  const far = values[line.offset + wrap(i + 2 * side, plan.count) * line.stride];
  return weights[i * 3] * centre + weights[i * 3 + 1] * near + weights[i * 3 + 2] * far;
}

function wrap(index: number, count: number): number {
  return index < 0 ? index + count : index >= count ? index - count : index;
}
