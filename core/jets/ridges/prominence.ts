/** A local maximum of a profile, its prominence and where it has fallen by half of that on either side. */
export interface Peak {
  /** Index of the maximum; the middle (rounded down) of a flat top. */
  readonly index: number;
  /** Height above the higher of the two lowest points that separate it from higher ground or an end. */
  readonly prominence: number;
  /** Fractional indices, linearly interpolated, where the profile crosses height minus half the prominence. */
  readonly left: number;
  readonly right: number;
}

/**
 * Local maxima of a profile with their topographic prominence, in order of index. The first and last sample and samples
 * beside a NaN are never maxima; a NaN ends the profile on that side, so that no peak is measured across a gap.
 */
export function prominentPeaks(values: Float64Array, leastProminence: number): Peak[] {
  const peaks: Peak[] = [];
  for (let i = 1; i < values.length - 1; i++) {
    if (!(values[i - 1] < values[i])) continue;
    let ahead = i + 1;
    while (ahead < values.length && values[ahead] === values[i]) ahead++;
    if (ahead < values.length && values[ahead] < values[i]) {
      const peak = measure(values, (i + ahead - 1) >> 1);
      if (peak.prominence >= leastProminence) peaks.push(peak);
    }
    i = ahead - 1;
  }
  return peaks;
}

function measure(values: Float64Array, index: number): Peak {
  const left = lowestBeside(values, index, -1);
  const right = lowestBeside(values, index, 1);
  const prominence = values[index] - Math.max(values[left], values[right]);
  const height = values[index] - prominence / 2;
  return {
    index,
    prominence,
    left: crossing(values, index, left, height, -1),
    right: crossing(values, index, right, height, 1),
  };
}

/** Index of the lowest value met before higher ground, a NaN or the end. */
function lowestBeside(values: Float64Array, index: number, side: 1 | -1): number {
  let lowest = index;
  for (let i = index; i >= 0 && i < values.length && values[i] <= values[index]; i += side) {
    if (values[i] < values[lowest]) lowest = i;
  }
  return lowest;
}

function crossing(values: Float64Array, index: number, base: number, height: number, side: 1 | -1): number {
  let i = index;
  while (i !== base && values[i] > height) i += side;
  if (!(values[i] < height)) return i;
  return i - (side * (height - values[i])) / (values[i - side] - values[i]);
}
