import { describe, expect, test } from "vitest";
import { fourierTransform, inverseFourierTransform } from "../../../../core/numeric/fourier";
import { effectiveSizeOfMean } from "../../../../core/numeric/serial-correlation";
import {
  blockIndices,
  blockLength,
  bootstrapStatistics,
  percentileInterval,
} from "../../../../core/numeric/statistics/block-bootstrap";
import { phaseSurrogate, randomPhases } from "../../../../core/numeric/statistics/phase-surrogates";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { expectAllClose, expectClose } from "../../../expect-close";

function redNoise(count: number, r: number, seed: number): Float64Array {
  const random = randomStream(seed);
  const out = new Float64Array(count);
  out[0] = random.normal() / Math.sqrt(1 - r * r);
  for (let t = 1; t < count; t++) out[t] = r * out[t - 1] + random.normal();
  return out;
}

function meanAt(series: Float64Array): (indices: Int32Array) => number {
  return (indices) => indices.reduce((sum, index) => sum + series[index], 0) / indices.length;
}

describe("moving blocks", () => {
  test("are runs of neighbours inside the record, the last one cut", () => {
    const indices = blockIndices(103, 10, randomStream(1));
    expect(indices.length).toBe(103);
    for (let i = 0; i < 103; i++) {
      expect(indices[i]).toBeGreaterThanOrEqual(0);
      expect(indices[i]).toBeLessThan(103);
      if (i % 10 > 0) expect(indices[i]).toBe(indices[i - 1] + 1);
    }
    expect(blockIndices(20, 99, randomStream(1))).toEqual(Int32Array.from({ length: 20 }, (_, i) => i));
  });

  test("resamples do not depend on how they are shared out", () => {
    const settings = { block: 8, resamples: 50, seed: 3 };
    const statistic = meanAt(redNoise(200, 0.7, 5));
    const whole = bootstrapStatistics(200, statistic, settings);
    const parts = [
      bootstrapStatistics(200, statistic, settings, 0, 17),
      bootstrapStatistics(200, statistic, settings, 17),
    ];
    expect([...parts[0], ...parts[1]]).toEqual([...whole]);
  });

  test("the spread of a red-noise mean is within a fifth of sigma / sqrt(N_eff), single samples leave out two thirds", () => {
    const [count, r] = [1000, 0.8];
    const wanted = 1 / Math.sqrt(1 - r * r) / Math.sqrt(effectiveSizeOfMean(count, r));
    const spread = (block: number) => {
      let sum = 0;
      for (let record = 0; record < 10; record++) {
        const series = redNoise(count, r, 40 + record);
        const means = bootstrapStatistics(count, meanAt(series), { block, resamples: 200, seed: record });
        const middle = means.reduce((a, b) => a + b) / means.length;
        sum += means.reduce((a, b) => a + (b - middle) ** 2, 0) / (means.length - 1);
      }
      return Math.sqrt(sum / 10);
    };
    const because = "ten records; blocks cut the correlation at their ends, some 5 to 10 % low";
    expectClose(spread(blockLength(count, r)) / wanted, 1, { absolute: 0.2, because });
    expectClose(spread(1) / wanted, 1 / 3, { absolute: 0.05, because: "sqrt((1 - r) / (1 + r)) is a third" });
  });

  test("percentiles interpolate between order statistics and leave NaN out", () => {
    const values = Float64Array.of(5, Number.NaN, 1, 2, 4, 3);
    const { low, high } = percentileInterval(values, 0.5);
    expect([low, high]).toEqual([2, 4]);
    expectClose(percentileInterval(values, 0.95).low, 1.1, { relative: 1e-12, because: "0.025 of four steps" });
    expect(percentileInterval(Float64Array.of(7)).high).toBe(7);
    expect(percentileInterval(new Float64Array(0)).low).toBeNaN();
  });
});

describe("phase-randomised surrogates", () => {
  test.each([64, 97, 100])("of %i samples keep periodogram and mean, and are not the series", (count) => {
    const series = redNoise(count, 0.9, 2).map((value) => value + 3);
    const surrogate = phaseSurrogate(series, randomPhases(count, randomStream(6)));
    const power = (values: Float64Array) => {
      const { real, imaginary } = fourierTransform(values);
      return real.map((value, k) => value * value + imaginary[k] * imaginary[k]);
    };
    expectAllClose(power(surrogate), power(series), { relative: 1e-10, because: "the bound asked" }, "periodogram");
    const difference = surrogate.map((value, t) => (value - series[t]) ** 2);
    expect(difference.reduce((a, b) => Math.max(a, b))).toBeGreaterThan(0.5);
  });

  test("the same phases at two points keep their cross-spectrum, and so every lagged covariance", () => {
    const count = 90;
    const phases = randomPhases(count, randomStream(8));
    const points = [redNoise(count, 0.8, 3), redNoise(count, 0.8, 4)];
    const [a, b] = points.map((series) => fourierTransform(series));
    const [c, d] = points.map((series) => fourierTransform(phaseSurrogate(series, phases)));
    const cross = (x: typeof a, y: typeof a) => [
      x.real.map((value, k) => value * y.real[k] + x.imaginary[k] * y.imaginary[k]),
      x.imaginary.map((value, k) => value * y.real[k] - x.real[k] * y.imaginary[k]),
    ];
    const close = { relative: 1e-10, because: "two transforms" };
    expectAllClose(cross(c, d)[0], cross(a, b)[0], close, "in phase");
    expectAllClose(cross(c, d)[1], cross(a, b)[1], close, "in quadrature");
  });

  test("no phase turns leave the series as it is; a gap makes all NaN", () => {
    const series = redNoise(33, 0.5, 1);
    expectAllClose(phaseSurrogate(series, new Float64Array(16)), series, {
      relative: 1e-13,
      because: "there and back",
    });
    series[4] = Number.NaN;
    expect(phaseSurrogate(series, randomPhases(33, randomStream(1))).every(Number.isNaN)).toBe(true);
  });

  test("the inverse transform undoes the transform of complex values", () => {
    for (const count of [1, 8, 21]) {
      const [a, b] = [redNoise(count, 0.1, 1), redNoise(count, 0.1, 2)];
      const there = fourierTransform(a, b);
      const back = inverseFourierTransform(there.real, there.imaginary);
      expectAllClose(back.real, a, { relative: 1e-13, because: "float64" });
      expectAllClose(back.imaginary, b, { relative: 1e-13, because: "float64" });
    }
  });
});
