import { meridionalRadiusMetres, primeVerticalRadiusMetres } from "../numeric/ellipsoid";

/** The constants a result rests on; every one is a setting of the study. */
export interface EarthSettings {
  readonly earth: "ellipsoid" | "sphere";
  /** Metres; used when `earth` is "sphere". */
  readonly radius: number;
  /** "latitude": the TEOS-10 formula at sea level; a number: that value everywhere, in m s-2. */
  readonly gravity: "latitude" | number;
  /** Rotation rate in rad s-1. */
  readonly omega: number;
}

/** Coriolis parameter f = 2 omega sin(latitude) in s-1; negative south of the equator. */
export function coriolisParameter(latitudeDegrees: number, omega: number): number {
  return 2 * omega * Math.sin((latitudeDegrees * Math.PI) / 180);
}

/** Meridional gradient of f in m-1 s-1, per metre along the meridian of the chosen earth. */
export function planetaryVorticityGradient(latitudeDegrees: number, settings: EarthSettings): number {
  const latitude = (latitudeDegrees * Math.PI) / 180;
  return (2 * settings.omega * Math.cos(latitude)) / metresPerRadianNorth(latitude, settings);
}

/**
 * Gravity at sea level in m s-2. "latitude": g = 9.780327 (1 + (5.2792e-3 + 2.32e-5 s) s), s = sin^2(latitude).
 * Ref: IOC, SCOR and IAPSO 2010, TEOS-10 manual, appendix D [from memory; checked against gsw.grav].
 */
export function gravityAt(latitudeDegrees: number, settings: EarthSettings): number {
  if (settings.gravity !== "latitude") return settings.gravity;
  const sine = Math.sin((latitudeDegrees * Math.PI) / 180);
  const s = sine * sine;
  return 9.780327 * (1 + (5.2792e-3 + 2.32e-5 * s) * s);
}

/** Metres northward per radian of latitude. */
export function metresPerRadianNorth(latitudeRadians: number, settings: EarthSettings): number {
  return settings.earth === "sphere" ? settings.radius : meridionalRadiusMetres(latitudeRadians);
}

/** Metres eastward per radian of longitude. */
export function metresPerRadianEast(latitudeRadians: number, settings: EarthSettings): number {
  return transverseRadius(latitudeRadians, settings) * Math.cos(latitudeRadians);
}

/** tan(latitude) over the transverse radius, in m-1: the factor of u in vorticity and of v in divergence. */
export function convergenceOfMeridians(latitudeRadians: number, settings: EarthSettings): number {
  return Math.tan(latitudeRadians) / transverseRadius(latitudeRadians, settings);
}

function transverseRadius(latitudeRadians: number, settings: EarthSettings): number {
  return settings.earth === "sphere" ? settings.radius : primeVerticalRadiusMetres(latitudeRadians);
}
