import { randomStream } from "../../numeric/statistics/random";
import { parabolaVertex } from "../ridges/vertex";
import { lineVarianceShare, type ScaledPoints } from "./line-means";

/**
 * Best angles of a picture put together anew from its own segments of time, `resamples` of them. Points are in order of
 * time; segments are of equal length in time; angles evenly spaced, in radians. Each segment's curve of shares is weighted
 * by its sum of squares; the top of the summed curve is refined by a parabola.
 */
export function resampledAngles(
  points: ScaledPoints,
  angles: Float64Array,
  segments: number,
  resamples: number,
  seed: number,
): Float64Array {
  const curves = cutInTime(points, segments).map((part) => {
    const squares = part.value.reduce((sum, value) => sum + value * value, 0);
    return angles.map((angle) => squares * lineVarianceShare(part, angle));
  });
  return Float64Array.from({ length: resamples }, (_, resample) => {
    const random = randomStream(seed, resample);
    const sum = new Float64Array(angles.length);
    for (let draw = 0; draw < curves.length; draw++) {
      const curve = curves[random.below(curves.length)];
      for (let i = 0; i < sum.length; i++) sum[i] += curve[i];
    }
    let best = 0;
    for (let i = 1; i < sum.length; i++) if (sum[i] > sum[best]) best = i;
    return best > 0 && best < sum.length - 1 ? parabolaVertex(angles, sum, best).at : angles[best];
  });
}

/** Segments with under ten values are left out. */
function cutInTime(points: ScaledPoints, segments: number): ScaledPoints[] {
  const { position, time, value } = points;
  const first = time[0];
  const length = (time[time.length - 1] - first) / segments;
  const parts: ScaledPoints[] = [];
  let from = 0;
  for (let segment = 1; segment <= segments; segment++) {
    let to = from;
    while (to < time.length && (segment === segments || time[to] < first + segment * length)) to++;
    if (to - from >= 10) {
      parts.push({
        ...points,
        position: position.subarray(from, to),
        time: time.subarray(from, to),
        value: value.subarray(from, to),
      });
    }
    from = to;
  }
  return parts;
}
