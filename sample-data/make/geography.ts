/** The invented basin on the globe: the model's square laid on 20° N to 41.6° N around 137.5° W. */
export const south = 20;
export const north = 41.6;
export const centreLatitude = 30.8;
export const centreLongitude = -137.5;
const earthRadiusMetres = 6371000;
const rotationPerSecond = 7.292115e-5;
/** m s^-2, the value at the basin's centre. */
export const gravity = 9.794;
const radians = Math.PI / 180;

/** Width of the square in degrees, true at the centre latitude. */
export function widthDegrees(lengthMetres: number): number {
  return lengthMetres / (earthRadiusMetres * radians * Math.cos(centreLatitude * radians));
}

/** Fractions of the square's side, 0 to 1 from west to east and from south to north. */
export function toSquare(longitude: number, latitude: number, lengthMetres: number): readonly [number, number] {
  const width = widthDegrees(lengthMetres);
  return [(longitude - (centreLongitude - width / 2)) / width, (latitude - south) / (north - south)];
}

export function coriolis(latitude: number): number {
  return 2 * rotationPerSecond * Math.sin(latitude * radians);
}

/**
 * Height (m) of a streamfunction (m² s^-1). With f of the place, not of the basin's centre, the geostrophic current read
 * off the height is the model's, but for βψ/f (a few per cent of u).
 */
export function heightOfStream(stream: number, latitude: number): number {
  return (coriolis(latitude) / gravity) * stream;
}

/** Factors from the model's v and u to those read off the sphere, where the square is stretched. */
export function stretch(latitude: number, lengthMetres: number): { readonly u: number; readonly v: number } {
  const alongLatitude = widthDegrees(lengthMetres) * earthRadiusMetres * radians * Math.cos(latitude * radians);
  const alongLongitude = (north - south) * earthRadiusMetres * radians;
  return { u: lengthMetres / alongLongitude, v: lengthMetres / alongLatitude };
}

/**
 * Geostrophic current (m s^-1, east and north) of the height of a place, from the model's streamfunction and velocity and
 * the seasonal slope: u = −(g/f) ∂η/∂y with η = fψ/g + season.
 */
export function surfaceCurrent(
  model: { readonly stream: number; readonly u: number; readonly v: number },
  latitude: number,
  day: number,
  lengthMetres: number,
): readonly [number, number] {
  const f = coriolis(latitude);
  const beta = (2 * rotationPerSecond * Math.cos(latitude * radians)) / earthRadiusMetres;
  const factor = stretch(latitude, lengthMetres);
  const apart = 0.01;
  const slope =
    (seasonAndTrend(latitude + apart, day) - seasonAndTrend(latitude - apart, day)) /
    (2 * apart * radians * earthRadiusMetres);
  return [factor.u * model.u - (beta / f) * model.stream - (gravity / f) * slope, factor.v * model.v];
}

/** Height (m) of the yearly cycle, 4 cm, later in the north, and of a rise of 3 mm a year; `day` counts from the first date. */
export function seasonAndTrend(latitude: number, day: number): number {
  const peakDay = 190 + 2.5 * (latitude - centreLatitude);
  return 0.04 * Math.cos((2 * Math.PI * (day - peakDay)) / 365.25) + 0.003 * (day / 365.25);
}

/** True on the invented island near 24.4° N 142° W and east of the invented coast in the north-east. */
export function isLand(longitude: number, latitude: number): boolean {
  const east = (longitude + 142) / 0.95;
  const up = (latitude - 24.4) / 0.55;
  if (east * east + up * up - 0.35 * east * up < 1) return true;
  if (latitude < 32) return false;
  const coast = -124.9 - 0.42 * (latitude - 32) + 0.35 * Math.sin(1.7 * latitude);
  return longitude > coast;
}
