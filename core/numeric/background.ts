import { choleskyFactor, choleskySolve } from "./linear-solve";

export interface BackgroundTerms {
  readonly mean: boolean;
  readonly trend: boolean;
  readonly annual: boolean;
  readonly semiannual: boolean;
}

/** What the least squares fits: `values[term * samples + t]`. */
export interface BackgroundBasis {
  readonly names: readonly string[];
  /** 1 for terms that are taken off; the others are fitted beside them so that they do not leak into those. */
  readonly removed: Uint8Array;
  readonly samples: number;
  readonly values: Float64Array;
}

/**
 * Basis of the background at the days given: 1, time (scaled to -1 … 1 over the record), cos and sin of one and two cycles
 * a year (`yearDays` long, phase zero on day 0). The mean is fitted beside any other term, taken off or not: a season fitted to
 * a series with a mean would take part of it.
 */
export function backgroundBasis(days: Float64Array, terms: BackgroundTerms, yearDays: number): BackgroundBasis {
  const middle = (days[0] + days[days.length - 1]) / 2;
  const halfSpan = Math.max((days[days.length - 1] - days[0]) / 2, Number.MIN_VALUE);
  const yearly = (2 * Math.PI) / yearDays;
  const functions: [string, (day: number) => number][] = [];
  if (terms.mean || terms.trend || terms.annual || terms.semiannual) functions.push(["mean", () => 1]);
  if (terms.trend) functions.push(["trend", (day) => (day - middle) / halfSpan]);
  if (terms.annual) {
    functions.push(
      ["annual cosine", (day) => Math.cos(yearly * day)],
      ["annual sine", (day) => Math.sin(yearly * day)],
    );
  }
  if (terms.semiannual) {
    functions.push(
      ["semi-annual cosine", (day) => Math.cos(2 * yearly * day)],
      ["semi-annual sine", (day) => Math.sin(2 * yearly * day)],
    );
  }
  const values = new Float64Array(functions.length * days.length);
  functions.forEach(([, evaluate], term) => {
    values.set(days.map(evaluate), term * days.length);
  });
  const names = functions.map(([name]) => name);
  const removed = Uint8Array.from(names, (name) => (name === "mean" && !terms.mean ? 0 : 1));
  return { names, removed, samples: days.length, values };
}

/** Adds `sign` times the outer product of the basis at sample t to a normal matrix (terms × terms). */
export function addToNormal(normal: Float64Array, basis: BackgroundBasis, t: number, sign: 1 | -1): void {
  const terms = basis.names.length;
  for (let i = 0; i < terms; i++) {
    for (let j = 0; j < terms; j++) {
      normal[i * terms + j] += sign * basis.values[i * basis.samples + t] * basis.values[j * basis.samples + t];
    }
  }
}

/**
 * Least-squares coefficients of the background in a series with gaps (NaN), one a term; all NaN where the valid samples
 * cannot tell the terms apart. Solved by the normal equations, whose scaled basis keeps the condition number small.
 */
export function fitBackground(series: Float64Array, basis: BackgroundBasis): Float64Array {
  const terms = basis.names.length;
  const normal = new Float64Array(terms * terms);
  const right = new Float64Array(terms);
  let valid = 0;
  for (let t = 0; t < series.length; t++) {
    if (Number.isNaN(series[t])) continue;
    valid++;
    addToNormal(normal, basis, t, 1);
    for (let i = 0; i < terms; i++) right[i] += basis.values[i * basis.samples + t] * series[t];
  }
  return solveBackground(normal, right, valid);
}

/** Coefficients with those of terms that stay set to 0 (NaN where nothing could be fitted). */
export function removedCoefficients(coefficients: Float64Array, { removed }: BackgroundBasis): Float64Array {
  return coefficients.map((value, term) => (removed[term] ? value : value * 0));
}

/** Solves one cell's normal equations; NaN coefficients where there are fewer valid samples than terms or no unique answer. */
export function solveBackground(normal: Float64Array, right: Float64Array, valid: number): Float64Array {
  const terms = right.length;
  const factor = valid < terms ? null : choleskyFactor(normal, terms);
  return factor ? choleskySolve(factor, terms, right) : new Float64Array(terms).fill(Number.NaN);
}

/** Series minus the terms that are taken off; NaN stays NaN. With no terms, a copy. */
export function removeBackground(series: Float64Array, basis: BackgroundBasis): Float64Array {
  const coefficients = removedCoefficients(fitBackground(series, basis), basis);
  const out = Float64Array.from(series);
  for (let i = 0; i < coefficients.length; i++) {
    for (let t = 0; t < out.length; t++) out[t] -= coefficients[i] * basis.values[i * basis.samples + t];
  }
  return out;
}
