import { coriolisParameter, type EarthSettings, planetaryVorticityGradient } from "../../ocean/earth";

/** A table of the first baroclinic deformation radius in kilometres by degrees of latitude, latitudes ascending. */
export interface RadiusTable {
  readonly latitude: readonly number[];
  readonly radiusKm: readonly number[];
  /** The latitudes are distances from the equator, good for both hemispheres. */
  readonly symmetric: boolean;
}

/**
 * Approximate zonal means after Chelton et al. 1998, J. Phys. Oceanogr. 28, 433, figure 6 [from memory, off by up to 15 %].
 * A caution must go with every result that rests on them.
 */
export const approximateRadii: RadiusTable = {
  latitude: [0, 5, 10, 20, 30, 40, 50, 60],
  radiusKm: [240, 210, 105, 56, 37, 26, 17, 10],
  symmetric: true,
};

/** Latitude in degrees poleward of which the deformation radius is c / |f|. */
const equatorialBeltDegrees = 5;

/**
 * Deformation radius in metres for a gravity-wave speed c in m s-1: c / |f| from 5 degrees on, sqrt(c / (2 beta)) nearer
 * the equator. The two do not meet at 5 degrees. Ref: Chelton et al. 1998, equation 2.3 [from memory].
 */
export function radiusFromWaveSpeed(waveSpeed: number, latitudeDegrees: number, earth: EarthSettings): number {
  if (Math.abs(latitudeDegrees) >= equatorialBeltDegrees) {
    return waveSpeed / Math.abs(coriolisParameter(latitudeDegrees, earth.omega));
  }
  return Math.sqrt(waveSpeed / (2 * planetaryVorticityGradient(latitudeDegrees, earth)));
}

/** Deformation radius in metres from a table, interpolated linearly in latitude; NaN outside it. */
export function radiusFromTable(table: RadiusTable, latitudeDegrees: number): number {
  const at = table.symmetric ? Math.abs(latitudeDegrees) : latitudeDegrees;
  const { latitude, radiusKm } = table;
  for (let i = 0; i < latitude.length; i++) {
    if (latitude[i] === at) return radiusKm[i] * 1000;
    if (i > 0 && latitude[i - 1] < at && at < latitude[i]) {
      const share = (at - latitude[i - 1]) / (latitude[i] - latitude[i - 1]);
      return (radiusKm[i - 1] + share * (radiusKm[i] - radiusKm[i - 1])) * 1000;
    }
  }
  return Number.NaN;
}
