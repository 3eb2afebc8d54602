/** Points of the boundary in the wavenumber plane, rad m-1. */
export interface WaveBoundary {
  /** Angle of the wavenumber to the zonal direction, radians, -pi/2 … pi/2. */
  readonly angle: Float64Array;
  readonly k: Float64Array;
  readonly l: Float64Array;
}

/**
 * Boundary between waves (inside) and turbulence (outside), K² = (beta / U) cos(angle), on the side of k >= 0; the other
 * side mirrors it. Points evenly spaced in angle, both ends (the origin) included. Speed in m s-1, beta in m-1 s-1.
 * Ref: Vallis & Maltrud 1993, J. Phys. Oceanogr. 23, 1346 [from memory].
 */
export function waveBoundary(speed: number, beta: number, points: number): WaveBoundary {
  const scale = Math.sqrt(beta / speed);
  const angle = Float64Array.from({ length: points }, (_, i) => -Math.PI / 2 + (Math.PI * i) / (points - 1));
  // cos(pi/2) is rounded to 6e-17, never negative at these angles, but a guard keeps the root real.
  const cosine = angle.map((each) => Math.max(0, Math.cos(each)));
  return {
    angle,
    k: cosine.map((each) => scale * each ** 1.5),
    l: cosine.map((each, i) => scale * Math.sin(angle[i]) * Math.sqrt(each)),
  };
}

/** True where waves rule: K² < (beta / U) |cos(angle)|, false at the origin. */
export function isInsideWaveBoundary(k: number, l: number, speed: number, beta: number): boolean {
  const total = Math.hypot(k, l);
  return total > 0 && total ** 3 < (beta / speed) * Math.abs(k);
}

/**
 * Share of a two-dimensional spectrum's energy inside the boundary. `power[i * l.length + j]` belongs to k[i], l[j] (rad
 * m-1, either sign, evenly spaced: every cell stands for the same area). The mean (k = l = 0) and NaN cells are left out;
 * NaN where nothing is left. Wavenumbers on the meridional axis (k = 0) are never inside.
 */
export function energyShareInside(
  power: Float64Array,
  k: Float64Array,
  l: Float64Array,
  speed: number,
  beta: number,
): number {
  let inside = 0;
  let all = 0;
  for (let i = 0; i < k.length; i++) {
    for (let j = 0; j < l.length; j++) {
      const energy = power[i * l.length + j];
      if (Number.isNaN(energy) || (k[i] === 0 && l[j] === 0)) continue;
      all += energy;
      if (isInsideWaveBoundary(k[i], l[j], speed, beta)) inside += energy;
    }
  }
  return inside / all;
}
