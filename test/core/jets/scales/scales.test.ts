import { describe, expect, test } from "vitest";
import {
  approximateRadii,
  radiusFromTable,
  radiusFromWaveSpeed,
} from "../../../../core/jets/scales/deformation-radius";
import { type RhinesConvention, rhinesScale } from "../../../../core/jets/scales/rhines-scale";
import {
  greatestRossbyFrequency,
  longWaveSpeed,
  rossbyFrequency,
  rossbyPhaseSpeed,
  shortestRossbyPeriodDays,
} from "../../../../core/jets/scales/rossby-waves";
import { energyShareInside, isInsideWaveBoundary, waveBoundary } from "../../../../core/jets/scales/wave-boundary";
import { planetaryVorticityGradient } from "../../../../core/ocean/earth";
import { expectClose } from "../../../expect-close";
import { sphere } from "../earths";

const betaAt = (latitude: number) => planetaryVorticityGradient(latitude, sphere);
const printed = { relative: 1e-6, because: "worked out in numpy to all digits, radius 6371 km" };
const lastDigit = (absolute: number) => ({ absolute, because: "half the last printed digit" });
const rounding = { relative: 1e-12, absolute: 1e-20, because: "float64 rounding" };

describe("Rhines scale in every convention (numpy, km)", () => {
  test.each<[number, number, RhinesConvention, number]>([
    [30, 0.1, "root", 71.02262737479727],
    [30, 0.1, "root-width", 446.2483287986169 / 2],
    [30, 0.1, "root-wavelength", 446.2483287986169],
    [30, 0.1, "root-two", 100.44116286880896],
    [30, 0.1, "root-two-width", 315.54521938666613],
    [30, 0.1, "root-two-wavelength", 631.0904387733323],
    [30, 0.05, "root", 50.22058143440447],
    [30, 0.05, "root-two-width", 223.12416439930843],
    [15, 0.1, "root", 67.24967055262472],
    [15, 0.1, "root-two-wavelength", 597.564827790055],
    [45, 0.1, "root-wavelength", 493.85495717791355],
    [45, 0.1, "root-two", 111.15641894058614],
  ])("%f N, %f m/s, %s", (latitude, speed, convention, wanted) => {
    expectClose(rhinesScale(speed, betaAt(latitude), convention) / 1000, wanted, printed);
  });
});

describe("Rossby waves at 30 N with a deformation radius of 40 km", () => {
  const beta = betaAt(30);
  const [k, l] = [(2 * Math.PI) / 500e3, (2 * Math.PI) / 300e3];

  test("long waves go west at 3.172 cm/s", () => {
    expectClose(longWaveSpeed(beta, 40e3), -0.03171951323091539, printed);
    expectClose(rossbyPhaseSpeed(0, 0, beta, 40e3), longWaveSpeed(beta, 40e3), rounding);
  });

  test("no period is shorter than 183.4 days, and the frequency there is beta Ld / 2 at k = 1 / Ld", () => {
    expectClose(greatestRossbyFrequency(beta, 40e3), 3.9649391538644236e-7, printed);
    expectClose(shortestRossbyPeriodDays(beta, 40e3), 183.41278225052187, printed);
    expectClose(-rossbyFrequency(1 / 40e3, 0, beta, 40e3), greatestRossbyFrequency(beta, 40e3), rounding);
    for (const other of [0.9, 1.1]) {
      expect(-rossbyFrequency(other / 40e3, 0, beta, 40e3)).toBeLessThan(greatestRossbyFrequency(beta, 40e3));
    }
  });

  test("500 km by 300 km waves take 356.6 days and go west at 1.623 cm/s", () => {
    const frequency = rossbyFrequency(k, l, beta, 40e3);
    expectClose((2 * Math.PI) / -frequency / 86400, 356.5870058258172, printed);
    expectClose(rossbyPhaseSpeed(k, l, beta, 40e3), -0.01622896219587017, printed);
    expectClose(frequency / k, rossbyPhaseSpeed(k, l, beta, 40e3), rounding);
  });

  test("a depth-independent flow shifts the phase speed by itself, and its curvature takes off the gradient", () => {
    const still = rossbyPhaseSpeed(k, l, beta, 40e3);
    expectClose(rossbyPhaseSpeed(k, l, beta, 40e3, { speed: 0.05, curvature: 0 }), still + 0.05, rounding);
    expectClose(rossbyPhaseSpeed(k, l, beta, 40e3, { speed: 0, curvature: beta / 2 }), still / 2, rounding);
    expectClose(rossbyFrequency(k, l, beta, 40e3, { speed: 0.05, curvature: beta }), 0.05 * k, rounding);
  });

  test("without a deformation radius the classic barotropic wave is left", () => {
    expectClose(rossbyFrequency(k, 0, beta, Number.POSITIVE_INFINITY), -beta / k, rounding);
  });
});

describe("deformation radius", () => {
  test.each([
    [0, 2.7, 242.8],
    [5, 2.7, 212.4],
    [10, 2.7, 106.6],
    [20, 2.8, 56.1],
    [30, 2.7, 37.0],
    [40, 2.4, 25.6],
    [50, 1.9, 17.0],
    [60, 1.3, 10.3],
  ])("at %f degrees a wave speed of %f m/s gives %f km (numpy)", (latitude, speed, wanted) => {
    expectClose(radiusFromWaveSpeed(speed, latitude, sphere) / 1000, wanted, lastDigit(0.05));
    expectClose(radiusFromWaveSpeed(speed, -latitude, sphere) / 1000, wanted, lastDigit(0.05));
  });

  test("the approximate table lies within its 15 % of the formula at 2.7 m/s up to 40 degrees", () => {
    for (const latitude of [0, 5, 10, 20, 30]) {
      const formula = radiusFromWaveSpeed(2.7, latitude, sphere);
      expectClose(radiusFromTable(approximateRadii, latitude), formula, { relative: 0.15, because: "its own doubt" });
    }
  });

  test("a table is interpolated linearly, mirrored only where it says so, and ends where it ends", () => {
    const table = { latitude: [20, 30], radiusKm: [60, 40], symmetric: false };
    expect(radiusFromTable(table, 25)).toBe(50e3);
    expect(radiusFromTable(table, 30)).toBe(40e3);
    expect(radiusFromTable(table, -25)).toBeNaN();
    expect(radiusFromTable({ ...table, symmetric: true }, -25)).toBe(50e3);
    expect(radiusFromTable(table, 31)).toBeNaN();
  });
});

describe("boundary of waves and turbulence, K² = (beta / U) cos(angle)", () => {
  const beta = betaAt(30);
  const scale = Math.sqrt(beta / 0.1);

  test("reaches 0.8409 of its zonal reach at 45 degrees and the origin at 90", () => {
    const { angle, k, l } = waveBoundary(0.1, beta, 181);
    const total = Array.from(k, (each, i) => Math.hypot(each, l[i]));
    expectClose((angle[135] * 180) / Math.PI, 45, rounding);
    expectClose(total[135] / scale, 0.8408964152537146, { relative: 1e-12, because: "2^(-1/4)" });
    expectClose(total[90], scale, rounding);
    expectClose(total[180], 0, { absolute: 1e-6 * scale, because: "cos(pi/2) rounds to 6e-17" });
    angle.forEach((each, i) => {
      expectClose(total[i] ** 2, (beta / 0.1) * Math.cos(each), {
        relative: 1e-9,
        absolute: 1e-30,
        because: "identity",
      });
    });
  });

  test("points just inside and outside of it are told apart, on both sides of the meridional axis", () => {
    const { k, l } = waveBoundary(0.1, beta, 91);
    for (let i = 5; i < 86; i += 10) {
      for (const side of [1, -1]) {
        expect(isInsideWaveBoundary(side * k[i] * 0.99, l[i] * 0.99, 0.1, beta)).toBe(true);
        expect(isInsideWaveBoundary(side * k[i] * 1.01, l[i] * 1.01, 0.1, beta)).toBe(false);
      }
    }
    expect(isInsideWaveBoundary(0, 0, 0.1, beta)).toBe(false);
  });

  test("a flat spectrum over the square around it has the area's share inside, mean and gaps left out", () => {
    const count = 801;
    const axis = Float64Array.from({ length: count }, (_, i) => (scale * 2 * (i - 400)) / 400);
    const power = new Float64Array(count * count).fill(1);
    power[400 * count + 400] = 1e9;
    power[0] = Number.NaN;
    // Area of both lobes: (beta / U) times the integral of cos over -pi/2 … pi/2, which is 2; the square is 16 beta / U.
    expectClose(energyShareInside(power, axis, axis, 0.1, beta), 2 / 16, {
      relative: 0.005,
      because: "cells of scale/200",
    });
  });
});
