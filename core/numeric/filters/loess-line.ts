import { choleskyFactor, choleskySolve } from "../linear-solve";

const terms = 3;

/** Tricube weight (1 - |d|^3)^3 at a distance in half-spans, 0 from 1 on. */
export function tricube(distance: number): number {
  const size = Math.abs(distance);
  return size >= 1 ? 0 : (1 - size * size * size) ** 3;
}

/**
 * Quadratic loess along a line: at each asked place the value of a local parabola, weighted by tricube within the
 * half-span (in the units of `positions`, which rise but need not be even). A smoother with half its amplitude left at
 * 1.16 half-spans and half its power at 1.40. NaN values are left out; NaN where fewer than three points weigh or they
 * cannot tell the terms apart. Ref: Cleveland & Devlin 1988, J. Am. Stat. Assoc. 83, 596 [from memory].
 */
export function loessLine(
  positions: Float64Array,
  values: Float64Array,
  halfSpan: number,
  at: Float64Array = positions,
): Float64Array {
  const normal = new Float64Array(terms * terms);
  const right = new Float64Array(terms);
  const powers = new Float64Array(2 * terms - 1);
  let start = 0;
  return at.map((centre, asked) => {
    if (asked === 0 || centre < at[asked - 1]) start = 0;
    while (start < positions.length && positions[start] <= centre - halfSpan) start++;
    powers.fill(0);
    right.fill(0);
    let points = 0;
    for (let i = start; i < positions.length && positions[i] < centre + halfSpan; i++) {
      if (Number.isNaN(values[i])) continue;
      const distance = (positions[i] - centre) / halfSpan;
      let weight = tricube(distance);
      points++;
      for (let power = 0; power < powers.length; power++) {
        powers[power] += weight;
        if (power < terms) right[power] += weight * values[i];
        weight *= distance;
      }
    }
    if (points < terms) return Number.NaN;
    for (let i = 0; i < terms; i++) for (let j = 0; j < terms; j++) normal[i * terms + j] = powers[i + j];
    const factor = choleskyFactor(normal, terms);
    return factor ? choleskySolve(factor, terms, right)[0] : Number.NaN;
  });
}
