import { describe, test } from "vitest";
import { crossingPeriods } from "../../../../core/numeric/filters/crossing-periods";
import { slopeNoiseGain, slopeResponse, slopeWeights } from "../../../../core/numeric/filters/slope-weights";
import { expectAllClose, expectClose } from "../../../expect-close";
import { referenceJson } from "../../../reference-json";

interface Reference {
  readonly input: number[];
  readonly leastSquaresSlopes: {
    readonly halfWidth: number;
    readonly weights: number[];
    readonly noiseGain: number;
    readonly slopePerSample: number[];
  }[];
}

const { input, leastSquaresSlopes } = referenceJson<Reference>("filters");
const rounding = { absolute: 1e-13, because: "scipy solves a least-squares system for the same weights" };

describe("least-squares slopes", () => {
  test.each(leastSquaresSlopes.map((each) => [each.halfWidth, each] as const))(
    "weights, noise and slopes with %i samples a side agree with scipy's savgol",
    (p, each) => {
      const weights = slopeWeights(p);
      expectAllClose(weights, each.weights, rounding, "weights");
      expectClose(slopeNoiseGain(p), each.noiseGain, rounding, "gain");
      const slopes = each.slopePerSample.map((_, i) =>
        weights.reduce((sum, weight, n) => sum + weight * input[i + n], 0),
      );
      expectAllClose(slopes, each.slopePerSample, rounding, "slopes");
    },
  );

  test("is exact for a parabola, ratio 1 at zero frequency", () => {
    const weights = slopeWeights(4);
    const parabola = weights.map((_, i) => 2 - 0.3 * (i - 4) + 0.7 * (i - 4) ** 2);
    expectClose(
      weights.reduce((sum, weight, i) => sum + weight * parabola[i], 0),
      -0.3,
      rounding,
    );
    expectClose(slopeResponse(4, 0), 1, rounding);
    expectClose(slopeResponse(4, 1e-5), 1, { absolute: 1e-7, because: "a frequency of one in a hundred thousand" });
  });

  test("half the derivative is left at 53, 85, 132 and 163 km for samples 6.2 km apart", () => {
    for (const [p, km] of [
      [3, 53],
      [5, 85],
      [8, 132],
      [10, 163],
    ]) {
      const found = crossingPeriods((f) => slopeResponse(p, f), 0.5, p, 100);
      expectClose(6.2 * found[found.length - 1], km, { absolute: 0.5, because: "published in whole kilometres" });
    }
  });

  test("the response is what a sinusoid's slope comes out as", () => {
    for (const f of [0.01, 0.06, 0.21]) {
      const slope = slopeWeights(5).reduce((sum, w, i) => sum + w * Math.sin(2 * Math.PI * f * (i - 5)), 0);
      expectClose(slope, slopeResponse(5, f) * 2 * Math.PI * f, rounding);
    }
  });
});
