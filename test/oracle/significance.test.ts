import { describe, expect, test } from "vitest";
import {
  chiSquaredQuantile,
  incompleteGamma,
  normalCumulative,
  normalQuantile,
  studentTwoSided,
} from "../../core/numeric/distributions";
import { autocorrelation, effectiveSizeFromLags, meanAndDeviation } from "../../core/numeric/serial-correlation";
import { redNoiseDensity, redNoiseSpectrum, redNoiseThreshold } from "../../core/numeric/spectra/red-noise";
import { blockLength } from "../../core/numeric/statistics/block-bootstrap";
import {
  correlationInterval,
  correlationPValue,
  criticalCorrelation,
  pearsonCorrelation,
  testedCorrelation,
} from "../../core/numeric/statistics/correlation";
import {
  effectiveSizeOfBand,
  effectiveSizeOfCorrelation,
  effectiveSizeOfVariance,
} from "../../core/numeric/statistics/effective-size";
import { falseDiscovery } from "../../core/numeric/statistics/false-discovery";
import { randomStream } from "../../core/numeric/statistics/random";
import { theilSenLine } from "../../core/numeric/statistics/theil-sen";
import { eFoldingTime, integralTimeScale } from "../../core/numeric/statistics/time-scales";
import { welchSpectrum } from "../../core/numeric/welch";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson } from "../reference-json";

interface Reference {
  readonly serialCorrelation: {
    readonly a: number[];
    readonly b: number[];
    readonly lagOneA: number;
    readonly lagOneB: number;
    readonly correlation: number;
    readonly effectiveNumberCorrelation: number;
    readonly correlationPValue: number;
    readonly lags: number;
    readonly effectiveNumberLagProductTriangular: number;
  }[];
  readonly criticalCorrelation: { readonly effectiveNumber: number; readonly critical95: number }[];
  readonly blockLengths: { readonly count: number; readonly lagOne: number; readonly length: number }[];
  readonly falseDiscovery: { readonly pValues: number[]; readonly alpha: number; readonly rejections: number }[];
  readonly redNoise: {
    readonly lagOne: number;
    readonly count: number;
    readonly power: number[];
    readonly ratio95: number;
    readonly ratio99: number;
  }[];
  readonly theilSen: {
    readonly time: number[];
    readonly input: number[];
    readonly slope: number;
    readonly intercept: number;
    readonly low95: number;
    readonly high95: number;
  }[];
  readonly quantiles: {
    readonly studentTwoSidedP: { readonly t: number; readonly degreesOfFreedom: number; readonly p: number }[];
    readonly chiSquared: { readonly degreesOfFreedom: number[]; readonly quantile: Record<string, number[]> };
    readonly normal: { readonly probability: number[]; readonly quantile: number[] };
    readonly incompleteGamma: [number, number, number][];
  };
  readonly certified: {
    readonly name: string;
    readonly count: number;
    readonly firstThree: number[];
    readonly mean: number;
    readonly standardDeviation: number;
    readonly lagOne: number;
  }[];
}

const reference = referenceJson<Reference>("statistics-reference");
const sums = { relative: 1e-10, because: "float64 sums" };

describe("distributions against scipy", () => {
  const { studentTwoSidedP, chiSquared, normal, incompleteGamma: gammas } = reference.quantiles;

  test("two-sided p values keep their digits where they are tiny", () => {
    for (const { t, degreesOfFreedom, p } of studentTwoSidedP) {
      expectClose(studentTwoSided(t, degreesOfFreedom), p, { relative: 1e-10, because: "Lanczos gamma" }, `${t}`);
    }
  });

  test("chi-squared quantiles", () => {
    for (const [probability, wanted] of Object.entries(chiSquared.quantile)) {
      chiSquared.degreesOfFreedom.forEach((degrees, i) => {
        const got = chiSquaredQuantile(Number(probability), degrees);
        expectClose(got, wanted[i], { relative: 1e-10, because: "Lanczos gamma" }, `${probability}, ${degrees}`);
      });
    }
    expect(chiSquaredQuantile(0.5, 0)).toBeNaN();
    expect(chiSquaredQuantile(1, 3)).toBeNaN();
  });

  test("two degrees of freedom have the closed form -2 ln(1 - p)", () => {
    for (const p of [1e-9, 0.3, 0.9, 1 - 1e-9]) {
      const close = { relative: 1e-13, because: "float64, its input's rounding aside" };
      expectClose(chiSquaredQuantile(p, 2), -2 * Math.log1p(-p), close, `${p}`);
    }
  });

  test("normal quantiles and their inverse, both tails", () => {
    normal.probability.forEach((p, i) => {
      expectClose(normalQuantile(p), normal.quantile[i], { absolute: 1e-10, because: "1 - 1e-6 is rounded" }, `${p}`);
      expectClose(normalCumulative(normalQuantile(p)), p, { relative: 1e-12, because: "inverse" }, `${p}`);
    });
    expect(normalQuantile(0)).toBeNaN();
  });

  test("the incomplete gamma function, both its parts", () => {
    for (const [a, x, wanted] of gammas) {
      const { lower, upper } = incompleteGamma(a, x);
      const close = { relative: 1e-10, absolute: 1e-14, because: "Lanczos gamma" };
      expectClose(lower, wanted, close, `${a}, ${x}`);
      expectClose(lower + upper, 1, { relative: 1e-14, because: "they are complements" });
    }
    expect(incompleteGamma(2, 0)).toEqual({ lower: 0, upper: 1 });
    expect(incompleteGamma(2, Number.POSITIVE_INFINITY)).toEqual({ lower: 1, upper: 0 });
  });
});

describe("correlation under serial correlation, against scipy", () => {
  test.each(reference.serialCorrelation.map((each, i) => [i, each] as const))("pair %i", (_, each) => {
    const [a, b] = [Float64Array.from(each.a), Float64Array.from(each.b)];
    const { correlation, count } = pearsonCorrelation(a, b);
    expectClose(correlation, each.correlation, sums, "correlation");
    const size = effectiveSizeOfCorrelation(count, each.lagOneA, each.lagOneB);
    expectClose(size, Math.min(count, each.effectiveNumberCorrelation), sums, "effective size");
    if (size < count) expectClose(correlationPValue(correlation, size), each.correlationPValue, sums, "p value");
    const tested = testedCorrelation(a, b, 0.95, each.lags);
    const lags = Math.min(count, each.effectiveNumberLagProductTriangular);
    expectClose(tested.effectiveSize, lags, sums, "from lag products");
    expectClose(tested.correlation, each.correlation, sums, "tested correlation");
  });

  test("the critical correlations, .1918 for r = .9 and N = 1000 among them", () => {
    for (const { effectiveNumber, critical95 } of reference.criticalCorrelation) {
      const close = { relative: 1e-8, because: "scipy 1.10's quantile" };
      expectClose(criticalCorrelation(effectiveNumber), critical95, close, `${effectiveNumber}`);
      expectClose(correlationPValue(criticalCorrelation(effectiveNumber), effectiveNumber), 0.05, sums, "inverse");
    }
    const size = effectiveSizeOfCorrelation(1000, 0.9, 0.9);
    expectClose(size, 104.97, { absolute: 0.005, because: "printed digits" });
    expectClose(criticalCorrelation(size), 0.1918, { absolute: 5e-5, because: "printed digits" });
    expectClose(effectiveSizeOfVariance(1000, 0.9), size, sums, "the variance of one series is the same sum");
  });

  test("Fisher's limits enclose the estimate and are symmetric in atanh", () => {
    const { low, high } = correlationInterval(0.6, 28);
    const half = 1.959963984540054 / 5;
    expectClose(Math.atanh(high) - Math.atanh(0.6), half, sums);
    expectClose(Math.atanh(0.6) - Math.atanh(low), half, sums);
    expect(correlationInterval(0.6, 3)).toEqual({ low: -1, high: 1 });
    expect(correlationInterval(Number.NaN, 30).low).toBeNaN();
  });

  test("gaps are left out in pairs, and a constant has no correlation", () => {
    const a = Float64Array.of(1, 2, Number.NaN, 4, 9, 7);
    const b = Float64Array.of(2, 1, 5, 3, Number.NaN, 8);
    const kept = pearsonCorrelation(Float64Array.of(1, 2, 4, 7), Float64Array.of(2, 1, 3, 8));
    expect(pearsonCorrelation(a, b)).toEqual(kept);
    expect(pearsonCorrelation(a, new Float64Array(6).fill(2)).correlation).toBeNaN();
    expect(correlationPValue(0.4, 2)).toBeNaN();
    expect(correlationPValue(1, 9)).toBe(0);
  });

  test("AR(1) lag products give the closed form, ideal bands 2BT: 189 for 90-540 days in 28 years", () => {
    const decay = Float64Array.from({ length: 4000 }, (_, k) => 0.9 ** k);
    const size = effectiveSizeFromLags(1e6, decay, decay);
    const close = { relative: 1e-4, because: "the triangle of 1 - |k|/N, of order of the time scale over N" };
    expectClose(size, effectiveSizeOfCorrelation(1e6, 0.9, 0.9), close);
    expectClose(effectiveSizeOfBand(90, 540, 28 * 365.25), 189, { absolute: 0.5, because: "printed digits" });
    expectClose(effectiveSizeOfBand(90, Number.POSITIVE_INFINITY, 900), 20, sums, "low-pass");
  });
});

describe("red noise", () => {
  test.each(reference.redNoise.map((each) => [each.lagOne, each.count, each] as const))(
    "r = %f, %i samples, against numpy",
    (r, count, { power, ratio95, ratio99 }) => {
      const frequency = Float64Array.from({ length: Math.floor(count / 2) + 1 }, (_, k) => k / count);
      expectAllClose(redNoiseSpectrum(r, frequency), power, { relative: 1e-12, because: "one cosine" });
      expectClose(redNoiseThreshold(2), ratio95, sums, "95 %");
      expectClose(redNoiseThreshold(2, 0.01), ratio99, sums, "99 %");
    },
  );

  test("the periodogram of red noise passes its threshold at one bin in twenty", () => {
    const [records, count, r] = [150, 257, 0.5];
    let [passed, tested] = [0, 0];
    for (let record = 0; record < records; record++) {
      const random = randomStream(1963, record);
      let last = random.normal() / Math.sqrt(1 - r * r);
      const series = Float64Array.from({ length: count }, () => {
        last = r * last + random.normal();
        return last;
      });
      const settings = { segment: count, overlap: 0, detrend: "constant", taper: { kind: "boxcar" } } as const;
      const { frequency, density, degreesOfFreedom } = welchSpectrum(series, 7, settings);
      const noise = redNoiseDensity(r, 1 / (1 - r * r), frequency, 7);
      const factor = redNoiseThreshold(degreesOfFreedom);
      for (let k = 2; k < density.length; k++) {
        tested++;
        if (density[k] > factor * noise[k]) passed++;
      }
    }
    expectClose(passed / tested, 0.05, { absolute: 0.006, because: "19 050 bins have 0.16 %, leakage adds a little" });
  });

  test("a search over m bins of white noise passes its threshold in one record of twenty", () => {
    // For two degrees of freedom the largest of m estimates stays below x with probability (1 - exp(-x))^m.
    const bins = 150;
    const passed = 1 - (1 - Math.exp(-redNoiseThreshold(2, 0.05, bins))) ** bins;
    expectClose(passed, 0.05, { absolute: 0.0015, because: "1 - .05/m is Bonferroni's bound of the exact power" });
  });
});

describe("time scales", () => {
  const decay = Float64Array.from({ length: 600 }, (_, k) => 0.9 ** k);

  test("AR(1) of r = .9 has an integral scale of 19 steps and falls to 1/e after 9.491", () => {
    expectClose(integralTimeScale(decay, 7), 19 * 7, { relative: 1e-12, because: "geometric sum" });
    expectClose(eFoldingTime(decay, 7) / 7, -1 / Math.log(0.9), { relative: 1e-12, because: "exact for AR(1)" });
    expectClose(eFoldingTime(decay, 1), 9.491, { absolute: 5e-4, because: "printed digits" });
  });

  test("the sum stops at the first zero crossing, and what never falls has no e-folding time", () => {
    expectClose(integralTimeScale([1, 0.5, 0, 0.9], 2), 4, sums);
    expectClose(integralTimeScale([1, 0.5, -0.1, 0.9], 2), 4, sums);
    expect(eFoldingTime([1, 0.9, 0.8], 1)).toBe(Number.POSITIVE_INFINITY);
    expectClose(eFoldingTime([1, -1], 1), (1 - Math.exp(-1)) / 2, sums, "straight line through zero");
    expect(integralTimeScale([Number.NaN, 0.2], 1)).toBeNaN();
  });
});

describe("false discovery", () => {
  test.each(reference.falseDiscovery.map((each) => [each.pValues.length, each.alpha, each.rejections, each] as const))(
    "%i p values at %f: %i rejections, land ignored",
    (_, alpha, rejections, { pValues }) => {
      const field = Float64Array.from([Number.NaN, ...pValues, Number.NaN, Number.NaN]);
      const found = falseDiscovery(field, alpha);
      expect([found.rejections, found.tests]).toEqual([rejections, pValues.length]);
      expect(found.rejected.reduce((sum, flag) => sum + flag, 0)).toBe(rejections);
      expect(found.rejected[0]).toBe(0);
    },
  );

  test("nothing but land rejects nothing", () => {
    const found = falseDiscovery(new Float64Array(4).fill(Number.NaN), 0.05);
    expect([found.rejections, found.tests, found.threshold]).toEqual([0, 0, 0]);
  });
});

describe("block lengths and robust slopes", () => {
  test("Wilks's block lengths, 74.77 for r = .9 and N = 1000 among them", () => {
    for (const { count, lagOne, length } of reference.blockLengths) {
      expectClose(blockLength(count, lagOne), length, sums, `${count}, ${lagOne}`);
    }
    expectClose(blockLength(1000, 0.9), 74.77, { absolute: 0.005, because: "printed digits" });
    expect(blockLength(100, -0.2)).toBe(1);
  });

  test.each(reference.theilSen.map((each, i) => [i, each] as const))("Theil-Sen case %i equals scipy's", (_, each) => {
    const [time, input] = [Float64Array.from(each.time), Float64Array.from(each.input)];
    const got = theilSenLine(time, input);
    const close = { relative: 1e-12, absolute: 1e-15, because: "the same pair of samples" };
    expectClose(got.slope, each.slope, close, "slope");
    expectClose(got.intercept, each.intercept, close, "intercept");
    expectClose(got.low, each.low95, close, "low");
    expectClose(got.high, each.high95, close, "high");
    const gappy = theilSenLine(Float64Array.from([...time, 5]), Float64Array.from([...input, Number.NaN]));
    expect(gappy).toEqual(got);
    const wider = theilSenLine(time, input, 0.95, time.length / 3);
    expect(wider.slope).toBe(got.slope);
    expect(wider.low).toBeLessThanOrEqual(got.low);
    expect(wider.high).toBeGreaterThanOrEqual(got.high);
  });

  test("no pair at unlike positions has no slope", () => {
    expect(theilSenLine(Float64Array.of(1, 1), Float64Array.of(2, 5)).slope).toBeNaN();
    expect(theilSenLine(Float64Array.of(1), Float64Array.of(2)).low).toBeNaN();
  });
});

describe("certified sets of the NIST StRD", () => {
  test.each(reference.certified.map((each) => [each.name, each] as const))("%s", (_, each) => {
    const [first, low, high] = each.firstThree;
    const series = Float64Array.from({ length: each.count }, (_, i) => (i === 0 ? first : i % 2 === 1 ? low : high));
    const { mean, deviation } = meanAndDeviation(series);
    expectClose(mean, each.mean, { relative: 1e-14, because: "the values themselves are rounded to 1e-16" }, "mean");
    const because = "1e7 + 0.2 is stored to 1e-9, the spread of 0.1 to 1e-8";
    expectClose(deviation, each.standardDeviation, { relative: 1e-8, because }, "deviation");
    expectClose(autocorrelation(series, 1)[1], each.lagOne, { relative: 1e-8, because }, "lag one");
  });
});
