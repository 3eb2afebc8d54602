import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { equivalentDegrees, spectrumInterval } from "../../../../core/numeric/spectra/confidence";
import { taperFamily } from "../../../../core/numeric/spectra/tapers";
import { welchSpectrum } from "../../../../core/numeric/welch";
import { expectAllClose, expectClose } from "../../../expect-close";
import { noise } from "./noise";

const rounding = { relative: 1e-12, because: "float64 sums of some hundred terms" };

describe("confidence of a spectrum", () => {
  test("disjoint segments have two degrees of freedom each, sine tapers two a taper", () => {
    expectClose(equivalentDegrees(taperFamily({ kind: "hann" }, 50), [0, 50, 100, 150]), 8, rounding);
    expectClose(equivalentDegrees(taperFamily({ kind: "sine", count: 5 }, 50), [0]), 10, rounding);
  });

  test("half-overlapping Hann segments have 36 K² / (19 K - 1) degrees of freedom", () => {
    // A Hann window and itself half a length on have an inner product of 1/6 of its power (elementary integral), so that the
    // degrees are 2 K / (1 + 2 (1 - 1/K) / 36); the discrete window differs by terms of order 1 / length².
    for (const count of [2, 5, 20]) {
      const starts = Array.from({ length: count }, (_, i) => i * 500);
      const got = equivalentDegrees(taperFamily({ kind: "hann" }, 1000), starts);
      expectClose(got, (36 * count * count) / (19 * count - 1), { relative: 1e-5, because: "discrete window" });
    }
  });

  test("the 95 % interval of white noise's spectrum holds its level at 95 % of frequencies", () => {
    const settings = { segment: 64, overlap: 0.5, detrend: "none" } as const;
    let [held, tested] = [0, 0];
    for (let record = 0; record < 300; record++) {
      const { density, degreesOfFreedom } = welchSpectrum(noise(512, 100 + record), 1, settings);
      const { low, high } = spectrumInterval(degreesOfFreedom);
      for (let k = 2; k < 31; k++) {
        tested++;
        if (density[k] * low <= 2 && density[k] * high >= 2) held++;
      }
    }
    expectClose(held / tested, 0.95, { absolute: 0.01, because: "8700 estimates, neighbours correlated" });
  });

  test("no segment leaves no degrees of freedom and no limits", () => {
    const { degreesOfFreedom, density } = welchSpectrum(new Float64Array(16).fill(Number.NaN), 1, {
      segment: 16,
      overlap: 0,
      detrend: "constant",
    });
    expect(degreesOfFreedom).toBe(0);
    expect(density.every(Number.isNaN)).toBe(true);
    expect(spectrumInterval(0).low).toBeNaN();
  });
});

describe("tapers", () => {
  test("sine tapers are orthonormal at any length", () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 60 }), fc.integer({ min: 1, max: 8 }), (length, count) => {
        const family = taperFamily({ kind: "sine", count }, length);
        expect(family.length).toBe(Math.min(count, length));
        family.forEach((first, i) => {
          family.forEach((second, j) => {
            const product = first.reduce((total, value, t) => total + value * second[t], 0);
            expectClose(product, i === j ? 1 : 0, { absolute: 1e-12, because: "float64 sums" });
          });
        });
      }),
    );
  });

  test("a cosine taper over nothing is the boxcar, over everything Hann", () => {
    const [none] = taperFamily({ kind: "cosine", share: 0 }, 37);
    const [whole] = taperFamily({ kind: "cosine", share: 1 }, 37);
    expectAllClose(none, taperFamily({ kind: "boxcar" }, 37)[0], rounding);
    expectAllClose(whole, taperFamily({ kind: "hann" }, 37)[0], { absolute: 1e-13, because: "mirrored cosines" });
  });
});
