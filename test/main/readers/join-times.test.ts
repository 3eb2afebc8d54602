import { expect, it } from "vitest";
import { joinTimes } from "../../../main/readers/join-times";

const file = (path: string, days: ArrayLike<number>) => ({ path, days: Float64Array.from(days) });
const days = (count: number, first = 20000, step = 1) => Array.from({ length: count }, (_, i) => first + i * step);

it("float32 days are snapped to the step that they meant, and the largest distance is reported", () => {
  // Three-hourly times near day 20000 as float32: its spacing there is 0.002 days, so that errors reach 0.001.
  const meant = days(2000, 20000, 0.125 / 3);
  const stored = Float32Array.from(meant);
  const joined = joinTimes([file("a.nc", stored)], "standard");
  const largest = Math.max(...meant.map((day, i) => Math.abs(day - stored[i])));
  expect(largest).toBeGreaterThan(1e-4);
  joined.axis.values.forEach((day, i) => {
    expect(Math.abs(day - meant[i])).toBeLessThan(1e-9);
  });
  expect(joined.deviationDays).toBeCloseTo(largest, 9);
  expect(joined.axis.even).toBe(true);
  expect(joined.notes).toHaveLength(1);
});

it("missing dates are present and marked", () => {
  const joined = joinTimes([file("a.nc", [20000, 20001]), file("b.nc", [20004, 20005])], "standard");
  expect([...joined.axis.values]).toEqual(days(6));
  expect([...joined.fileOf]).toEqual([0, 0, -1, -1, 1, 1]);
  expect([...joined.localOf]).toEqual([0, 1, -1, -1, 0, 1]);
  expect(joined.notes).toContain("2 of 6 dates are missing");
});

it("files given in any order join in time", () => {
  const joined = joinTimes([file("b.nc", [20002, 20003]), file("a.nc", [20001, 20000])], "standard");
  expect([...joined.fileOf]).toEqual([1, 1, 0, 0]);
  expect([...joined.localOf]).toEqual([1, 0, 0, 1]);
});

it("of a date in two files the first named is kept, and both are told", () => {
  const joined = joinTimes([file("a.nc", [20000, 20001]), file("b.nc", [20000.000001, 20001, 20002])], "standard");
  expect([...joined.fileOf]).toEqual([0, 0, 1]);
  expect(joined.notes).toContain("2024-10-04 is in a.nc and again in b.nc: the first is kept");
  const reversed = joinTimes([file("b.nc", [20000.000001]), file("a.nc", [20000, 20001])], "standard");
  expect([...reversed.fileOf]).toEqual([0, 1]);
});

it("weekly dates keep their exact origin and step", () => {
  const joined = joinTimes([file("a.nc", days(100, 20000.5, 7))], "standard");
  expect(joined.axis).toMatchObject({ step: 7, even: true });
  expect(joined.axis.values[99]).toBe(20000.5 + 99 * 7);
  expect(joined.deviationDays).toBe(0);
});

it("irregular dates are kept as they are and said to be uneven", () => {
  const irregular = [0, 1, 1.6, 3, 4.45, 7];
  const joined = joinTimes([file("a.nc", irregular)], "standard");
  expect([...joined.axis.values]).toEqual(irregular);
  expect(joined.axis.even).toBe(false);
  expect(joined.deviationDays).toBe(0);
});

it("one date makes an axis", () => {
  const joined = joinTimes([file("a.nc", [20000])], "360_day");
  expect(joined.axis).toMatchObject({ step: Number.NaN, calendar: "360_day" });
});

it("a missing date and a stray one are refused with the file named", () => {
  expect(() => joinTimes([file("a.nc", [1, Number.NaN])], "standard")).toThrow(
    /a\.nc: expected a date for every map, got NaN at index 1/,
  );
  expect(() => joinTimes([file("a.nc", days(5)), file("b.nc", [9e6])], "standard")).toThrow(
    /a\.nc: expected dates of one record, got 2024-10-08, then .* in b\.nc/,
  );
});
