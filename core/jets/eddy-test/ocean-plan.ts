import type { Axis } from "../../model/axis";
import {
  coriolisParameter,
  type EarthSettings,
  gravityAt,
  metresPerRadianEast,
  metresPerRadianNorth,
} from "../../ocean/earth";
import type { MapSmoothing } from "./gaussian-eddy";
import { checkPopulation, type EddyPopulation } from "./population";

/** The record that random oceans are sampled like. */
export interface OceanSetting {
  readonly latitude: Axis;
  readonly longitude: Axis;
  /** Days of the record's dates, ascending. */
  readonly days: Float64Array;
  /** 1 where the date has data: the oceans miss the same dates. */
  readonly hasData: Uint8Array;
  /** rows × columns, 1 at sea: zonal means run over these cells. Null for sea everywhere. */
  readonly ocean: Uint8Array | null;
  readonly earth: EarthSettings;
  readonly equatorDegrees: number;
  /** Smoothing to lay over the population; none where it was estimated from the maps themselves. */
  readonly smoothing: MapSmoothing;
  /** Standard deviation of white noise on every zonal mean, m s-1; 0 for none. */
  readonly noiseMetresPerSecond: number;
}

/** All that drawing an ocean needs, worked out once. */
export interface OceanPlan {
  readonly setting: OceanSetting;
  readonly population: EddyPopulation;
  /** g/f a row, m s-1; NaN in the blanked belt. */
  readonly gravityOverCoriolis: Float64Array;
  /** Rows with the same stretches of sea share one entry of `spans`. */
  readonly spanOfRow: Int32Array;
  /** West and east ends of the stretches of sea in degrees, pairs. */
  readonly spans: readonly Float64Array[];
  /** Where the middles of lives are drawn: the region padded so that no eddy that could reach it is missed. */
  readonly box: { readonly west: number; readonly east: number; readonly south: number; readonly north: number };
  readonly firstMiddleDay: number;
  readonly lastMiddleDay: number;
  /** Expected births a day in the box. */
  readonly birthsPerDay: number;
}

/** Radii from its centre beyond which an eddy is not felt: its current is 0.2 % of its largest there. */
export const reachInRadii = 4;
const degree = Math.PI / 180;
const earthRadiusMetres = 6371000;

/** Works out padding, birth rate and zonal stretches. Errors as `checkPopulation`. */
export function planOceans(population: EddyPopulation, setting: OceanSetting): OceanPlan {
  checkPopulation(population);
  const { latitude, longitude, days, earth } = setting;
  const box = paddedBox(population, setting);
  const areaKm2 =
    (earthRadiusMetres / 1000) ** 2 *
    (box.east - box.west) *
    degree *
    (Math.sin(box.north * degree) - Math.sin(box.south * degree));
  const alive = (population.densityPerMillionKm2 * areaKm2) / 1e6;
  const halfLife = population.lifetimeDays / 2;
  return {
    setting,
    population,
    gravityOverCoriolis: latitude.values.map((value) =>
      value === 0 || Math.abs(value) < setting.equatorDegrees
        ? Number.NaN
        : gravityAt(value, earth) / coriolisParameter(value, earth.omega),
    ),
    ...zonalSpans(setting.ocean, latitude.values.length, longitude),
    box,
    firstMiddleDay: days[0] - halfLife,
    lastMiddleDay: days[days.length - 1] + halfLife,
    birthsPerDay: alive / population.lifetimeDays,
  };
}

export function metresPerDegreeEast(latitudeDegrees: number, earth: EarthSettings): number {
  return metresPerRadianEast(latitudeDegrees * degree, earth) * degree;
}

export function metresPerDegreeNorth(latitudeDegrees: number, earth: EarthSettings): number {
  return metresPerRadianNorth(latitudeDegrees * degree, earth) * degree;
}

function paddedBox(population: EddyPopulation, { latitude, longitude, earth, smoothing }: OceanSetting) {
  const widest = population.radiusMetres[population.radiusMetres.length - 1];
  const fastest = Math.max(...population.speedMetresPerSecond.values.map(Math.abs));
  const north = Math.hypot(widest, smoothing.metres);
  const east = Math.hypot(north, fastest * smoothing.days * 86400);
  const [southEdge, northEdge] = ends(latitude);
  const [westEdge, eastEdge] = ends(longitude);
  const padNorth = (reachInRadii * north) / metresPerDegreeNorth(0, earth);
  const south = Math.max(-89, southEdge - padNorth);
  const far = Math.min(89, northEdge + padNorth);
  const narrowest = metresPerDegreeEast(Math.max(Math.abs(south), Math.abs(far)), earth);
  const travel = (fastest * population.lifetimeDays * 86400) / 2;
  const padEast = (reachInRadii * east + travel) / narrowest;
  return { west: westEdge - padEast, east: eastEdge + padEast, south, north: far };
}

/** Edges of the outermost cells, lower first. */
function ends({ values, step }: Axis): [number, number] {
  const half = Number.isFinite(step) ? Math.abs(step) / 2 : 0;
  const [first, last] = [values[0], values[values.length - 1]];
  return [Math.min(first, last) - half, Math.max(first, last) + half];
}

function zonalSpans(ocean: Uint8Array | null, rows: number, longitude: Axis): Pick<OceanPlan, "spanOfRow" | "spans"> {
  const spans: Float64Array[] = [];
  const known = new Map<string, number>();
  const columns = longitude.values.length;
  const spanOfRow = Int32Array.from({ length: rows }, (_, row) => {
    const own = ocean
      ? seaStretches(ocean.subarray(row * columns, (row + 1) * columns), longitude)
      : Float64Array.from(ends(longitude));
    const key = own.join(" ");
    let index = known.get(key);
    if (index === undefined) {
      index = spans.push(own) - 1;
      known.set(key, index);
    }
    return index;
  });
  return { spanOfRow, spans };
}

function seaStretches(sea: Uint8Array, { values, step }: Axis): Float64Array {
  const half = Number.isFinite(step) ? Math.abs(step) / 2 : 0;
  const out: number[] = [];
  for (let from = 0; from < sea.length; from++) {
    if (!sea[from]) continue;
    let to = from;
    while (to + 1 < sea.length && sea[to + 1]) to++;
    out.push(Math.min(values[from], values[to]) - half, Math.max(values[from], values[to]) + half);
    from = to;
  }
  return Float64Array.from(out);
}
