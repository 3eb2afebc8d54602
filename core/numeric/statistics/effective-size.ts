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

function withinCount(count: number, size: number): number {
  return Math.min(count, Math.max(1, size));
}
