/**
 * Ways in which the Rhines scale is quoted: a length sqrt(factor × U / beta), times a multiple that makes it a jet's width
 * (pi) or a wavelength (2 pi).
 */
export const rhinesConventions = {
  root: { formula: "sqrt(U/beta)", factor: 1, multiple: 1 },
  "root-width": { formula: "pi sqrt(U/beta)", factor: 1, multiple: Math.PI },
  "root-wavelength": { formula: "2 pi sqrt(U/beta)", factor: 1, multiple: 2 * Math.PI },
  "root-two": { formula: "sqrt(2U/beta)", factor: 2, multiple: 1 },
  "root-two-width": { formula: "pi sqrt(2U/beta)", factor: 2, multiple: Math.PI },
  "root-two-wavelength": { formula: "2 pi sqrt(2U/beta)", factor: 2, multiple: 2 * Math.PI },
} as const;

export type RhinesConvention = keyof typeof rhinesConventions;

/**
 * Rhines scale in metres for a root-mean-square speed in m s-1 and beta in m-1 s-1, in the convention named; NaN for a
 * negative speed. Ref: sqrt(2U/beta) Rhines 1975, J. Fluid Mech. 69, 417; sqrt(U/beta) Vallis & Maltrud 1993, J. Phys.
 * Oceanogr. 23, 1346 [both from memory].
 */
export function rhinesScale(speed: number, beta: number, convention: RhinesConvention): number {
  const { factor, multiple } = rhinesConventions[convention];
  return multiple * Math.sqrt((factor * speed) / beta);
}
