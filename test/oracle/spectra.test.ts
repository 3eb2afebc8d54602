import fc from "fast-check";
import { describe, test } from "vitest";
import { backgroundBasis, fitBackground, removeBackground } from "../../core/numeric/background";
import { fourierTransform } from "../../core/numeric/fourier";
import { welchSpectrum } from "../../core/numeric/welch";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

interface WelchReference {
  readonly stepDays: number;
  readonly heightMetres: number[][];
  readonly spectra: {
    readonly segmentLength: number;
    readonly segments: number;
    readonly detrend: "constant" | "linear";
    readonly frequencyPerDay: number[];
    readonly density: number[];
  }[];
}

describe("Welch spectra against scipy.signal.welch", () => {
  const reference = referenceJson<WelchReference>("welch");
  test.each(reference.spectra.map((each) => [each.segmentLength, each.detrend, each] as const))(
    "segments of %i, %s taken off",
    (segment, detrend, each) => {
      const spectra = reference.heightMetres.map((series) =>
        welchSpectrum(Float64Array.from(series), reference.stepDays, { segment, overlap: 0.5, detrend }),
      );
      const mean = spectra[0].density.map(
        (_, k) => spectra.reduce((sum, { density }) => sum + density[k], 0) / spectra.length,
      );
      const close = { relative: 1e-9, because: "the bound asked of a spectrum; transforms round differently" };
      expectAllClose(spectra[0].frequency, each.frequencyPerDay, close, "frequency");
      expectAllClose(mean, each.density, close, "density");
      expectClose(spectra[0].segments, each.segments, { absolute: 0, because: "a count" });
    },
  );

  test("the integral of a spectrum is the variance: a 5 cm sine gives 0.00125 m²", () => {
    const length = 1024;
    const sine = Float64Array.from({ length }, (_, i) => 0.05 * Math.sin((2 * Math.PI * 32 * i) / length));
    const { density, frequency } = welchSpectrum(sine, 6.2, { segment: length, overlap: 0.5, detrend: "constant" });
    const integral = density.reduce((sum, value) => sum + value, 0) * frequency[1];
    expectClose(integral, 0.00125, { relative: 1e-9, because: "the window's power is divided out exactly" });
  });
});

describe("the transform of any length", () => {
  test("equals the sum that defines it", () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 1, maxLength: 40 }), (values) => {
        const n = values.length;
        const { real, imaginary } = fourierTransform(Float64Array.from(values));
        for (let k = 0; k < n; k++) {
          let [a, b] = [0, 0];
          values.forEach((value, j) => {
            a += value * Math.cos((2 * Math.PI * j * k) / n);
            b -= value * Math.sin((2 * Math.PI * j * k) / n);
          });
          const close = { absolute: 1e-12 * n, because: "float64 rounding of n terms" };
          expectClose(real[k], a, close, `real ${k} of ${n}`);
          expectClose(imaginary[k], b, close, `imaginary ${k} of ${n}`);
        }
      }),
    );
  });

  test("keeps energy on a long prime length", () => {
    const length = 10007;
    const series = Float64Array.from({ length }, (_, i) => Math.sin(i * i * 0.37));
    const { real, imaginary } = fourierTransform(series);
    const power = real.reduce((sum, value, k) => sum + value * value + imaginary[k] * imaginary[k], 0) / length;
    const variance = series.reduce((sum, value) => sum + value * value, 0);
    expectClose(power, variance, { relative: 1e-12, because: "Parseval in float64" });
  });
});

interface BackgroundReference {
  readonly yearDays: number;
  readonly fits: {
    readonly name: string;
    readonly timeDays: number[];
    readonly input: (number | null)[];
    readonly withTrend: boolean;
    readonly harmonics: number;
    readonly trendPerDay: number | null;
    readonly cosine: number[];
    readonly sine: number[];
    readonly residual: (number | null)[];
  }[];
}

describe("the background against numpy.linalg.lstsq", () => {
  const { fits, yearDays } = referenceJson<BackgroundReference>("background");
  test.each(fits.map((each) => [each.name, each] as const))("%s", (_, each) => {
    const days = Float64Array.from(each.timeDays);
    const terms = { mean: true, trend: each.withTrend, annual: true, semiannual: each.harmonics === 2 };
    const basis = backgroundBasis(days, terms, yearDays);
    const series = withNaN(each.input);
    const close = { relative: 1e-9, because: "normal equations of a scaled basis lose a few digits" };
    expectAllClose(removeBackground(series, basis), each.residual, close, "residual");
    const coefficients = fitBackground(series, basis);
    const value = (name: string) => coefficients[basis.names.indexOf(name)];
    expectClose(value("annual cosine"), each.cosine[0], { absolute: 1e-11, because: "same" }, "cosine");
    expectClose(value("annual sine"), each.sine[0], { absolute: 1e-11, because: "same" }, "sine");
    if (each.withTrend) {
      const halfSpan = (days[days.length - 1] - days[0]) / 2;
      expectClose(
        value("trend") / halfSpan,
        each.trendPerDay ?? Number.NaN,
        { relative: 1e-9, because: "same" },
        "trend",
      );
    }
  });
});

test("a season alone leaves the mean and takes nothing of it, though the record is no whole number of years", () => {
  const days = Float64Array.from({ length: 300 }, (_, t) => 22000 + 3 * t);
  const basis = backgroundBasis(days, { mean: false, trend: false, annual: true, semiannual: true }, 365.2425);
  const series = days.map((day) => 5 + 0.3 * Math.cos((2 * Math.PI * day) / 365.2425));
  expectAllClose(removeBackground(series, basis), new Float64Array(300).fill(5), {
    absolute: 1e-11,
    because: "the series is exactly a mean and a season",
  });
});
