import { describe, expect, test } from "vitest";
import { defaultProminence, findExtremes, kilometresNorth } from "../../../../core/jets/ridges/find-extremes";
import { findRidges } from "../../../../core/jets/ridges/find-ridges";
import { prominentPeaks } from "../../../../core/jets/ridges/prominence";
import { parabolaVertex } from "../../../../core/jets/ridges/vertex";
import { expectAllClose, expectClose } from "../../../expect-close";
import { ellipsoid, sphere } from "../earths";

const settings = { leastProminence: 0.01, againstFlow: false };
const rounding = { relative: 1e-12, absolute: 1e-12, because: "float64 rounding" };

test("the vertex is exact for a parabola on an uneven axis of either direction", () => {
  const parabola = (x: number) => 0.3 - 0.7 * (x - 30.4) ** 2;
  for (const axis of [
    [30, 30.25, 31],
    [31, 30.5, 30.1],
  ]) {
    const { at, value } = parabolaVertex(axis, axis.map(parabola), 1);
    expectClose(at, 30.4, rounding);
    expectClose(value, 0.3, rounding);
  }
});

test("the vertex of three points on a line is the middle one", () => {
  expect(parabolaVertex([1, 2, 3], [1, 2, 3], 1)).toEqual({ at: 2, value: 2 });
});

test("nothing is a peak beside a gap or at an end, and prominence is not measured across a gap", () => {
  const gap = Number.NaN;
  const peaks = prominentPeaks(Float64Array.from([5, 1, 3, 2, gap, 4, 9, gap, 0, 2, 1.5]), 0);
  expect(peaks.map(({ index, prominence }) => [index, prominence])).toEqual([
    [2, 1],
    [9, 0.5],
  ]);
});

describe("eastward and westward extremes of u = 0.1 cos(2 pi (latitude - 30.1) / 3)", () => {
  const wave = (latitude: number) => 0.1 * Math.cos((2 * Math.PI * (latitude - 30.1)) / 3);
  const latitude = Float64Array.from({ length: 61 }, (_, i) => 25 + i * 0.2);
  const found = findExtremes(latitude.map(wave), latitude, settings, sphere);

  test("alternate and lie at crests and troughs to a thousandth of the wavelength", () => {
    expect(found.map(({ sign }) => sign)).toEqual([-1, 1, -1, 1, -1, 1, -1, 1]);
    expectAllClose(
      found.map((each) => each.latitude),
      [25.6, 27.1, 28.6, 30.1, 31.6, 33.1, 34.6, 36.1],
      { absolute: 0.003, because: "a parabola through three points of a cosine of 15 points" },
    );
    for (const { sign, speed } of found) {
      expectClose(speed, sign * 0.1, { relative: 2e-3, because: "same parabola" });
    }
  });

  test("are half a wavelength wide between half-prominence points", () => {
    const half = (1.5 * Math.PI * 6371) / 180;
    for (const { widthKm } of found.slice(1, -1)) {
      expectClose(widthKm, half, {
        relative: 0.02,
        because: "prominence from grid values, straight lines between rows",
      });
    }
  });

  test("are the same with latitudes descending", () => {
    const descending = latitude.slice().reverse();
    const again = findExtremes(descending.map(wave), descending, settings, sphere).reverse();
    expectAllClose(
      again.map((each) => each.latitude),
      found.map((each) => each.latitude),
      rounding,
    );
    expectAllClose(
      again.map((each) => each.widthKm),
      found.map((each) => each.widthKm),
      rounding,
    );
  });
});

test("a maximum inside westward flow is a jet only where that is asked for", () => {
  const latitude = Float64Array.from([30, 30.5, 31, 31.5, 32]);
  const profile = Float64Array.from([-0.2, -0.1, -0.05, -0.1, -0.2]);
  expect(findExtremes(profile, latitude, settings, sphere)).toEqual([]);
  const [found] = findExtremes(profile, latitude, { ...settings, againstFlow: true }, sphere);
  expect(found).toMatchObject({ sign: 1, row: 2, latitude: 31 });
  expectClose(found.prominence, 0.15, rounding);
});

test("the least prominence is 1 cm/s for quiet records and half the standard deviation for others", () => {
  expect(defaultProminence(Float64Array.from([0.001, -0.001, Number.NaN]))).toBe(0.01);
  expectClose(defaultProminence(Float64Array.from([0.3, -0.3, 0.3, -0.3])), 0.3 / Math.sqrt(3), rounding);
  expect(defaultProminence(new Float64Array(3).fill(Number.NaN))).toBe(0.01);
});

test("kilometres along the ellipsoid's meridian add up to the metric's integral", () => {
  const pieces = Array.from({ length: 100 }, (_, i) => kilometresNorth(25 + i * 0.1, 25.1 + i * 0.1, ellipsoid));
  const sum = pieces.reduce((total, piece) => total + piece, 0);
  expectClose(kilometresNorth(25, 35, ellipsoid), sum, { relative: 2e-5, because: "midpoint rule over ten degrees" });
});

test("a matrix gives one entry a date, with the rows that have data", () => {
  const latitude = Float64Array.from([30, 31, 32, 33, 34]);
  const gap = Number.NaN;
  const matrix = Float64Array.from([0, gap, gap, 0.1, gap, 0.1, 0.3, gap, 0.1, 0.1, gap, 0, 0, gap, 0]);
  const dates = findRidges(matrix, latitude, Float64Array.from([0, 7, 14]), settings, sphere);
  expect(dates.map(({ day }) => day)).toEqual([0, 7, 14]);
  expect(dates.map(({ extremes }) => extremes.length)).toEqual([1, 0, 0]);
  expect(dates.map(({ observed }) => [...observed])).toEqual([
    [1, 1, 1, 1, 1],
    [0, 0, 0, 0, 0],
    [0, 1, 1, 1, 1],
  ]);
});
