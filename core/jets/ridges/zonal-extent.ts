import { type EarthSettings, metresPerRadianEast, metresPerRadianNorth } from "../../ocean/earth";
import { degreesNorth, type Extreme, type ExtremeSettings, findExtremes } from "./find-extremes";
import type { Sectors } from "./sectors";

/** How far along its latitude a jet shows, and how it leans. */
export interface ZonalExtent {
  /** Share of the sectors with data near the jet that show an extreme of the same sign within half its width; NaN for none. */
  readonly share: number;
  readonly sectorsWithData: number;
  /** Least-squares slope of those extremes' latitudes against longitude; NaN for fewer than three. Positive: north to the east. */
  readonly tiltDegreesPerDegree: number;
  /** The same in kilometres per kilometre, and its angle to the parallel in degrees. */
  readonly tilt: number;
  readonly tiltAngleDegrees: number;
}

/** Extremes of each sector's mean profile on one date; `means` as `sectorMeans` gives them. */
export function findSectorExtremes(
  means: Float64Array,
  latitude: Float64Array,
  settings: ExtremeSettings,
  earth: EarthSettings,
): Extreme[][] {
  const rows = latitude.length;
  return Array.from({ length: means.length / rows }, (_, sector) =>
    findExtremes(means.subarray(sector * rows, (sector + 1) * rows), latitude, settings, earth),
  );
}

/**
 * Zonal extent and tilt of a jet found on the zonal mean, from the sectors of the same date. In each sector the nearest
 * extreme of the same sign within half the jet's width counts. A sector without a value in the jet's row is left out of the
 * share. A jet that leaves that strip within the region shows a smaller share; its tilt is then that of the part inside.
 */
export function zonalExtent(
  jet: Pick<Extreme, "sign" | "row" | "latitude" | "widthKm">,
  sectors: Sectors,
  means: Float64Array,
  extremes: readonly (readonly Extreme[])[],
  earth: EarthSettings,
): ZonalExtent {
  const count = sectors.middle.length;
  const rows = means.length / count;
  const reach = degreesNorth(jet.widthKm, jet.latitude, earth) / 2;
  const longitudes: number[] = [];
  const latitudes: number[] = [];
  let sectorsWithData = 0;
  for (let sector = 0; sector < count; sector++) {
    if (Number.isNaN(means[sector * rows + jet.row])) continue;
    sectorsWithData++;
    const nearest = nearestLatitude(extremes[sector], jet);
    if (!(Math.abs(nearest - jet.latitude) <= reach)) continue;
    longitudes.push(sectors.middle[sector]);
    latitudes.push(nearest);
  }
  const slope = longitudes.length < 3 ? Number.NaN : leastSquaresSlope(longitudes, latitudes);
  const phi = (jet.latitude * Math.PI) / 180;
  const tilt = (slope * metresPerRadianNorth(phi, earth)) / metresPerRadianEast(phi, earth);
  return {
    share: sectorsWithData > 0 ? longitudes.length / sectorsWithData : Number.NaN,
    sectorsWithData,
    tiltDegreesPerDegree: slope,
    tilt,
    tiltAngleDegrees: (Math.atan(tilt) * 180) / Math.PI,
  };
}

function nearestLatitude(extremes: readonly Extreme[], jet: Pick<Extreme, "sign" | "latitude">): number {
  let nearest = Number.NaN;
  for (const { sign, latitude } of extremes) {
    if (sign !== jet.sign) continue;
    if (!(Math.abs(latitude - jet.latitude) >= Math.abs(nearest - jet.latitude))) nearest = latitude;
  }
  return nearest;
}

function leastSquaresSlope(x: readonly number[], y: readonly number[]): number {
  const meanX = x.reduce((sum, value) => sum + value, 0) / x.length;
  const meanY = y.reduce((sum, value) => sum + value, 0) / y.length;
  let product = 0;
  let square = 0;
  for (let i = 0; i < x.length; i++) {
    product += (x[i] - meanX) * (y[i] - meanY);
    square += (x[i] - meanX) ** 2;
  }
  return product / square;
}
