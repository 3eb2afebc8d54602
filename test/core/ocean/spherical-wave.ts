import type { GridAxes } from "../../../core/model/axis";
import { sphere } from "./grids";

const degree = Math.PI / 180;
const R = sphere.radius;
const g = 9.81;

/** h = 0.3 sin(9a) cos(7p) + 0.1 sin(11p) in metres, a longitude and p latitude in degrees. */
export function waveHeight(longitude: number, latitude: number): number {
  const [a, p] = [longitude * degree, latitude * degree];
  return 0.3 * Math.sin(9 * a) * Math.cos(7 * p) + 0.1 * Math.sin(11 * p);
}

/**
 * Its geostrophic u, v and vorticity in closed form on the sphere of the tests, differentiated by hand; vorticity from the
 * definition: v_a/(R cos p) - u_p/R + u tan(p)/R.
 */
export function exactWaveFlow(longitude: number, latitude: number): readonly [u: number, v: number, vorticity: number] {
  const [a, p] = [longitude * degree, latitude * degree];
  const f = 2 * sphere.omega * Math.sin(p);
  const fP = 2 * sphere.omega * Math.cos(p);
  const hP = -2.1 * Math.sin(9 * a) * Math.sin(7 * p) + 1.1 * Math.cos(11 * p);
  const hPP = -14.7 * Math.sin(9 * a) * Math.cos(7 * p) - 12.1 * Math.sin(11 * p);
  const hA = 2.7 * Math.cos(9 * a) * Math.cos(7 * p);
  const hAA = -24.3 * Math.sin(9 * a) * Math.cos(7 * p);
  const u = (-g * hP) / (f * R);
  const uP = (-g / R) * (hPP / f - (hP * fP) / (f * f));
  const v = (g * hA) / (f * R * Math.cos(p));
  const vA = (g * hAA) / (f * R * Math.cos(p));
  return [u, v, vA / (R * Math.cos(p)) - uP / R + (u * Math.tan(p)) / R];
}

/** A grid whose axes are smooth functions of an even index coordinate: halving the step nests the coarse grid in the fine. */
export function stretchedAxes(options: {
  readonly latitudeAt: (s: number) => number;
  readonly longitudeAt: (s: number) => number;
  readonly step: number;
  readonly periodic?: boolean;
}): GridAxes {
  const { latitudeAt, longitudeAt, step, periodic = false } = options;
  const count = Math.round(1 / step);
  const line = (at: (s: number) => number, length: number) => Float64Array.from({ length }, (_, i) => at(i * step));
  const latitudes = line(latitudeAt, count + 1);
  // A periodic axis leaves out the end, which is its start again.
  const longitudes = line(longitudeAt, periodic ? count : count + 1);
  const median = (values: Float64Array) => values[values.length >> 1] - values[(values.length >> 1) - 1];
  return {
    latitude: { kind: "latitude", values: latitudes, step: median(latitudes), even: false, periodic: false },
    longitude: { kind: "longitude", values: longitudes, step: median(longitudes), even: false, periodic },
  };
}

export const evenLongitudes = (s: number) => -12 + 24 * s;

/** Latitudes of a Mercator map: even in ln tan(45° + latitude/2), here from 25 to 55 degrees. */
export function mercatorLatitude(s: number): number {
  const stretched = (latitude: number) => Math.atanh(Math.sin(latitude * degree));
  const [south, north] = [stretched(25), stretched(55)];
  return Math.asin(Math.tanh(south + s * (north - south))) / degree;
}

/** Cosine-stretched, as Gauss-Legendre latitudes are slightly and others strongly; from 25 to 55 degrees. */
export function cosineLatitude(s: number): number {
  return 40 - (15 * Math.cos(Math.PI * (0.15 + 0.7 * s))) / Math.cos(Math.PI * 0.15);
}
