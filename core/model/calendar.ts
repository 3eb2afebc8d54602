import { Fault } from "./errors";

/** CF-1.11 section 4.4.1 calendars; "gregorian" reads as "standard", "365_day" as "noleap", "366_day" as "all_leap". */
export const calendars = ["standard", "proleptic_gregorian", "julian", "noleap", "all_leap", "360_day"] as const;
export type Calendar = (typeof calendars)[number];

/** Years are counted astronomically: 0 is the year before 1, in every calendar. Months and days start at 1. */
export interface CalendarDate {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
  readonly second: number;
}

const aliases: Record<string, Calendar> = { gregorian: "standard", "365_day": "noleap", "366_day": "all_leap" };

/** The calendar a file names ("" means the standard one, as CF says). Throws a Fault for one that CF does not know. */
export function calendarFromName(name: string, where: string): Calendar {
  const key = name.trim().toLowerCase() || "standard";
  const found = aliases[key] ?? calendars.find((calendar) => calendar === key);
  if (found) return found;
  const expected = `a CF calendar (${[...calendars, ...Object.keys(aliases)].join(", ")})`;
  throw new Fault({ tag: "file", where, expected, got: `"${name}"`, advice: "correct the calendar attribute" });
}

/**
 * Days from 1970-01-01T00:00 to `date`, both in `calendar`. The standard calendar is Julian up to 4 October 1582 and
 * Gregorian from 15 October 1582 (CF-1.11 section 4.4.1). Throws a RangeError for a date the calendar does not have.
 */
export function daysFromDate(calendar: Calendar, date: CalendarDate): number {
  if (!dateExists(calendar, date)) {
    throw new RangeError(`no ${date.year}-${date.month}-${date.day} in the ${calendar} calendar`);
  }
  const seconds = date.hour * 3600 + date.minute * 60 + date.second;
  return dayNumber(calendar, date) - epochDay(calendar) + seconds / 86400;
}

/** Inverse of `daysFromDate`, rounded to the nearest millisecond (a double of days holds no more in far years). */
export function dateFromDays(calendar: Calendar, days: number): CalendarDate {
  let whole = Math.floor(days);
  let milliseconds = Math.round((days - whole) * 86_400_000);
  if (milliseconds >= 86_400_000) {
    whole += 1;
    milliseconds -= 86_400_000;
  }
  const { year, month, day } = dateOfDayNumber(calendar, whole + epochDay(calendar));
  const hour = Math.floor(milliseconds / 3_600_000);
  const minute = Math.floor(milliseconds / 60_000) % 60;
  return { year, month, day, hour, minute, second: (milliseconds % 60_000) / 1000 };
}

/** "2031-05-24", with the time to the nearest second where it is not midnight: "2031-05-24 06:00", "… 06:00:05". */
export function formatDay(calendar: Calendar, days: number): string {
  const { year, month, day, hour, minute, second } = dateFromDays(calendar, Math.round(days * 86400) / 86400);
  const two = (value: number) => `${Math.round(value)}`.padStart(2, "0");
  const signedYear = `${year < 0 ? "-" : ""}${`${Math.abs(year)}`.padStart(4, "0")}`;
  const date = `${signedYear}-${two(month)}-${two(day)}`;
  if (hour === 0 && minute === 0 && second < 0.5) return date;
  return `${date} ${two(hour)}:${two(minute)}${second >= 0.5 ? `:${two(second)}` : ""}`;
}

/** Whether `calendar` has this day and the time of day is one. */
export function dateExists(calendar: Calendar, date: CalendarDate): boolean {
  const { year, month, day, hour, minute, second } = date;
  if (![year, month, day, hour, minute].every(Number.isInteger)) return false;
  if (month < 1 || month > 12 || day < 1 || day > daysInMonth(calendar, year, month)) return false;
  if (calendar === "standard" && year === 1582 && month === 10 && day > 4 && day < 15) return false;
  return hour >= 0 && hour < 24 && minute >= 0 && minute < 60 && second >= 0 && second < 60;
}

/** Days of the month; in the standard calendar October 1582 ends on the 31st though it misses ten days. */
export function daysInMonth(calendar: Calendar, year: number, month: number): number {
  if (calendar === "360_day") return 30;
  const february = isLeap(calendar, year) ? 29 : 28;
  return [31, february, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1];
}

function isLeap(calendar: Calendar, year: number): boolean {
  if (calendar === "all_leap") return true;
  if (calendar === "noleap") return false;
  const julian = calendar === "julian" || (calendar === "standard" && year < 1583);
  return year % 4 === 0 && (julian || year % 100 !== 0 || year % 400 === 0);
}

type YearMonthDay = Pick<CalendarDate, "year" | "month" | "day">;

/** The plain Julian count runs this far ahead: taken off, 4 October 1582 is followed by 15 October Gregorian. */
const julianShift = 2;
const firstGregorianDay = gregorianDay({ year: 1582, month: 10, day: 15 });

function epochDay(calendar: Calendar): number {
  return dayNumber(calendar, { year: 1970, month: 1, day: 1 });
}

/** A running count of days, exact for whole years to 1e12; its zero differs between calendars. */
function dayNumber(calendar: Calendar, date: YearMonthDay): number {
  switch (calendar) {
    case "proleptic_gregorian":
      return gregorianDay(date);
    case "julian":
      return julianDay(date);
    case "standard": {
      const gregorian = gregorianDay(date);
      return gregorian >= firstGregorianDay ? gregorian : julianDay(date);
    }
    case "360_day":
      return date.year * 360 + (date.month - 1) * 30 + date.day - 1;
    default: {
      let days = date.year * (calendar === "noleap" ? 365 : 366) + date.day - 1;
      for (let month = 1; month < date.month; month++) days += daysInMonth(calendar, date.year, month);
      return days;
    }
  }
}

function dateOfDayNumber(calendar: Calendar, days: number): YearMonthDay {
  switch (calendar) {
    case "proleptic_gregorian":
      return gregorianDate(days);
    case "julian":
      return julianDate(days);
    case "standard":
      return days >= firstGregorianDay ? gregorianDate(days) : julianDate(days);
    case "360_day": {
      const rest = modulo(days, 360);
      return { year: (days - rest) / 360, month: Math.floor(rest / 30) + 1, day: (rest % 30) + 1 };
    }
    default: {
      const length = calendar === "noleap" ? 365 : 366;
      let rest = modulo(days, length);
      const year = (days - rest) / length;
      let month = 1;
      for (; rest >= daysInMonth(calendar, year, month); month++) rest -= daysInMonth(calendar, year, month);
      return { year, month, day: rest + 1 };
    }
  }
}

/** Day of a year that starts on 1 March, so that the leap day is its last: 153 days make five months. */
function marchDay({ year, month, day }: YearMonthDay): { marchYear: number; dayOfYear: number } {
  const marchMonth = (month + 9) % 12;
  return { marchYear: month < 3 ? year - 1 : year, dayOfYear: Math.floor((153 * marchMonth + 2) / 5) + day - 1 };
}

function fromMarchDay(marchYear: number, dayOfYear: number): YearMonthDay {
  const marchMonth = Math.floor((5 * dayOfYear + 2) / 153);
  const month = marchMonth < 10 ? marchMonth + 3 : marchMonth - 9;
  const day = dayOfYear - Math.floor((153 * marchMonth + 2) / 5) + 1;
  return { year: month < 3 ? marchYear + 1 : marchYear, month, day };
}

function gregorianDay(date: YearMonthDay): number {
  const { marchYear, dayOfYear } = marchDay(date);
  return (
    marchYear * 365 + Math.floor(marchYear / 4) - Math.floor(marchYear / 100) + Math.floor(marchYear / 400) + dayOfYear
  );
}

function gregorianDate(days: number): YearMonthDay {
  const inFourCenturies = modulo(days, 146_097);
  const century = Math.min(3, Math.floor(inFourCenturies / 36_524));
  const inCentury = inFourCenturies - century * 36_524;
  const fourYears = Math.floor(inCentury / 1461);
  const inFourYears = inCentury - fourYears * 1461;
  const year = Math.min(3, Math.floor(inFourYears / 365));
  const marchYear = ((days - inFourCenturies) / 146_097) * 400 + century * 100 + fourYears * 4 + year;
  return fromMarchDay(marchYear, inFourYears - year * 365);
}

function julianDay(date: YearMonthDay): number {
  const { marchYear, dayOfYear } = marchDay(date);
  return marchYear * 365 + Math.floor(marchYear / 4) + dayOfYear - julianShift;
}

function julianDate(days: number): YearMonthDay {
  const shifted = days + julianShift;
  const inFourYears = modulo(shifted, 1461);
  const year = Math.min(3, Math.floor(inFourYears / 365));
  return fromMarchDay(((shifted - inFourYears) / 1461) * 4 + year, inFourYears - year * 365);
}

function modulo(value: number, length: number): number {
  return ((value % length) + length) % length;
}
