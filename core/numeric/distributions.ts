/** Natural logarithm of the gamma function for x > 0. Ref: Lanczos 1964, SIAM J. Numer. Anal. B 1, 86-96 (g = 7, 9 terms). */
export function logGamma(x: number): number {
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  const coefficients = [
    0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
    12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
  ];
  const shifted = x - 1;
  let sum = coefficients[0];
  for (let i = 1; i < coefficients.length; i++) sum += coefficients[i] / (shifted + i);
  const base = shifted + 7.5;
  return 0.5 * Math.log(2 * Math.PI) + (shifted + 0.5) * Math.log(base) - base + Math.log(sum);
}

/** Regularised incomplete beta function I_x(a, b), 0 <= x <= 1, by Lentz's continued fraction. Ref: NIST DLMF 8.17.22. */
export function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  if (x > (a + 1) / (a + b + 2)) return 1 - incompleteBeta(1 - x, b, a);
  const logFront = logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x);
  const tiny = 1e-300;
  let c = 1;
  let d = 1 - ((a + b) * x) / (a + 1);
  d = 1 / (Math.abs(d) < tiny ? tiny : d);
  let fraction = d;
  for (let m = 1; m <= 500; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    let change = 1;
    for (const term of [even, odd]) {
      d = 1 + term * d;
      d = 1 / (Math.abs(d) < tiny ? tiny : d);
      c = 1 + term / c;
      if (Math.abs(c) < tiny) c = tiny;
      change = c * d;
      fraction *= change;
    }
    if (Math.abs(change - 1) < 1e-15) break;
  }
  return (Math.exp(logFront) * fraction) / a;
}

/** Probability that Student's t with (possibly fractional) degrees of freedom is below `value`. */
export function studentCumulative(value: number, degrees: number): number {
  const tail = incompleteBeta(degrees / (degrees + value * value), degrees / 2, 0.5) / 2;
  return value > 0 ? 1 - tail : tail;
}

/** Quantile of Student's t for a probability in (0, 1); NaN for degrees of freedom that are not positive. */
export function studentQuantile(probability: number, degrees: number): number {
  if (!(degrees > 0) || !(probability > 0 && probability < 1)) return Number.NaN;
  if (probability < 0.5) return -studentQuantile(1 - probability, degrees);
  let low = 0;
  let high = 1;
  while (studentCumulative(high, degrees) < probability && high < 1e150) high *= 2;
  for (let i = 0; i < 200 && high - low > 1e-14 * high; i++) {
    const middle = (low + high) / 2;
    if (studentCumulative(middle, degrees) < probability) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
