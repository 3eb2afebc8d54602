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

/** Probability that |t| is at least |value|: the two-sided p value, kept accurate where it is tiny. */
export function studentTwoSided(value: number, degrees: number): number {
  return incompleteBeta(degrees / (degrees + value * value), degrees / 2, 0.5);
}

/** Quantile of Student's t for a probability in (0, 1); NaN for degrees of freedom that are not positive. */
export function studentQuantile(probability: number, degrees: number): number {
  if (!(degrees > 0) || !(probability > 0 && probability < 1)) return Number.NaN;
  if (probability < 0.5) return -studentQuantile(1 - probability, degrees);
  return risingRoot((value) => studentCumulative(value, degrees) - probability);
}

/**
 * Regularised incomplete gamma functions P(a, x) and Q(a, x) = 1 - P, each accurate where it is small, for a > 0 and x >= 0.
 * Ref: NIST DLMF 8.11.4 (series) and 8.9.2 (continued fraction, by Lentz's method).
 */
export function incompleteGamma(a: number, x: number): { readonly lower: number; readonly upper: number } {
  if (x <= 0) return { lower: 0, upper: 1 };
  if (x === Number.POSITIVE_INFINITY) return { lower: 1, upper: 0 };
  const front = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (x < a + 1) {
    let term = 1 / a;
    let sum = term;
    for (let n = 1; n <= 10000 && term > 1e-17 * sum; n++) {
      term *= x / (a + n);
      sum += term;
    }
    const lower = Math.min(1, front * sum);
    return { lower, upper: 1 - lower };
  }
  let denominator = x + 1 - a;
  let c = 1e300;
  let d = 1 / denominator;
  let fraction = d;
  for (let n = 1; n <= 10000; n++) {
    const numerator = -n * (n - a);
    denominator += 2;
    d = 1 / (numerator * d + denominator);
    c = denominator + numerator / c;
    fraction *= c * d;
    if (Math.abs(c * d - 1) < 1e-16) break;
  }
  const upper = Math.min(1, front * fraction);
  return { lower: 1 - upper, upper };
}

/** Quantile of chi-squared for a probability in (0, 1); NaN for degrees of freedom that are not positive. */
export function chiSquaredQuantile(probability: number, degrees: number): number {
  if (!(degrees > 0) || !(probability > 0 && probability < 1)) return Number.NaN;
  return risingRoot((value) => {
    const { lower, upper } = incompleteGamma(degrees / 2, value / 2);
    return probability < 0.5 ? lower - probability : 1 - probability - upper;
  });
}

/** Probability that a standard normal variable is below `value`, accurate in both tails. */
export function normalCumulative(value: number): number {
  const { lower, upper } = incompleteGamma(0.5, (value * value) / 2);
  return value < 0 ? upper / 2 : 0.5 + lower / 2;
}

/** Quantile of the standard normal distribution for a probability in (0, 1); NaN outside. */
export function normalQuantile(probability: number): number {
  if (!(probability > 0 && probability < 1)) return Number.NaN;
  if (probability === 0.5) return 0;
  if (probability > 0.5) return -normalQuantile(1 - probability);
  return -risingRoot((value) => probability - normalCumulative(-value));
}

/** Positive root of a rising function by halving, to the last digits of float64. */
function risingRoot(difference: (value: number) => number): number {
  let low = 0;
  let high = 1;
  while (difference(high) < 0 && high < 1e150) high *= 2;
  for (let i = 0; i < 1100 && high - low > 1e-15 * high; i++) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (difference(middle) < 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
