import type { RandomStream } from "../../numeric/statistics/random";
import { lifeEnvelope } from "./eddy-life";
import { mappedEddy, northwardSlope, zonalIntegral } from "./gaussian-eddy";
import { valueAtLatitude } from "./latitude-table";
import { metresPerDegreeEast, metresPerDegreeNorth, type OceanPlan, reachInRadii } from "./ocean-plan";
import { quantileAt } from "./quantile-table";

/** One eddy of a random ocean. */
export interface PassingEddy {
  /** Positive for a hill; the full height. */
  readonly amplitudeMetres: number;
  readonly radiusMetres: number;
  /** Where it is in the middle of its life. */
  readonly longitude: number;
  readonly latitude: number;
  readonly middleDay: number;
  readonly speedMetresPerSecond: number;
}

const degree = Math.PI / 180;
const secondsPerDay = 86400;

/**
 * Eddies of one random ocean: births a Poisson process, uniform in time and over the area of the padded box, so that the
 * number alive does not change in time or towards the region's edges. Six numbers a birth.
 */
export function drawEddies(plan: OceanPlan, random: RandomStream): PassingEddy[] {
  const { box, population } = plan;
  const [sineSouth, sineNorth] = [Math.sin(box.south * degree), Math.sin(box.north * degree)];
  const eddies: PassingEddy[] = [];
  let middleDay = plan.firstMiddleDay;
  for (;;) {
    middleDay -= Math.log(1 - random.uniform()) / plan.birthsPerDay;
    if (!(middleDay < plan.lastMiddleDay)) return eddies;
    const longitude = box.west + (box.east - box.west) * random.uniform();
    const latitude = Math.asin(sineSouth + (sineNorth - sineSouth) * random.uniform()) / degree;
    const size =
      quantileAt(population.amplitudeMetres, random.uniform()) * valueAtLatitude(population.amplitudeFactor, latitude);
    const radiusMetres = quantileAt(population.radiusMetres, random.uniform());
    const amplitudeMetres = random.uniform() < population.shareHigh ? size : -size;
    const speedMetresPerSecond = valueAtLatitude(population.speedMetresPerSecond, latitude);
    eddies.push({ amplitudeMetres, radiusMetres, longitude, latitude, middleDay, speedMetresPerSecond });
  }
}

/**
 * Zonal-mean eastward current of an ocean of passing eddies, `out[row * dates + t]` in m s-1, NaN on dates without data and
 * in the belt blanked at the equator. Each eddy enters in closed form: no plane is made. Within a few radii the earth is
 * taken as flat with the metric of the eddy's latitude, and g/f as that of the row: relative error about radius · tan(latitude)
 * / earth radius, 1 % in middle latitudes.
 */
export function zonalMeanOf(eddies: readonly PassingEddy[], plan: OceanPlan): Float64Array {
  const { days, hasData } = plan.setting;
  const dates = days.length;
  const out = new Float64Array(plan.spanOfRow.length * dates);
  const scratch = plan.spans.map(() => new Float64Array(dates));
  for (const eddy of eddies) addEddy(eddy, plan, out, scratch);
  for (let row = 0; row < plan.spanOfRow.length; row++) {
    const blank = Number.isNaN(plan.gravityOverCoriolis[row]) || plan.spans[plan.spanOfRow[row]].length === 0;
    for (let t = 0; t < dates; t++) if (blank || !hasData[t]) out[row * dates + t] = Number.NaN;
  }
  return out;
}

/** Draws an ocean and samples it as the record is: `zonalMeanOf` plus white noise where asked for. */
export function eddyOcean(plan: OceanPlan, random: RandomStream): Float64Array {
  const out = zonalMeanOf(drawEddies(plan, random), plan);
  const noise = plan.setting.noiseMetresPerSecond;
  if (noise > 0) for (let i = 0; i < out.length; i++) out[i] += noise * random.normal();
  return out;
}

function addEddy(eddy: PassingEddy, plan: OceanPlan, out: Float64Array, scratch: readonly Float64Array[]): void {
  const { latitude, days, earth, smoothing } = plan.setting;
  const shape = mappedEddy(eddy.amplitudeMetres, eddy.radiusMetres, eddy.speedMetresPerSecond, smoothing);
  const north = metresPerDegreeNorth(eddy.latitude, earth);
  const reachDegrees = (reachInRadii * shape.radiusNorthMetres) / north;
  const lifetime = plan.population.lifetimeDays;
  const from = firstAtOrAfter(days, eddy.middleDay - lifetime / 2);
  const to = firstAtOrAfter(days, eddy.middleDay + lifetime / 2);
  if (from >= to) return;
  const shared = new Uint8Array(plan.spans.length);
  for (let row = 0; row < latitude.values.length; row++) {
    const away = latitude.values[row] - eddy.latitude;
    const factor = plan.gravityOverCoriolis[row];
    if (Math.abs(away) > reachDegrees || Number.isNaN(factor)) continue;
    const span = plan.spanOfRow[row];
    // 1: worked out and felt, 2: worked out and out of reach.
    if (shared[span] === 0) {
      const felt = zonalShares(eddy, shape.radiusEastMetres, plan, plan.spans[span], [from, to], scratch[span]);
      shared[span] = felt ? 1 : 2;
    }
    if (shared[span] === 2) continue;
    const shares = scratch[span];
    const slope = factor * northwardSlope(shape, away * north);
    const start = row * days.length;
    for (let t = from; t < to; t++) out[start + t] += slope * shares[t];
  }
}

/** Share of the row's width times life envelope on dates [from, to); false where the eddy never comes near. */
function zonalShares(
  eddy: PassingEddy,
  radiusEastMetres: number,
  plan: OceanPlan,
  span: Float64Array,
  [from, to]: readonly [number, number],
  out: Float64Array,
): boolean {
  const { days, earth } = plan.setting;
  const { lifetimeDays, rampShare } = plan.population;
  const east = metresPerDegreeEast(eddy.latitude, earth);
  const degreesPerDay = (eddy.speedMetresPerSecond * secondsPerDay) / east;
  const reach = (reachInRadii * radiusEastMetres) / east;
  let width = 0;
  for (let i = 0; i < span.length; i += 2) width += span[i + 1] - span[i];
  let felt = false;
  for (let t = from; t < to; t++) {
    const sinceMiddle = days[t] - eddy.middleDay;
    const longitude = eddy.longitude + degreesPerDay * sinceMiddle;
    let integral = 0;
    for (let i = 0; i < span.length; i += 2) {
      const [west, far] = [span[i] - longitude, span[i + 1] - longitude];
      if (west < reach && far > -reach) integral += zonalIntegral(radiusEastMetres, west * east, far * east);
    }
    out[t] = 0;
    if (integral === 0) continue;
    felt = true;
    out[t] = (integral / (width * east)) * lifeEnvelope(sinceMiddle / lifetimeDays + 0.5, rampShare);
  }
  return felt;
}

/** Index of the first day at or after `day`; the length where none is. */
function firstAtOrAfter(days: Float64Array, day: number): number {
  let [low, high] = [0, days.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (days[middle] < day) low = middle + 1;
    else high = middle;
  }
  return low;
}
