/** Scattered values on a plane whose axes have been scaled to be alike; points with NaN are left out beforehand. */
export interface ScaledPoints {
  readonly position: Float64Array;
  readonly time: Float64Array;
  readonly value: Float64Array;
  /** Mean spacing of the picture's rows and columns, scaled alike. */
  readonly positionStep: number;
  readonly timeStep: number;
}

/**
 * Variance of the means over parallel lines, as a share of the variance of all points, corrected for chance: 1 where every
 * line is constant, 0 on average for values that have nothing to do with each other, whatever the angle.
 *
 * Lines run along (cos angle, sin angle) in (time, position). Points are shared linearly between the two nearest of lines
 * spaced by a cell's extent across them, sums are divided by the weight that fell on the line (so gaps and short lines do
 * no harm), and the variance is weighted by it. The correction takes off the share that independent values would show by
 * the unequal weights alone. Values must have their mean removed. Ref: Radon 1917 for the transform.
 */
export function lineVarianceShare(points: ScaledPoints, angle: number): number {
  const { position, time, value, positionStep, timeStep } = points;
  const count = value.length;
  const cosine = Math.cos(angle);
  const sine = Math.sin(angle);
  const spacing = positionStep * Math.abs(cosine) + timeStep * Math.abs(sine);
  const across = new Float64Array(count);
  let lowest = Number.POSITIVE_INFINITY;
  let highest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < count; i++) {
    across[i] = (position[i] * cosine - time[i] * sine) / spacing;
    if (across[i] < lowest) lowest = across[i];
    if (across[i] > highest) highest = across[i];
  }
  const lines = Math.floor(highest - lowest) + 2;
  const sum = new Float64Array(lines);
  const weight = new Float64Array(lines);
  const weightSquares = new Float64Array(lines);
  let all = 0;
  for (let i = 0; i < count; i++) {
    const at = across[i] - lowest;
    const line = Math.floor(at);
    const upper = at - line;
    const lower = 1 - upper;
    sum[line] += lower * value[i];
    weight[line] += lower;
    weightSquares[line] += lower * lower;
    sum[line + 1] += upper * value[i];
    weight[line + 1] += upper;
    weightSquares[line + 1] += upper * upper;
    all += value[i] * value[i];
  }
  let between = 0;
  let chance = 0;
  for (let line = 0; line < lines; line++) {
    if (!(weight[line] > 0)) continue;
    between += (sum[line] * sum[line]) / weight[line];
    chance += weightSquares[line] / weight[line];
  }
  const chanceShare = chance / count;
  return (between / all - chanceShare) / (1 - chanceShare);
}
