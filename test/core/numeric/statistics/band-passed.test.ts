import { describe, expect, test } from "vitest";
import { filterSeries, lanczosBand } from "../../../../core/numeric/band-filter";
import { autocorrelation, effectiveSizeFromLags } from "../../../../core/numeric/serial-correlation";
import {
  correlationPValue,
  pearsonCorrelation,
  testedCorrelation,
} from "../../../../core/numeric/statistics/correlation";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { expectClose } from "../../../expect-close";

describe("correlations of band-passed series", () => {
  // Thirty years of ten-day maps, 90 to 540 days; every pair of independent records is a trial.
  const samples = 1096;
  const filter = lanczosBand(9, 54);
  const at = Int32Array.from({ length: samples }, (_, i) => i + filter.halfWidth);
  const bandPassed = (record: number) => {
    const random = randomStream(2899, record);
    const white = Float64Array.from({ length: samples + 2 * filter.halfWidth }, () => random.normal());
    return filterSeries(white, filter, at);
  };

  test("band-passed white noise is rejected at 5 ± 1 %", () => {
    const series = Array.from({ length: 100 }, (_, record) => bandPassed(record));
    const own = series.map((each) => autocorrelation(each, 120));
    let [rejected, trials, naive] = [0, 0, 0];
    for (let i = 0; i < series.length; i++) {
      for (let j = 0; j < i; j++) {
        const { correlation, count } = pearsonCorrelation(series[i], series[j]);
        const size = effectiveSizeFromLags(count, own[i], own[j]);
        if (correlationPValue(correlation, size) < 0.05) rejected++;
        if (correlationPValue(correlation, count) < 0.05) naive++;
        trials++;
      }
    }
    expectClose(rejected / trials, 0.05, { absolute: 0.01, because: "4950 trials have a deviation of 0.3 %" });
    expect(naive / trials).toBeGreaterThan(0.3);
  });

  test("with two fifths of each record missing, in runs, it still is", () => {
    const series = Array.from({ length: 50 }, (_, record) => {
      const random = randomStream(748, record);
      const each = bandPassed(record);
      for (let gap = 0; gap < 13; gap++) {
        const from = random.below(samples);
        each.fill(Number.NaN, from, from + 40);
      }
      return each;
    });
    let [rejected, trials] = [0, 0];
    for (let i = 0; i < series.length; i++) {
      for (let j = 0; j < i; j++) {
        if (testedCorrelation(series[i], series[j], 0.95, 60).pValue < 0.05) rejected++;
        trials++;
      }
    }
    expectClose(rejected / trials, 0.05, { absolute: 0.015, because: "1225 trials have 0.6 %" });
  });
});
