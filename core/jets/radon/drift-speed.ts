import { meanAndDeviation } from "../../numeric/serial-correlation";
import { percentileInterval } from "../../numeric/statistics/block-bootstrap";
import { lineVarianceShare, type ScaledPoints } from "./line-means";
import { type MovingPicture, naturalScales } from "./natural-scales";
import { resampledAngles } from "./segments";

export interface DriftSettings {
  /**
   * "mean": one mean off all values, so that a standing pattern counts and has speed zero; "row means": each position's mean
   * in time off, so that what stands still is gone and only what moves (or noise) is left to tell.
   */
  readonly remove: "mean" | "row means";
  /** Degrees between the angles tried, on axes scaled by the picture's own scales; null: from the record's length. */
  readonly angleStepDegrees: number | null;
  /** Bootstrap resamples over segments of time. */
  readonly resamples: number;
  readonly seed: number;
}

/** Speed of the pattern that explains most of a picture; positive where position grows with time. */
export interface DriftSpeed {
  /** m s-1. */
  readonly speed: number;
  readonly low95: number;
  readonly high95: number;
  /** Where the limits come from; see `driftSpeed`. */
  readonly limits: "bootstrap" | "peak width";
  /** How far one angle step reaches at the answer, m s-1. */
  readonly speedStep: number;
  /** Share of the variance between lines at the answer, corrected for chance (0 … 1), and the median over all angles. */
  readonly share: number;
  readonly medianShare: number;
  /** The curve behind it: speeds tried, ascending, and their shares. */
  readonly speeds: Float64Array;
  readonly shares: Float64Array;
}

const secondsPerDay = 86400;
const unknownDrift: DriftSpeed = {
  speed: Number.NaN,
  low95: Number.NaN,
  high95: Number.NaN,
  limits: "peak width",
  speedStep: Number.NaN,
  share: Number.NaN,
  medianShare: Number.NaN,
  speeds: new Float64Array(0),
  shares: new Float64Array(0),
};
/** Segments must last two periods each, and four are the fewest to draw from. */
const quarterPeriodsPerSegment = 8;
const fewestSegments = 4;
const mostSegments = 12;

/**
 * Drift speed by the Radon transform: the slope of the parallel lines in the position-time plane whose means vary most (see
 * `lineVarianceShare`). Both axes are first divided by the picture's own scales, so that the answer lies near 45 degrees
 * and the angles tried resolve it; the best angle is then refined by golden section.
 *
 * Limits: the curve of shares is computed in segments of time of at least two periods, segments are drawn with replacement
 * and the 2.5 and 97.5 % quantiles of the resampled answers taken ("bootstrap"). Where the record has under four such segments
 * the limits are the outermost slopes at half the answer's height above the median, a rival peak's included ("peak width"): a
 * statement of resolution, not of chance.
 * Neither is nearer to the answer than half an angle step, which is what the record's length resolves. NaN throughout for fewer than three rows or columns or no variance. Work grows
 * with cells × angles (about 20 s for 80 rows of 10,000 dates): thin long oversampled records first.
 */
export function driftSpeed(picture: MovingPicture, settings: DriftSettings): DriftSpeed {
  const anomalies = { ...picture, values: withoutMeans(picture, settings.remove) };
  const varies = anomalies.values.some((value) => Math.abs(value) > 0);
  if (picture.positionMetres.length < 3 || picture.days.length < 3 || !varies) return unknownDrift;
  const scales = naturalScales(anomalies);
  const unit = scales.metres / (scales.days * secondsPerDay);
  const points = scaledPoints(anomalies, scales);
  const length = extentOf(picture.days) / scales.days;
  const height = extentOf(picture.positionMetres) / scales.metres;
  const step = settings.angleStepDegrees
    ? (settings.angleStepDegrees * Math.PI) / 180
    : angleStep(Math.min(length, height));
  const half = Math.ceil(Math.PI / 2 / step) - 1;
  const angles = Float64Array.from({ length: 2 * half + 1 }, (_, i) => (i - half) * step);
  const shares = angles.map((angle) => lineVarianceShare(points, angle));
  const best = highest(shares);
  const angle = refine(points, angles[best], step);
  const speed = unit * Math.tan(angle);
  const medianShare = shares.slice().sort()[half];
  const segments = Math.min(mostSegments, Math.floor(length / quarterPeriodsPerSegment));
  const { low, high } =
    segments >= fewestSegments
      ? percentileInterval(resampledAngles(points, angles, segments, settings.resamples, settings.seed))
      : peakAngles(angles, shares, best, medianShare);
  return {
    speed,
    low95: unit * Math.tan(Math.min(low, angle - step / 2)),
    high95: unit * Math.tan(Math.max(high, angle + step / 2)),
    limits: segments >= fewestSegments ? "bootstrap" : "peak width",
    speedStep: (unit * step) / Math.cos(angle) ** 2,
    share: lineVarianceShare(points, angle),
    medianShare,
    speeds: angles.map((each) => unit * Math.tan(each)),
    shares,
  };
}

/** Radians; an eighth of a wavelength's slip over the shorter axis, between a twentieth and half a degree. */
function angleStep(quarterWaves: number): number {
  const degree = Math.PI / 180;
  return Math.min(0.5 * degree, Math.max(0.05 * degree, 0.25 / quarterWaves));
}

function withoutMeans({ values, days }: MovingPicture, remove: DriftSettings["remove"]): Float64Array {
  const out = values.slice();
  const length = remove === "mean" ? out.length : days.length;
  for (let start = 0; start < out.length; start += length) {
    const { mean } = meanAndDeviation(out.subarray(start, start + length));
    for (let i = start; i < start + length; i++) out[i] -= mean;
  }
  return out;
}

/** The valid cells in order of time, so that a segment of time is a range of points. */
function scaledPoints(picture: MovingPicture, scales: { metres: number; days: number }): ScaledPoints {
  const { values, positionMetres, days } = picture;
  const position: number[] = [];
  const time: number[] = [];
  const value: number[] = [];
  for (let column = 0; column < days.length; column++) {
    for (let row = 0; row < positionMetres.length; row++) {
      const each = values[row * days.length + column];
      if (Number.isNaN(each)) continue;
      position.push((positionMetres[row] - positionMetres[0]) / scales.metres);
      time.push((days[column] - days[0]) / scales.days);
      value.push(each);
    }
  }
  return {
    position: Float64Array.from(position),
    time: Float64Array.from(time),
    value: Float64Array.from(value),
    positionStep: extentOf(positionMetres) / (positionMetres.length - 1) / scales.metres,
    timeStep: extentOf(days) / (days.length - 1) / scales.days,
  };
}

function extentOf(axis: Float64Array): number {
  return Math.abs(axis[axis.length - 1] - axis[0]);
}

function highest(values: Float64Array): number {
  let best = 0;
  for (let i = 1; i < values.length; i++) if (!(values[i] <= values[best])) best = i;
  return best;
}

/** Golden section between the neighbours of the best angle, to a thousandth of a step. */
function refine(points: ScaledPoints, centre: number, step: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let low = centre - step;
  let high = centre + step;
  while (high - low > 1e-3 * step) {
    const left = high - golden * (high - low);
    const right = low + golden * (high - low);
    if (lineVarianceShare(points, left) > lineVarianceShare(points, right)) high = right;
    else low = left;
  }
  return (low + high) / 2;
}

/** The outermost angles at half height, a rival peak's included: noise has several, a pattern that moves has one. */
function peakAngles(angles: Float64Array, shares: Float64Array, best: number, median: number) {
  const level = (shares[best] + median) / 2;
  let low = 0;
  let high = angles.length - 1;
  while (low < best && !(shares[low] >= level)) low++;
  while (high > best && !(shares[high] >= level)) high--;
  return { low: angles[Math.max(0, low - 1)], high: angles[Math.min(angles.length - 1, high + 1)] };
}
