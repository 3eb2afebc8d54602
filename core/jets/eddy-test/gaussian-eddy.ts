import { errorFunction } from "./error-function";

/** Smoothing of a map product: standard deviations of a Gaussian in space and in time; 0 for none. */
export interface MapSmoothing {
  readonly metres: number;
  readonly days: number;
}

/** Height of an eddy: amplitude · exp(-x² / 2 radiusEast² - y² / 2 radiusNorth²), x and y from its centre, metres. */
export interface EddyShape {
  readonly amplitudeMetres: number;
  readonly radiusEastMetres: number;
  readonly radiusNorthMetres: number;
}

const secondsPerDay = 86400;

/**
 * What a map shows of a round Gaussian eddy that moves due east or west: the Gaussian in space widens it, the Gaussian in
 * time widens it along its path by what it travels, and the volume under it stays. Exact while the amplitude changes
 * slowly against the smoothing in time.
 */
export function mappedEddy(
  amplitudeMetres: number,
  radiusMetres: number,
  speedMetresPerSecond: number,
  smoothing: MapSmoothing,
): EddyShape {
  const travelled = speedMetresPerSecond * smoothing.days * secondsPerDay;
  const north = Math.hypot(radiusMetres, smoothing.metres);
  const east = Math.hypot(north, travelled);
  return {
    amplitudeMetres: amplitudeMetres * (radiusMetres / north) * (radiusMetres / east),
    radiusEastMetres: east,
    radiusNorthMetres: north,
  };
}

/**
 * Meridional part of the zonal-mean eastward current, in s-1 · m: -(1) d(height)/dy over the row's share of the eddy, i.e.
 * amplitude · y / radiusNorth² · exp(-y² / 2 radiusNorth²). Times g/f and `zonalShare` it is the current in m s-1.
 */
export function northwardSlope({ amplitudeMetres, radiusNorthMetres }: EddyShape, northOfCentreMetres: number): number {
  const scaled = northOfCentreMetres / radiusNorthMetres;
  return ((amplitudeMetres * scaled) / radiusNorthMetres) * Math.exp(-0.5 * scaled * scaled);
}

/** Integral of exp(-x² / 2 radiusEast²) from west to east of the centre, in metres: a span's share of an eddy. */
export function zonalIntegral(radiusEastMetres: number, westMetres: number, eastMetres: number): number {
  const scale = Math.SQRT2 * radiusEastMetres;
  const share = errorFunction(eastMetres / scale) - errorFunction(westMetres / scale);
  return Math.sqrt(Math.PI / 2) * radiusEastMetres * share;
}

/**
 * Zonal-mean geostrophic eastward current of one eddy, m s-1, over a sector from `westMetres` to `eastMetres` of its
 * centre, `northMetres` north of it: (g/f) · northwardSlope · zonalIntegral / width.
 */
export function zonalMeanCurrent(
  shape: EddyShape,
  place: { readonly westMetres: number; readonly eastMetres: number; readonly northMetres: number },
  gravityOverCoriolis: number,
): number {
  const { westMetres, eastMetres, northMetres } = place;
  const share = zonalIntegral(shape.radiusEastMetres, westMetres, eastMetres) / (eastMetres - westMetres);
  return gravityOverCoriolis * northwardSlope(shape, northMetres) * share;
}

/**
 * Largest time-mean eastward current that one eddy leaves at a fixed place when it crosses entirely within the record:
 * sqrt(2 pi / e) · g A / (f c T), whatever its radius; in m s-1.
 * Ref: after Schlax & Chelton 2008, Geophys. Res. Lett. 35, L24602; re-derived.
 */
export function crossingMeanPeak(
  gravityOverCoriolis: number,
  amplitudeMetres: number,
  speedMetresPerSecond: number,
  recordDays: number,
): number {
  const travelled = Math.abs(speedMetresPerSecond) * recordDays * secondsPerDay;
  return (Math.sqrt((2 * Math.PI) / Math.E) * gravityOverCoriolis * amplitudeMetres) / travelled;
}

/**
 * Northward-current variance that one eddy a square metre makes, in m4 s-2: (g/f)² pi A² radiusNorth / 2 radiusEast. Times
 * the number of eddies a square metre it is the variance of v where eddies lie at random; for round ones that of u too.
 */
export function northwardVariancePerEddy(shape: EddyShape, gravityOverCoriolis: number): number {
  const speed = gravityOverCoriolis * shape.amplitudeMetres;
  return ((Math.PI / 2) * speed * speed * shape.radiusNorthMetres) / shape.radiusEastMetres;
}
