/** WGS-84 semi-major axis in metres and flattening. Source: NIMA TR8350.2. */
const semiMajorMetres = 6378137;
const flattening = 1 / 298.257223563;
const eccentricitySquared = flattening * (2 - flattening);

/** Meridional radius of curvature in metres: d(northward distance) / d(latitude in radians). */
export function meridionalRadiusMetres(latitudeRadians: number): number {
  const w = curvatureRoot(latitudeRadians);
  return (semiMajorMetres * (1 - eccentricitySquared)) / (w * w * w);
}

/** Prime-vertical radius of curvature in metres; times cos(latitude) it is the parallel's radius. */
export function primeVerticalRadiusMetres(latitudeRadians: number): number {
  return semiMajorMetres / curvatureRoot(latitudeRadians);
}

function curvatureRoot(latitudeRadians: number): number {
  const sine = Math.sin(latitudeRadians);
  return Math.sqrt(1 - eccentricitySquared * sine * sine);
}

/** Great-circle distance in metres between two points in degrees on a sphere (haversine form). NaN in, NaN out. */
export function sphericalDistanceMetres(
  from: { readonly longitude: number; readonly latitude: number },
  to: { readonly longitude: number; readonly latitude: number },
  radiusMetres: number,
): number {
  const degree = Math.PI / 180;
  const halfLatitude = Math.sin(((to.latitude - from.latitude) * degree) / 2);
  const halfLongitude = Math.sin(((to.longitude - from.longitude) * degree) / 2);
  const cosines = Math.cos(from.latitude * degree) * Math.cos(to.latitude * degree);
  const haversine = halfLatitude * halfLatitude + cosines * halfLongitude * halfLongitude;
  return 2 * radiusMetres * Math.asin(Math.min(1, Math.sqrt(haversine)));
}
