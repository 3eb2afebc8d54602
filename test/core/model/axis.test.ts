import { expect, it } from "vitest";
import { makeAxis, makeTimeAxis } from "../../../core/model/axis";

const run = (first: number, step: number, count: number) =>
  Float64Array.from({ length: count }, (_, i) => first + i * step);

it("a quarter-degree globe is even, periodic and keeps its signed step in either order", () => {
  const eastward = makeAxis("longitude", run(0.125, 0.25, 1440), "f: longitude");
  expect(eastward).toMatchObject({ even: true, periodic: true, step: 0.25 });
  const southward = makeAxis("latitude", run(89.875, -0.25, 720), "f: latitude");
  expect(southward).toMatchObject({ even: true, periodic: false, step: -0.25 });
});

it("a twelfth-degree longitude stored as float32 is even and periodic, its step right to 1e-6", () => {
  const axis = makeAxis("longitude", Float32Array.from(run(0, 1 / 12, 4320)), "f: longitude");
  expect(axis).toMatchObject({ even: true, periodic: true });
  // Float32 rounding of the two ends, 3e-5 degrees, is spread over 4319 steps.
  expect(Math.abs(axis.step * 12 - 1)).toBeLessThan(1e-6);
});

it("a Mercator latitude is not even and its step is the median spacing", () => {
  const latitudes = run(0, 0.25, 5).map((x) => (Math.atan(Math.sinh((x * Math.PI) / 180)) * 180) / Math.PI);
  const axis = makeAxis("latitude", latitudes.slice(0, 4), "f: latitude");
  expect(axis.even).toBe(false);
  expect(axis.step).toBe(latitudes[2] - latitudes[1]);
});

it("a regional longitude axis is not periodic, nor is one that repeats its first meridian", () => {
  expect(makeAxis("longitude", run(-150, 0.25, 100), "f: longitude").periodic).toBe(false);
  expect(makeAxis("longitude", run(0, 0.25, 1441), "f: longitude").periodic).toBe(false);
});

it.each([
  [
    [350, 355, 0, 5],
    [350, 355, 360, 365],
  ],
  [
    [170, 175, -180, -175],
    [170, 175, 180, 185],
  ],
  [
    [-170, -175, 180, 175],
    [-170, -175, -180, -185],
  ],
  [
    [0, 200],
    [0, 200],
  ],
])("longitudes %j unwrap to %j", (stored, unwrapped) => {
  expect([...makeAxis("longitude", stored, "f: longitude").values]).toEqual(unwrapped);
});

it("one value makes an axis without a step", () => {
  expect(makeAxis("latitude", [12], "f: latitude")).toMatchObject({ step: Number.NaN, even: true, periodic: false });
});

it.each([
  ["latitude", [], /f: x: expected at least one latitude/],
  ["latitude", [0, 91], /latitudes from -90 to 90, got 91 at index 1/],
  ["latitude", [0, 1, Number.NaN, 3], /finite latitude|latitudes from -90 to 90, got NaN at index 2/],
  ["longitude", [0, 1, 1, 2], /the same value 1 at indices 1 and 2/],
  ["longitude", [0, 2, 1, 3], /only rises, got 2 then 1 at indices 1 and 2/],
  ["latitude", [3, 1, 2, 0], /only falls, got 1 then 2 at indices 1 and 2/],
  ["longitude", [5, 5], /the same value 5 at indices 0 and 1/],
  ["longitude", [0, 120, 240, 361], /within one turn/],
] as const)("a %s axis of %j is refused by its first offence", (kind, values, message) => {
  expect(() => makeAxis(kind, values, "f: x")).toThrow(message);
});

it("a repeated date is refused and shown as a date", () => {
  expect(() => makeTimeAxis([0, 1, 1], "standard", "f: time")).toThrow(/the same value 1970-01-02 at indices 1 and 2/);
  expect(makeTimeAxis([0, 7, 14], "noleap", "f: time")).toMatchObject({ calendar: "noleap", step: 7, even: true });
});
