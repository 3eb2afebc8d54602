import { describe, test } from "vitest";
import { incompleteBeta, logGamma, studentCumulative, studentQuantile } from "../../core/numeric/distributions";
import { autocorrelation, effectiveSizeOfMean, meanAndDeviation } from "../../core/numeric/serial-correlation";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

interface Reference {
  readonly serialCorrelation: {
    readonly a: number[];
    readonly mean: number;
    readonly standardDeviation: number;
    readonly lagOneA: number;
    readonly effectiveNumberMean: number;
    readonly meanHalfWidth95: number;
    readonly lags: number;
    readonly autocorrelationA: number[];
    readonly gappyA: (number | null)[];
    readonly gappyLagOneOfPairs: number;
  }[];
  readonly quantiles: {
    readonly studentWhole: { readonly degreesOfFreedom: number[]; readonly quantile: Record<string, number[]> };
    readonly studentFractional: { readonly degreesOfFreedom: number[]; readonly quantile: Record<string, number[]> };
    readonly studentTwoSidedP: { readonly t: number; readonly degreesOfFreedom: number; readonly p: number }[];
    readonly incompleteBeta: [number, number, number, number][];
    readonly logGamma: [number, number][];
  };
}

const reference = referenceJson<Reference>("statistics-reference");

describe("distributions against scipy.stats and scipy.special", () => {
  const {
    studentWhole,
    studentFractional,
    studentTwoSidedP,
    incompleteBeta: betas,
    logGamma: gammas,
  } = reference.quantiles;

  test.each([
    ["whole", studentWhole],
    ["fractional", studentFractional],
  ] as const)("Student's t quantiles for %s degrees of freedom", (_, table) => {
    for (const [probability, wanted] of Object.entries(table.quantile)) {
      table.degreesOfFreedom.forEach((degrees, i) => {
        const close = {
          relative: 1e-8,
          because: "scipy 1.10's own quantiles are off by up to 3e-9; see four degrees below",
        };
        expectClose(studentQuantile(Number(probability), degrees), wanted[i], close, `${probability}, ${degrees}`);
      });
    }
  });

  test("the quantile for four degrees of freedom satisfies the closed form of its distribution", () => {
    const t = studentQuantile(0.95, 4);
    const ratio = (t * t) / 4 / (1 + (t * t) / 4);
    const cumulative = 0.5 + 0.375 * (t / Math.sqrt(1 + (t * t) / 4)) * (1 - ratio / 3);
    expectClose(cumulative, 0.95, { absolute: 1e-14, because: "float64 rounding" });
  });

  test("two-sided probabilities of Student's t", () => {
    for (const { t, degreesOfFreedom, p } of studentTwoSidedP) {
      const got = 2 * (1 - studentCumulative(t, degreesOfFreedom));
      expectClose(got, p, { absolute: 1e-12, because: "float64 near one" });
    }
  });

  test("the incomplete beta function and the logarithm of the gamma function", () => {
    for (const [a, b, x, wanted] of betas) {
      expectClose(incompleteBeta(x, a, b), wanted, {
        relative: 1e-10,
        absolute: 1e-14,
        because: "Lanczos gamma, 15 digits",
      });
    }
    for (const [x, wanted] of gammas)
      expectClose(logGamma(x), wanted, { relative: 1e-12, absolute: 1e-12, because: "same" });
  });
});

describe("serial correlation against numpy", () => {
  test.each(reference.serialCorrelation.map((each, i) => [i, each] as const))("series %i", (_, each) => {
    const series = Float64Array.from(each.a);
    const { mean, deviation, count } = meanAndDeviation(series);
    const close = { relative: 1e-9, absolute: 1e-13, because: "float64 sums" };
    expectClose(mean, each.mean, close, "mean");
    expectClose(deviation, each.standardDeviation, close, "deviation");
    const lags = autocorrelation(series, each.lags);
    expectAllClose(lags.subarray(1), each.autocorrelationA, { absolute: 1e-12, because: "float64 sums" }, "lags");
    const size = effectiveSizeOfMean(count, lags[1]);
    expectClose(size, Math.min(count, each.effectiveNumberMean), close, "effective size (Leith 1973)");
    if (size < count) {
      const half = (studentQuantile(0.975, size - 1) * deviation) / Math.sqrt(size);
      expectClose(half, each.meanHalfWidth95, { relative: 1e-8, because: "scipy 1.10's quantile" }, "half width");
    }
    const gappy = autocorrelation(withNaN(each.gappyA), 1)[1];
    const share = (each.gappyA.length - 1) / each.gappyA.length;
    expectClose(gappy / share, each.gappyLagOneOfPairs, close, "lag one with gaps");
  });

  test("r = 0.9 and N = 1000 leave 52.63 samples for a mean (Leith 1973)", () => {
    expectClose(effectiveSizeOfMean(1000, 0.9), 52.63157894736839, { relative: 1e-12, because: "closed form" });
  });
});
