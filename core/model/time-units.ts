import type { Calendar, CalendarDate } from "./calendar";
import { dateExists, dateFromDays, daysFromDate, daysInMonth } from "./calendar";
import { Fault } from "./errors";

/**
 * What "months since" and "years since" shall mean outside the 360_day calendar, where CF-1.11 section 4.4 advises
 * against them: refuse; count calendar months (a fraction is a share of its month); or the UDUNITS year of
 * 365.242198781 days and its twelfth.
 */
export const monthReadings = ["refuse", "calendar", "udunits"] as const;
export type MonthReading = (typeof monthReadings)[number];

/** "<unit> since <reference>", understood. Plain data. */
export interface TimeUnits {
  readonly calendar: Calendar;
  /** The reference instant in days since 1970-01-01T00:00 of the calendar, zone taken off. */
  readonly referenceDays: number;
  readonly step:
    | { readonly kind: "fixed"; readonly unitsPerDay: number }
    | { readonly kind: "months"; readonly monthsPerUnit: number };
}

const unitsPerDay = new Map<string, number>();
for (const [count, names] of [
  [1, "day days d"],
  [24, "hour hours hr hrs h"],
  [1440, "minute minutes min mins"],
  [86_400, "second seconds sec secs s"],
  [86_400e3, "millisecond milliseconds millisec millisecs msec ms"],
  [86_400e6, "microsecond microseconds microsec microsecs us"],
] as const) {
  for (const name of names.split(" ")) unitsPerDay.set(name, count);
}

const monthsPerUnit = new Map(Object.entries({ month: 1, months: 1, mon: 1, year: 12, years: 12, yr: 12 }));

const udunitsYearDays = 365.242198781;

/**
 * Reads a CF time unit. The reference is year-month-day with an optional time, fraction and zone (Z, UTC, GMT, +hh:mm,
 * +hhmm, +hh). `where` names file and variable in the Fault (tag "file") for an unknown unit, a date that the calendar
 * does not have, or months and years while `months` is "refuse".
 */
export function parseTimeUnits(
  text: string,
  calendar: Calendar,
  where: string,
  months: MonthReading = "refuse",
): TimeUnits {
  const fault = (expected: string, advice: string) =>
    new Fault({ tag: "file", where, expected, got: `"${text.slice(0, 100)}"`, advice });
  const parts = /^\s*([A-Za-z]+)\s+since\s+(\S.*?)\s*$/i.exec(text);
  if (!parts) throw fault('a time unit as "days since 1950-01-01"', "correct the units attribute");
  const unit = parts[1].toLowerCase();
  const referenceDays = parseReference(parts[2], calendar);
  if (referenceDays === null) {
    throw fault(`a reference date of the ${calendar} calendar`, "correct the units attribute");
  }
  const fixed = unitsPerDay.get(unit);
  if (fixed !== undefined) return { calendar, referenceDays, step: { kind: "fixed", unitsPerDay: fixed } };
  const perUnit = monthsPerUnit.get(unit);
  if (perUnit === undefined) {
    throw fault("days, hours, minutes, seconds, milli- or microseconds", "correct the units attribute");
  }
  if (calendar === "360_day") {
    return { calendar, referenceDays, step: { kind: "fixed", unitsPerDay: 1 / (30 * perUnit) } };
  }
  if (months === "refuse") {
    const advice = "say how to read them: as calendar months or as the UDUNITS year of 365.2422 days";
    throw fault(`a unit of fixed length in the ${calendar} calendar`, advice);
  }
  if (months === "udunits") {
    return { calendar, referenceDays, step: { kind: "fixed", unitsPerDay: 12 / perUnit / udunitsYearDays } };
  }
  return { calendar, referenceDays, step: { kind: "months", monthsPerUnit: perUnit } };
}

/** Days since 1970-01-01T00:00 of the units' calendar. NaN stays NaN. */
export function daysFromValue(units: TimeUnits, value: number): number {
  if (units.step.kind === "fixed") return units.referenceDays + value / units.step.unitsPerDay;
  if (!Number.isFinite(value)) return Number.NaN;
  const count = value * units.step.monthsPerUnit;
  const whole = Math.floor(count);
  const start = addMonths(units, whole);
  return start + (count - whole) * (addMonths(units, whole + 1) - start);
}

/** The reference moved by whole months; a day that the month does not have becomes its last. */
function addMonths({ calendar, referenceDays }: TimeUnits, count: number): number {
  const reference = dateFromDays(calendar, referenceDays);
  const month = reference.month - 1 + count;
  const year = reference.year + Math.floor(month / 12);
  const inYear = (((month % 12) + 12) % 12) + 1;
  const day = Math.min(reference.day, daysInMonth(calendar, year, inYear));
  return daysFromDate(calendar, { ...reference, year, month: inYear, day });
}

const referencePattern =
  /^([+-]?\d{1,6})-(\d{1,2})-(\d{1,2})(?:(?:\s*T\s*|\s+)(\d{1,2})(?::(\d{1,2})(?::(\d{1,2}(?:\.\d*)?))?)?)?\s*(?:(?:Z|UTC|GMT)|([+-])(\d{1,2})(?::?(\d{2}))?)?$/i;

function parseReference(text: string, calendar: Calendar): number | null {
  const parts = referencePattern.exec(text);
  if (!parts) return null;
  const number = (i: number) => Number(parts[i] ?? 0);
  const date: CalendarDate = {
    year: number(1),
    month: number(2),
    day: number(3),
    hour: number(4),
    minute: number(5),
    second: number(6),
  };
  if (!dateExists(calendar, date)) return null;
  const zoneDays = ((parts[7] === "-" ? -1 : 1) * (number(8) * 60 + number(9))) / 1440;
  return daysFromDate(calendar, date) - zoneDays;
}
