import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import type { Calendar } from "../../../core/model/calendar";
import { calendars, formatDay } from "../../../core/model/calendar";
import { daysFromValue, parseTimeUnits } from "../../../core/model/time-units";

const oracle = JSON.parse(readFileSync(new URL("../../reference/cftime-dates.json", import.meta.url), "utf8")) as {
  units: Record<Calendar, { units: string; value: number; days: number }[]>;
  months360: { value: number; days: number }[];
};

describe.each(calendars)("time units in the %s calendar", (calendar) => {
  it("mean the same instants as in cftime", () => {
    expect(oracle.units[calendar].length).toBeGreaterThan(100);
    for (const { units, value, days } of oracle.units[calendar]) {
      const ours = daysFromValue(parseTimeUnits(units, calendar, "f: time"), value);
      // cftime rounds to the microsecond, 1.2e-11 days; a double of 4e5 days holds 6e-11.
      expect(Math.abs(ours - days), `${value} ${units}`).toBeLessThan(2e-10);
    }
  });
});

it("months since are months of 30 days in the 360_day calendar", () => {
  const units = parseTimeUnits("months since 2000-01-16", "360_day", "f: time");
  for (const { value, days } of oracle.months360) expect(daysFromValue(units, value)).toBeCloseTo(days, 9);
});

it("months since are refused elsewhere until a reading is chosen, and the message says which there are", () => {
  const text = "months since 2000-01-31";
  expect(() => parseTimeUnits(text, "standard", "a.nc: time")).toThrow(
    /a\.nc: time.*fixed length.*months since.*UDUNITS/,
  );
  const calendarMonths = parseTimeUnits(text, "standard", "a.nc: time", "calendar");
  expect([0, 1, 2, 12, -1].map((value) => formatDay("standard", daysFromValue(calendarMonths, value)))).toEqual([
    "2000-01-31",
    "2000-02-29",
    "2000-03-31",
    "2001-01-31",
    "1999-12-31",
  ]);
  const udunits = parseTimeUnits("years since 2000-01-01", "standard", "a.nc: time", "udunits");
  expect(daysFromValue(udunits, 2) - daysFromValue(udunits, 0)).toBeCloseTo(2 * 365.242198781, 9);
});

it.each([
  "days after 1950-01-01",
  "fortnights since 1950-01-01",
  "days since yesterday",
  "days since 1950-02-30",
  "days since 1950-13-01",
  "days since 1582-10-10",
  "days since 1950-01-01 25:00",
  "",
])("the unit %j is refused with file and variable named", (text) => {
  expect(() => parseTimeUnits(text, "standard", "a.nc: time")).toThrow(/^a\.nc: time: expected/);
});
