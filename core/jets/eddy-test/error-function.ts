const twoOverRootPi = 2 / Math.sqrt(Math.PI);

/**
 * The error function, to a few units in the last place: the series of positive terms below 3, the continued fraction of
 * its complement above. NaN in, NaN out. Ref: NIST DLMF 7.6.2 and 7.9.1.
 */
export function errorFunction(x: number): number {
  const size = Math.abs(x);
  if (size > 6) return Math.sign(x);
  const value = size < 3 ? series(size) : 1 - complement(size);
  return x < 0 ? -value : value;
}

function series(x: number): number {
  const twice = 2 * x * x;
  let term = x;
  let sum = x;
  for (let n = 3; term > 1e-17 * sum; n += 2) {
    term *= twice / n;
    sum += term;
  }
  return twoOverRootPi * Math.exp(-x * x) * sum;
}

/** 1 - erf(x) for x >= 3; from there 40 steps of the fraction are more than double precision needs. */
function complement(x: number): number {
  let fraction = x;
  for (let k = 40; k >= 1; k--) fraction = x + k / 2 / fraction;
  return (twoOverRootPi / 2) * (Math.exp(-x * x) / fraction);
}
