export interface FalseDiscovery {
  /** The largest p value rejected; 0 where none is. */
  readonly threshold: number;
  readonly rejections: number;
  /** Tests that took part: the p values that are not NaN. */
  readonly tests: number;
  /** 1 where rejected. */
  readonly rejected: Uint8Array;
}

/**
 * Rejects the p values up to the largest p_(i) <= i alpha / m, so that on average at most `alpha` of the rejections are false.
 * NaN p values (land) are no tests. Ref: Benjamini & Hochberg 1995, J. R. Stat. Soc. B 57, 289-300. For fields correlated in
 * space alpha may be twice the global level (Wilks 2016, BAMS 97, 2263-2273).
 */
export function falseDiscovery(pValues: Float64Array, alpha: number): FalseDiscovery {
  const sorted = pValues.filter((p) => !Number.isNaN(p)).sort();
  let rejections = 0;
  for (let i = 0; i < sorted.length; i++) if (sorted[i] <= (alpha * (i + 1)) / sorted.length) rejections = i + 1;
  const threshold = rejections > 0 ? sorted[rejections - 1] : 0;
  const rejected = Uint8Array.from(pValues, (p) => (rejections > 0 && p <= threshold ? 1 : 0));
  return { threshold, rejections, tests: sorted.length, rejected };
}
