import { describe, expect, test } from "vitest";
import { redNoisePower, redNoiseTest } from "../../../../core/jets/eddy-test/red-noise";
import { bandResponse, filterSeries, lanczosBand } from "../../../../core/numeric/band-filter";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { expectClose } from "../../../expect-close";

const samples = 400;
const filter = lanczosBand(15, 60);
const response = (frequency: number) => bandResponse(filter, frequency);

function redSeries(lagOne: number, stream: number): Float64Array {
  const random = randomStream(31, stream);
  const series = new Float64Array(samples);
  let value = random.normal();
  for (let t = 0; t < samples; t++) {
    series[t] = value;
    value = lagOne * value + Math.sqrt(1 - lagOne * lagOne) * random.normal();
  }
  return series;
}

describe("red noise", () => {
  test("its spectrum at r = 0.9 is 19 at zero, 0.0526 at the highest frequency and 1 on average", () => {
    expectClose(redNoisePower(0.9, 0), 19, { relative: 1e-12, because: "(1 + r) / (1 - r)" });
    expectClose(redNoisePower(0.9, 0.5), 1 / 19, { relative: 1e-12, because: "(1 - r) / (1 + r)" });
    const mean =
      Array.from({ length: 1000 }, (_, k) => redNoisePower(0.9, k / 1000)).reduce((sum, each) => sum + each, 0) / 1000;
    expectClose(mean, 1, { relative: 1e-12, because: "the variance is that of white noise" });
  });

  test.each([0, 0.5, 0.8])("tested against itself it is not rejected more often than asked, r = %f", (lagOne) => {
    const trials = 1000;
    let [mean, band] = [0, 0];
    for (let i = 0; i < trials; i++) {
      const series = redSeries(lagOne, i);
      const result = redNoiseTest(series, filterSeries(series, filter), response);
      if (result.meanP <= 0.05) mean++;
      if (result.bandP <= 0.05) band++;
    }
    const because = "0.7 % standard error, and r is estimated too low in short records";
    expectClose(mean / trials, 0.05, { absolute: 0.025, because }, "mean");
    expect(band / trials, "band").toBeLessThan(0.065);
    expect(band / trials, "band").toBeGreaterThan(0.01);
  });

  test("a wave in the band as large as the noise is told from it, one outside is not", () => {
    let [inside, outside] = [0, 0];
    for (let i = 0; i < 100; i++) {
      const noise = redSeries(0.5, i);
      const plus = (period: number) =>
        noise.map((value, t) => value + Math.SQRT2 * Math.cos((2 * Math.PI * t) / period));
      const [slow, fast] = [plus(30), plus(4)];
      if (redNoiseTest(slow, filterSeries(slow, filter), response).bandP < 0.01) inside++;
      if (redNoiseTest(fast, filterSeries(fast, filter), response).bandP < 0.01) outside++;
    }
    expect(inside).toBeGreaterThan(95);
    expect(outside).toBeLessThan(5);
  });

  test("a standing current of one standard deviation is told from red noise of r = 0.5", () => {
    const series = redSeries(0.5, 0).map((value) => value + 1);
    const { meanT, meanP } = redNoiseTest(series, filterSeries(series, filter), response);
    // N (1 - r) / (1 + r) = 133 samples: t near 11.5.
    expect(meanT).toBeGreaterThan(8);
    expect(meanP).toBeLessThan(1e-6);
  });

  test("missing dates are left out, and too short or still series give NaN", () => {
    const series = redSeries(0.5, 3);
    const gappy = series.map((value, t) => (t % 10 === 4 ? Number.NaN : value));
    const [whole, holed] = [series, gappy].map((each) => redNoiseTest(each, filterSeries(each, filter), response));
    expectClose(holed.lagOne, whole.lagOne, { absolute: 0.06, because: "a tenth of the samples" });
    expectClose(holed.bandRatio, whole.bandRatio, { relative: 0.15, because: "a tenth of the samples" });
    for (const none of [new Float64Array(5), new Float64Array(samples), new Float64Array(samples).fill(Number.NaN)]) {
      expect(redNoiseTest(none, none, response).bandP).toBeNaN();
      expect(redNoiseTest(none, none, response).meanP).toBeNaN();
    }
  });
});
