import { describe, expect, test } from "vitest";
import { bandResponse, filterSeries, weightShare } from "../../core/numeric/band-filter";
import { lanczosLowPass, symmetricResponse } from "../../core/numeric/lanczos";
import { expectAllClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

interface Reference {
  readonly bands: {
    readonly stepDays: number;
    readonly bandDays: [number, number];
    readonly halfWidth: number;
    readonly lowPassShort: number[];
    readonly lowPassLong: number[];
    readonly periodsDays: number[];
    readonly responseLowPassShort: number[];
    readonly responseBand: number[];
  }[];
  readonly series: {
    readonly name: string;
    readonly input: (number | null)[];
    readonly lowPassShort: number[];
    readonly band: number[];
    readonly support: number[];
  }[];
}

const reference = referenceJson<Reference>("lanczos");

function bandOf({ stepDays, bandDays, halfWidth }: Reference["bands"][number]) {
  return {
    halfWidth,
    fast: lanczosLowPass(stepDays / bandDays[0], halfWidth),
    slow: lanczosLowPass(stepDays / bandDays[1], halfWidth),
  };
}

describe("the Lanczos band-pass against numpy (Duchon 1979)", () => {
  test.each(reference.bands.map((each) => [each.bandDays.join(" to "), each.stepDays, each] as const))(
    "weights and response, %s days every %i days",
    (_, step, each) => {
      const filter = bandOf(each);
      const close = { absolute: 1e-13, because: "the same sums in float64" };
      expectAllClose(filter.fast.subarray(each.halfWidth), each.lowPassShort, close, "short low-pass");
      expectAllClose(filter.slow.subarray(each.halfWidth), each.lowPassLong, close, "long low-pass");
      const responses = each.periodsDays.map((period) => bandResponse(filter, step / period));
      expectAllClose(
        responses,
        each.responseBand,
        { absolute: 1e-12, because: "a sum of a thousand cosines" },
        "response",
      );
      const low = each.periodsDays.map((period) => symmetricResponse(filter.fast, step / period));
      expectAllClose(
        low,
        each.responseLowPassShort,
        { absolute: 1e-12, because: "a sum of a thousand cosines" },
        "low-pass",
      );
    },
  );

  test.each(reference.series.map((each) => [each.name, each] as const))(
    "band-passed series, ends included: %s",
    (_, each) => {
      const filter = bandOf(reference.bands[0]);
      const input = withNaN(each.input);
      const close = { relative: 1e-9, because: "the bound asked of a band-pass; float64 sums of 241 products" };
      // Where less than a quarter of a low-pass's weight met data, no value is given.
      const known = (values: readonly number[]) => values.map((value, i) => (each.support[i] < 0.25 ? null : value));
      expectAllClose(filterSeries(input, filter), known(each.band), close, "band");
      const low = filterSeries(input, { ...filter, slow: null });
      const sparse = each.support.flatMap((share, i) => (share < 0.25 ? [i] : []));
      for (const i of sparse) low[i] = Number.NaN;
      expectAllClose(low, known(each.lowPassShort), close, "low-pass");
      expect(sparse.length).toBeLessThan(20);
      const hasData = Uint8Array.from(each.input, (value) => (value === null ? 0 : 1));
      expectAllClose(
        weightShare(filter, hasData),
        each.support,
        { absolute: 1e-12, because: "sums of 241 weights" },
        "share",
      );
    },
  );
});
