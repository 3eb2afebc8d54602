import { lifeEnvelope } from "../../../../core/jets/eddy-test/eddy-life";
import type { PassingEddy } from "../../../../core/jets/eddy-test/eddy-ocean";
import type { OceanSetting } from "../../../../core/jets/eddy-test/ocean-plan";
import type { EddyPopulation } from "../../../../core/jets/eddy-test/population";
import type { Axis } from "../../../../core/model/axis";
import type { EarthSettings } from "../../../../core/ocean/earth";

export const earth: EarthSettings = { earth: "sphere", radius: 6371000, gravity: 9.81, omega: 7.292115e-5 };
export const metresPerDegree = (earth.radius * Math.PI) / 180;

export function evenAxis(kind: "latitude" | "longitude", from: number, step: number, count: number): Axis {
  const values = Float64Array.from({ length: count }, (_, i) => from + i * step);
  return { kind, values, step, even: true, periodic: false };
}

export function seaOf(box: {
  readonly south: number;
  readonly west: number;
  readonly step: number;
  readonly rows: number;
  readonly columns: number;
  readonly dates: number;
  readonly stepDays: number;
}): OceanSetting {
  return {
    latitude: evenAxis("latitude", box.south, box.step, box.rows),
    longitude: evenAxis("longitude", box.west, box.step, box.columns),
    days: Float64Array.from({ length: box.dates }, (_, t) => t * box.stepDays),
    hasData: new Uint8Array(box.dates).fill(1),
    ocean: null,
    earth,
    equatorDegrees: 5,
    smoothing: { metres: 0, days: 0 },
    noiseMetresPerSecond: 0,
  };
}

/** The slow way: the height field of eddies on one date, cell by cell, every cell with its own metric. */
export function heightField(
  eddies: readonly PassingEddy[],
  population: Pick<EddyPopulation, "lifetimeDays" | "rampShare">,
  setting: OceanSetting,
  day: number,
): Float64Array {
  const [latitudes, longitudes] = [setting.latitude.values, setting.longitude.values];
  const plane = new Float64Array(latitudes.length * longitudes.length);
  for (const eddy of eddies) {
    const since = day - eddy.middleDay;
    const strength = eddy.amplitudeMetres * lifeEnvelope(since / population.lifetimeDays + 0.5, population.rampShare);
    if (strength === 0) continue;
    const home = metresPerDegree * Math.cos((eddy.latitude * Math.PI) / 180);
    const centre = eddy.longitude + (eddy.speedMetresPerSecond * 86400 * since) / home;
    latitudes.forEach((latitude, row) => {
      const y = (latitude - eddy.latitude) * metresPerDegree;
      if (Math.abs(y) > 6 * eddy.radiusMetres) return;
      const east = metresPerDegree * Math.cos((latitude * Math.PI) / 180);
      longitudes.forEach((longitude, column) => {
        const x = (longitude - centre) * east;
        plane[row * longitudes.length + column] +=
          strength * Math.exp(-(x * x + y * y) / (2 * eddy.radiusMetres * eddy.radiusMetres));
      });
    });
  }
  return plane;
}

/** Sample mean and its standard error. */
export function meanWithError(values: readonly number[]): { mean: number; error: number } {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, error: Math.sqrt(squares / (values.length - 1) / values.length) };
}
