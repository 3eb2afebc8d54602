import type { Quantity } from "../ocean/quantities/define";

/** Share of cells whose magnitude lies within the colour limits; the rest take the end colours. */
const shareWithin = 0.98;

/**
 * Magnitudes below which a field is nothing but the rounding of float64 heights: millions of times under what any map
 * resolves, by unit. Common practice, no source.
 */
const leastByUnit: Readonly<Record<string, number>> = {
  m: 1e-9,
  "m s-1": 1e-9,
  "s-1": 1e-14,
  "1": 1e-10,
  "m2 s-2": 1e-18,
  "s-2": 1e-28,
  "m-1": 1e-18,
};

/**
 * Colour limits for planes of one field: for signed fields symmetric about zero, else from zero up; the 98th percentile of
 * magnitude rounded up to a short number, so that limits move in steps. Signed fields that keep one sign (a height with its
 * mean) are spread between the 1st and 99th percentile instead. [-1, 1] or [0, 1] where nothing is valid, or
 * nothing but rounding is left, so that a still sea is not painted in full colour.
 */
export function colourLimits(
  planes: readonly Float64Array[],
  { signed, units }: Pick<Quantity, "signed" | "units">,
): readonly [number, number] {
  const values = Float64Array.from(planes.flatMap((plane) => Array.from(plane).filter(Number.isFinite))).sort();
  const most = Math.max(-(values[0] ?? 0), values[values.length - 1] ?? 0);
  if (most <= (leastByUnit[units] ?? 0)) return signed ? [-1, 1] : [0, 1];
  const low = values[Math.floor((values.length - 1) * 0.01)];
  const high = values[Math.ceil((values.length - 1) * 0.99)];
  if (signed && (low > 0 || high < 0)) return spread(low, high);
  const magnitudes = values.map(Math.abs).sort();
  const limit = roundedUp(magnitudes[Math.ceil((magnitudes.length - 1) * shareWithin)]);
  return signed ? [-limit, limit] : [0, limit];
}

function spread(low: number, high: number): readonly [number, number] {
  const step = roundedUp((high - low) / 10 || Math.abs(high) / 10);
  return [Math.floor(low / step) * step, Math.ceil(high / step) * step];
}

/** The next of 1, 1.5, 2, 3, 4, 5, 6, 8 times a power of ten. */
export function roundedUp(value: number): number {
  if (!(value > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(value));
  const step = [1, 1.5, 2, 3, 4, 5, 6, 8, 10].find((candidate) => candidate * power >= value * (1 - 1e-12)) ?? 10;
  return step * power;
}
