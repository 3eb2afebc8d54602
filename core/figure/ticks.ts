import { decimalsForStep, formatLatitude, formatLongitude, formatNumber } from "./format";

/** Where a mark stands on a scale, in data units, and what it says; an empty label is a mark alone. */
export interface Tick {
  readonly value: number;
  readonly label: string;
}

const decimalSteps = [1, 2, 5] as const;
const degreeSteps = [0.01, 0.02, 0.05, 0.1, 0.2, 0.25, 0.5, 1, 2, 5, 10, 15, 20, 30, 45, 60, 90, 180] as const;

/** The smallest of 1, 2 or 5 × 10ⁿ that cuts `span` into at most `most` pieces. Common practice, no source. */
export function niceStep(span: number, most: number): number {
  const least = Math.abs(span) / Math.max(1, most);
  if (!(least > 0) || !Number.isFinite(least)) return 1;
  const decade = 10 ** Math.floor(Math.log10(least));
  for (const step of decimalSteps) if (step * decade >= least * (1 - 1e-9)) return step * decade;
  return 10 * decade;
}

/** Multiples of `step` within [from, to], either order, ends included within a billionth of a step. */
export function multiplesWithin(from: number, to: number, step: number): number[] {
  const lower = Math.min(from, to);
  const upper = Math.max(from, to);
  const first = Math.ceil(lower / step - 1e-9);
  const last = Math.floor(upper / step + 1e-9);
  const values: number[] = [];
  for (let index = first; index <= last; index++) values.push(index === 0 ? 0 : index * step);
  return values;
}

/** Ticks of a linear scale at nice steps, labelled with the decimals that the step needs. */
export function linearTicks(from: number, to: number, most: number): Tick[] {
  const step = niceStep(to - from, most);
  const digits = decimalsForStep(step);
  return multiplesWithin(from, to, step).map((value) => ({ value, label: formatNumber(value, digits) }));
}

/**
 * The shortest lists that still tell a scale which holds zero, the most telling first: a round value on both sides of zero,
 * zero and a round value, then a round value alone; the values from the widest down over two decades.
 */
export function fewestTicks(from: number, to: number): Tick[][] {
  if (!(to > 0) || !(from <= 0)) return [];
  const decade = 10 ** Math.floor(Math.log10(to));
  const round = [10, 1, 0.1].flatMap((tenth) => [5, 2, 1].map((step) => step * tenth * decade));
  const values = round.filter((value) => value <= to * (1 + 1e-9));
  const listOf = (value: number, ...others: readonly number[]): Tick[] => {
    const digits = decimalsForStep(value);
    return [...others, value].map((each) => ({ value: each, label: each === 0 ? "0" : formatNumber(each, digits) }));
  };
  return [
    ...values.filter((value) => -value >= from * (1 + 1e-9)).map((value) => listOf(value, -value)),
    ...values.map((value) => listOf(value, 0)),
    ...values.map((value) => listOf(value)),
  ];
}

function degreeStep(span: number, most: number): number {
  const least = Math.abs(span) / Math.max(1, most);
  return degreeSteps.find((step) => step >= least * (1 - 1e-9)) ?? 180;
}

export function longitudeTicks(west: number, east: number, most: number): Tick[] {
  const step = degreeStep(east - west, most);
  const digits = decimalsForStep(step);
  return multiplesWithin(west, east, step).map((value) => ({ value, label: formatLongitude(value, digits) }));
}

export function latitudeTicks(south: number, north: number, most: number): Tick[] {
  const step = degreeStep(north - south, most);
  const digits = decimalsForStep(step);
  return multiplesWithin(south, north, step).map((value) => ({ value, label: formatLatitude(value, digits) }));
}

/** Most ticks first by rank: round periods a reader knows (week, month, half year, year) before the rest. */
const periodRanks: readonly (readonly number[])[] = [
  [10, 30, 90, 365, 3650],
  [2, 5, 180, 730, 1825, 7300, 36500],
  [1, 20, 60, 120, 545, 1095],
];

/**
 * Ticks of a logarithmic scale of periods in days, labelled "90 d". A less round one is left out where it would come nearer
 * than `leastGap` (in natural logarithms) to one already placed.
 */
export function periodTicks(longest: number, shortest: number, leastGap: number): Tick[] {
  const placed: number[] = [];
  for (const rank of periodRanks) {
    for (const period of rank) {
      if (period > longest * (1 + 1e-9) || period < shortest * (1 - 1e-9)) continue;
      if (placed.every((other) => Math.abs(Math.log(other / period)) >= leastGap)) placed.push(period);
    }
  }
  return placed.sort((a, b) => b - a).map((value) => ({ value, label: `${value} d` }));
}
