/**
 * Effective sample size of the correlation of two AR(1) series: N (1 - r1 r2) / (1 + r1 r2), within 1 … N.
 * Ref: Bretherton et al. 1999, J. Climate 12, 1990-2009.
 */
export function effectiveSizeOfCorrelation(count: number, firstLagOne: number, secondLagOne: number): number {
  const product = firstLagOne * secondLagOne;
  return withinCount(count, (count * (1 - product)) / (1 + product));
}

/** Effective sample size of the variance of an AR(1) series: N (1 - r²) / (1 + r²). Ref: as for the correlation. */
export function effectiveSizeOfVariance(count: number, lagOne: number): number {
  return effectiveSizeOfCorrelation(count, lagOne, lagOne);
}

/**
 * Degrees of freedom of a record of white noise passed by an ideal band: 2 B T, with B the bandwidth between the two periods
 * (Infinity for a low-pass) and T the record's length, all in one unit of time. Textbook.
 */
export function effectiveSizeOfBand(shortestPeriod: number, longestPeriod: number, recordLength: number): number {
  return 2 * (1 / shortestPeriod - 1 / longestPeriod) * recordLength;
}

/**
 * Effective sample size of a correlation from the products of two series' autocorrelations, over the samples where both are
 * valid: n² / sum over all pairs of valid samples (s, t) of r1(s - t) r2(s - t), within 1 … n. Lags beyond those given count as
 * uncorrelated. Without gaps this is N / sum of r1 r2 (1 - |k| / N); a gap in an oversampled series costs less than its share.
 * Ref: Bretherton et al. 1999, the variance of a sum of products written out.
 */
export function effectiveSizeOverValid(valid: Uint8Array, first: Float64Array, second: Float64Array): number {
  let count = 0;
  for (const flag of valid) count += flag;
  let sum = count * first[0] * second[0];
  for (let lag = 1; lag < Math.min(first.length, second.length, valid.length); lag++) {
    let pairs = 0;
    for (let t = 0; t + lag < valid.length; t++) pairs += valid[t] & valid[t + lag];
    sum += 2 * pairs * first[lag] * second[lag];
  }
  return withinCount(count, (count * count) / sum);
}

function withinCount(count: number, size: number): number {
  return Math.min(count, Math.max(1, size));
}
