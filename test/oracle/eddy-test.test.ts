import { describe, expect, test } from "vitest";
import { envelopeFoldingShare, envelopeMeanSquare } from "../../core/jets/eddy-test/eddy-life";
import { type PassingEddy, zonalMeanOf } from "../../core/jets/eddy-test/eddy-ocean";
import { errorFunction } from "../../core/jets/eddy-test/error-function";
import {
  crossingMeanPeak,
  type EddyShape,
  mappedEddy,
  northwardVariancePerEddy,
} from "../../core/jets/eddy-test/gaussian-eddy";
import { planOceans } from "../../core/jets/eddy-test/ocean-plan";
import { uniformPopulation } from "../../core/jets/eddy-test/population";
import { weightedNoise } from "../../core/jets/eddy-test/red-noise";
import { evenAxis, seaOf } from "../core/jets/eddy-test/made-seas";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson } from "../reference-json";

interface Reference {
  readonly errorFunction: { readonly x: number[]; readonly values: number[] };
  readonly zonalMeans: {
    readonly latitudes: number[];
    readonly days: number[];
    readonly lifetimeDays: number;
    readonly rampShare: number;
    readonly stretches: [number, number][];
    readonly eddies: PassingEddy[];
    readonly current: number[];
  };
  readonly mappedHeights: {
    readonly amplitudeMetres: number;
    readonly radiusMetres: number;
    readonly speedMetresPerSecond: number;
    readonly metres: number;
    readonly days: number;
    readonly points: [number, number][];
    readonly heights: number[];
  }[];
  readonly energy: (EddyShape & { readonly gravityOverCoriolis: number; readonly integral: number })[];
  readonly lasting: { readonly rampShare: number; readonly meanSquare: number; readonly foldingShare: number }[];
  readonly crossing: {
    readonly gravityOverCoriolis: number;
    readonly amplitudeMetres: number;
    readonly speedMetresPerSecond: number;
    readonly days: number;
    readonly peak: number;
  };
  readonly redNoise: {
    readonly lagOne: number;
    readonly samples: number;
    readonly lowest: number;
    readonly highest: number;
    readonly share: number;
    readonly degrees: number;
  }[];
}

const reference = referenceJson<Reference>("random-eddies");

describe("passing eddies against scipy's quadrature", () => {
  test("the error function is scipy's to rounding", () => {
    const got = reference.errorFunction.x.map(errorFunction);
    expectAllClose(got, reference.errorFunction.values, {
      absolute: 2e-15,
      because: "a sum of up to 50 terms",
    });
    expect(errorFunction(Number.NaN)).toBeNaN();
    expectClose(errorFunction(1e-8), reference.errorFunction.values[53], { relative: 1e-15, because: "small x" });
  });

  test("zonal means of moving eddies over two stretches of sea are those of the summed height field", () => {
    const { latitudes, days, lifetimeDays, rampShare, stretches, eddies, current } = reference.zonalMeans;
    const columns = 20;
    const sea = seaOf({
      south: 28,
      west: -149.75,
      step: 0.5,
      rows: latitudes.length,
      columns,
      dates: days.length,
      stepDays: 12,
    });
    const ocean = new Uint8Array(latitudes.length * columns).fill(1);
    // -146 to -144.5 is land: the cells from column 8 to 10.
    ocean.forEach((_, i) => {
      if (i % columns >= 8 && i % columns <= 10) ocean[i] = 0;
    });
    const population = {
      ...uniformPopulation({
        amplitudeMetres: 0.1,
        radiusMetres: 6e4,
        densityPerMillionKm2: 10,
        lifetimeDays,
        speedMetresPerSecond: 0,
      }),
      rampShare,
    };
    const plan = planOceans(population, { ...sea, longitude: evenAxis("longitude", -149.75, 0.5, columns), ocean });
    expectAllClose(plan.spans[0], stretches.flat(), { absolute: 1e-9, because: "sums of half steps" }, "stretches");
    expect(plan.spans).toHaveLength(1);
    expectAllClose(
      zonalMeanOf(eddies, plan),
      current,
      { relative: 2.5e-3, because: "eddies end at 4 radii, where 0.2 % of their fastest current is left" },
      "current",
    );
  });

  test.each(reference.mappedHeights.map((each) => [each.speedMetresPerSecond, each] as const))(
    "a map shows a moving eddy as a wider one, speed %f",
    (_, { amplitudeMetres, radiusMetres, speedMetresPerSecond, metres, days, points, heights }) => {
      const shape = mappedEddy(amplitudeMetres, radiusMetres, speedMetresPerSecond, { metres, days });
      const got = points.map(
        ([x, y]) =>
          shape.amplitudeMetres *
          Math.exp(-0.5 * ((x / shape.radiusEastMetres) ** 2 + (y / shape.radiusNorthMetres) ** 2)),
      );
      expectAllClose(got, heights, { relative: 1e-9, because: "sums over 801 steps" }, "height");
    },
  );

  test("the energy of an eddy is the integral of its squared current", () => {
    for (const each of reference.energy) {
      const got = northwardVariancePerEddy(each, each.gravityOverCoriolis);
      expectClose(got, each.integral, { relative: 1e-8, because: "adaptive quadrature" }, "integral");
    }
  });

  test("an eddy's life: mean square and folding share of its envelope", () => {
    for (const { rampShare, meanSquare, foldingShare } of reference.lasting) {
      expectClose(envelopeMeanSquare(rampShare), meanSquare, { relative: 1e-8, because: "adaptive quadrature" });
      expectClose(envelopeFoldingShare(rampShare), foldingShare, { relative: 1e-4, because: "sums over 2,000 steps" });
    }
  });

  test("one eddy that crosses leaves a mean of 1.5203 g A / f c T, 3.382 mm/s in 200 weeks at 30 degrees", () => {
    const { gravityOverCoriolis, amplitudeMetres, speedMetresPerSecond, days, peak } = reference.crossing;
    const got = crossingMeanPeak(gravityOverCoriolis, amplitudeMetres, speedMetresPerSecond, days);
    expectClose(got, peak, { relative: 1e-6, because: "a sum over 200,000 steps" });
    expectClose(got, 3.382e-3, { relative: 3e-4, because: "four digits" });
  });

  test.each(reference.redNoise.map((each) => [each.lagOne, each] as const))(
    "variance of red noise in a band and its degrees of freedom, r = %f",
    (_, { lagOne, samples, lowest, highest, share, degrees }) => {
      const box = (k: number) => (k >= lowest * samples - 1e-9 && k <= highest * samples + 1e-9 ? 1 : 0);
      const got = weightedNoise(lagOne, samples, box);
      const close = { relative: 0.02, because: "the spectrum stands for a covariance that feels the record's ends" };
      expectClose(got.mean, share, close, "share");
      expectClose(got.degrees, degrees, close, "degrees");
    },
  );
});
