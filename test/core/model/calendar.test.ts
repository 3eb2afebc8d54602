import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import type { Calendar, CalendarDate } from "../../../core/model/calendar";
import {
  calendarFromName,
  calendars,
  dateExists,
  dateFromDays,
  daysFromDate,
  formatDay,
} from "../../../core/model/calendar";

interface DateRow {
  readonly date: readonly number[];
  readonly exists: boolean;
  readonly days: number;
  readonly seconds: number;
}

const oracle = JSON.parse(readFileSync(new URL("../../reference/cftime-dates.json", import.meta.url), "utf8")) as {
  dates: Record<Calendar, DateRow[]>;
};

function asDate([year, month, day, hour, minute, second, microsecond]: readonly number[]): CalendarDate {
  return { year, month, day, hour, minute, second: second + microsecond / 1e6 };
}

describe.each(calendars)("the %s calendar", (calendar) => {
  const rows = oracle.dates[calendar];

  it("has exactly the dates that cftime has", () => {
    for (const row of rows) expect([row.date, dateExists(calendar, asDate(row.date))]).toEqual([row.date, row.exists]);
  });

  it("counts days as cftime does", () => {
    for (const row of rows.filter(({ exists }) => exists)) {
      const days = daysFromDate(calendar, asDate(row.date));
      // A double holds a day count of 4e7 to 7e-9 days.
      expect(Math.abs(days - (row.days + row.seconds / 86400)), `${row.date}`).toBeLessThan(1e-8);
    }
  });

  it("gives the date back from the day count, to the millisecond", () => {
    for (const row of rows.filter(({ exists }) => exists)) {
      const date = asDate(row.date);
      const back = dateFromDays(calendar, row.days + row.seconds / 86400);
      expect({ ...back, second: 0 }).toEqual({ ...date, second: 0 });
      expect(Math.abs(back.second - date.second)).toBeLessThan(1.1e-3);
    }
  });

  it("runs through every day of six centuries without a step back or a day left out", () => {
    let previous = dateFromDays(calendar, -150_000);
    for (let days = -149_999; days < 70_000; days++) {
      const date = dateFromDays(calendar, days);
      const next = previous.month === date.month ? previous.day + 1 : 1;
      const afterSwitch = calendar === "standard" && date.year === 1582 && date.month === 10 && date.day === 15;
      if (date.day !== (afterSwitch ? 15 : next) || daysFromDate(calendar, date) !== days) {
        expect.fail(`${formatDay(calendar, days)} after ${formatDay(calendar, days - 1)}`);
      }
      previous = date;
    }
  });
});

it("the CF aliases of calendars are understood, no calendar is the standard one, others are refused", () => {
  expect(calendarFromName("Gregorian", "f: time")).toBe("standard");
  expect(calendarFromName("", "f: time")).toBe("standard");
  expect(calendarFromName("365_day", "f: time")).toBe("noleap");
  expect(calendarFromName("366_day", "f: time")).toBe("all_leap");
  expect(() => calendarFromName("lunar", "f: time")).toThrow(/f: time.*CF calendar.*"lunar"/);
});

it("1993-01-01 and 2012-12-31 are 15706 and 23010 days after 1950-01-01", () => {
  const from1950 = (year: number, month: number, day: number) =>
    daysFromDate("standard", { year, month, day, hour: 0, minute: 0, second: 0 }) -
    daysFromDate("standard", { year: 1950, month: 1, day: 1, hour: 0, minute: 0, second: 0 });
  expect(from1950(1993, 1, 1)).toBe(15706);
  expect(from1950(2012, 12, 31)).toBe(23010);
});

it("a day is shown as its date, with the time only where it is not midnight", () => {
  const days = daysFromDate("standard", { year: 2031, month: 5, day: 24, hour: 0, minute: 0, second: 0 });
  expect(formatDay("standard", days)).toBe("2031-05-24");
  expect(formatDay("standard", days + 0.25)).toBe("2031-05-24 06:00");
  expect(formatDay("standard", days + 0.25 + 5 / 86400)).toBe("2031-05-24 06:00:05");
  expect(formatDay("standard", days - 1e-7)).toBe("2031-05-24");
});
