import fc from "fast-check";
import { describe, test } from "vitest";
import { bandResponse, filterSeries, lanczosFilter } from "../../../../core/numeric/band-filter";
import { butterworthSections, zeroPhaseResponse } from "../../../../core/numeric/filters/butterworth";
import { runningMean, runningMeanResponse } from "../../../../core/numeric/filters/running-mean";
import { zeroPhaseFilter } from "../../../../core/numeric/filters/zero-phase";
import { expectAllClose, expectClose } from "../../../expect-close";

interface Case {
  readonly name: string;
  readonly apply: (series: Float64Array) => Float64Array;
  readonly response: (frequency: number) => number;
}

const cuts = [
  { shortestSamples: 8, longestSamples: null },
  { shortestSamples: null, longestSamples: 24 },
  { shortestSamples: 8, longestSamples: 24 },
];

const cases: Case[] = [
  ...cuts.map((each): Case => {
    const filter = lanczosFilter(each);
    return {
      name: `Lanczos ${each.shortestSamples} to ${each.longestSamples}`,
      apply: (series) => filterSeries(series, filter),
      response: (f) => bandResponse(filter, f),
    };
  }),
  ...cuts.map((each): Case => {
    const sections = butterworthSections({ order: 3, ...each, cut: "half-amplitude" });
    return {
      name: `Butterworth ${each.shortestSamples} to ${each.longestSamples}`,
      apply: (series) => zeroPhaseFilter(series, sections),
      response: (f) => zeroPhaseResponse(sections, f),
    };
  }),
  ...[9, 12].map(
    (points): Case => ({
      name: `running mean over ${points}`,
      apply: (series) => runningMean(series, points).values,
      response: (f) => runningMeanResponse(points, f),
    }),
  ),
];
const named = cases.map((each) => [each.name, each] as const);

const value = fc.double({ min: -5, max: 5, noNaN: true });
const pair = fc.array(fc.tuple(value, value), { minLength: 60, maxLength: 140 });
const rounding = { absolute: 1e-10, because: "values up to 35, sums and recursions over 140 samples" };

describe.each(named)("%s", (_, { apply, response }) => {
  test("is linear", () => {
    fc.assert(
      fc.property(pair, value, value, (both, p, q) => {
        const [a, b] = [0, 1].map((i) => Float64Array.from(both, (each) => each[i]));
        const mixed = apply(a.map((each, t) => p * each + q * b[t]));
        const [fa, fb] = [apply(a), apply(b)];
        expectAllClose(
          mixed,
          fa.map((each, t) => p * each + q * fb[t]),
          rounding,
        );
      }),
      { numRuns: 40 },
    );
  });

  test("gives a sinusoid back with the amplitude its response says and no shift", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.005, max: 0.45, noNaN: true }),
        fc.double({ min: 0, max: 6, noNaN: true }),
        (f, phase) => {
          const series = Float64Array.from({ length: 900 }, (_, t) => Math.cos(2 * Math.PI * f * t + phase));
          const out = apply(series);
          const gain = response(f);
          for (let t = 420; t < 480; t += 7) {
            expectClose(out[t], gain * series[t], { absolute: 1e-9, because: "the ends' transient after 420 samples" });
          }
        },
      ),
      { numRuns: 40 },
    );
  });

  test("commutes with a shift away from the ends", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 1, max: 1000 }), (shift, seed) => {
        const series = Float64Array.from({ length: 900 }, (_, t) => ((t * 7919 + seed * 131) % 1009) / 1009);
        const [a, b] = [apply(series.slice(0, 800)), apply(series.slice(shift, 800 + shift))];
        for (let t = 380; t < 420; t++) {
          expectClose(b[t - shift], a[t], { absolute: 1e-9, because: "the ends' transient after 340 samples" });
        }
      }),
      { numRuns: 20 },
    );
  });
});
