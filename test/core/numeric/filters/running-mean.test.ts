import { describe, expect, test } from "vitest";
import { crossingPeriods } from "../../../../core/numeric/filters/crossing-periods";
import {
  plainMeanResponse,
  runningMean,
  runningMeanResponse,
  runningMeanWeights,
} from "../../../../core/numeric/filters/running-mean";
import { symmetricResponse } from "../../../../core/numeric/lanczos";
import { expectAllClose, expectClose } from "../../../expect-close";
import { referenceJson } from "../../../reference-json";

interface Reference {
  readonly runningMean: { readonly points: number; readonly frequency: number[]; readonly response: number[] }[];
  readonly centredEvenMean: {
    readonly points: number;
    readonly weights: number[];
    readonly frequency: number[];
    readonly response: number[];
    readonly halfAmplitudeDays: number;
    readonly halfPowerDays: number;
  };
}

const reference = referenceJson<Reference>("filters");
const rounding = { absolute: 1e-12, because: "sums of at most 41 products in float64" };
const sums = (points: number) => (f: number) => plainMeanResponse(points, f);

describe("the response of a running mean", () => {
  test.each(reference.runningMean.map((each) => [each.points, each] as const))("over %i samples", (points, each) => {
    expectAllClose(each.frequency.map(sums(points)), each.response, rounding);
  });

  test("18 weeks halve the amplitude at 208.6 d, the power at 284.1 d, with a sidelobe of -0.2195", () => {
    const printed = { absolute: 0.05, because: "printed to a tenth of a day" };
    const halves = [0.5, Math.SQRT1_2].map((level) => crossingPeriods(sums(18), level, 18, 100));
    expectClose(7 * halves[0][0], 208.6, printed);
    expectClose(7 * halves[1][0], 284.1, printed);
    expect(halves.map((each) => each.length)).toEqual([1, 1]);
    const lobe = Array.from({ length: 20001 }, (_, i) => plainMeanResponse(18, (1 + i / 20000) / 18));
    expectClose(Math.min(...lobe), -0.2195, { absolute: 5e-5, because: "printed to four decimals" });
  });

  test("an even mean centred on its date answers as numpy's direct sum says", () => {
    const { points, weights, frequency, response, halfAmplitudeDays, halfPowerDays } = reference.centredEvenMean;
    expectAllClose(runningMeanWeights(points), weights, rounding);
    expectAllClose(
      frequency.map((f) => runningMeanResponse(points, f)),
      response,
      rounding,
    );
    const halves = [0.5, Math.SQRT1_2].map(
      (level) => crossingPeriods((f) => runningMeanResponse(points, f), level, 18, 100)[0] * 7,
    );
    expectAllClose(halves, [halfAmplitudeDays, halfPowerDays], { relative: 1e-9, because: "two root finders" });
  });

  test("is that of the weights for odd and even counts", () => {
    for (const points of [1, 2, 5, 18, 41]) {
      for (const f of [0, 0.01, 0.13, 0.37, 0.5]) {
        expectClose(symmetricResponse(runningMeanWeights(points), f), runningMeanResponse(points, f), rounding);
      }
    }
  });
});

describe("running means of a series", () => {
  test.each([7, 18])("a straight line is kept or masked, ends and gaps included (%i samples)", (points) => {
    const line = Float64Array.from({ length: 120 }, (_, t) => 0.3 + 0.02 * t);
    for (const hole of [40, 41, 42, 70]) line[hole] = Number.NaN;
    const { values } = runningMean(line, points);
    values.forEach((value, t) => {
      if (!Number.isNaN(value)) expectClose(value, 0.3 + 0.02 * t, rounding, `sample ${t}`);
    });
    expect(values[0]).toBeNaN();
    expect(values.filter(Number.isNaN).length).toBeLessThan(points);
  });

  test("one missing sample changes nothing beyond the half-width, and blanks nothing", () => {
    const whole = Float64Array.from({ length: 100 }, (_, t) => Math.sin(t / 5));
    const gappy = whole.slice();
    gappy[50] = Number.NaN;
    const [a, b] = [runningMean(whole, 9).values, runningMean(gappy, 9).values];
    a.forEach((value, t) => {
      if (Math.abs(t - 50) > 4) expect(b[t]).toEqual(value);
      else expect(b[t]).not.toBeNaN();
    });
  });

  test("the share is one inside and falls by two samples' weight for each sample short of an end", () => {
    const { share } = runningMean(new Float64Array(60).fill(1), 9);
    expectAllClose(share.subarray(0, 6), [1 / 9, 3 / 9, 5 / 9, 7 / 9, 1, 1], { absolute: 1e-15, because: "rounding" });
  });
});
