import {
  type Calendar,
  type CalendarDate,
  dateExists,
  dateFromDays,
  daysFromDate,
  daysInMonth,
} from "../model/calendar";
import type { Tick } from "./ticks";

export const monthNames = [
  "January",
  "February",
  "March",
  "April",
  "May",
  "June",
  "July",
  "August",
  "September",
  "October",
  "November",
  "December",
] as const;

/** Candidate steps from fine to coarse; days restart with every month, so that a tick always falls on the first. */
const steps = [
  { unit: "day", count: 1 },
  { unit: "day", count: 2 },
  { unit: "day", count: 5 },
  { unit: "day", count: 10 },
  { unit: "month", count: 1 },
  { unit: "month", count: 2 },
  { unit: "month", count: 3 },
  { unit: "month", count: 6 },
  { unit: "year", count: 1 },
  { unit: "year", count: 2 },
  { unit: "year", count: 5 },
  { unit: "year", count: 10 },
  { unit: "year", count: 20 },
  { unit: "year", count: 50 },
  { unit: "year", count: 100 },
] as const;

type Step = (typeof steps)[number];

/** "24 May 2032": day, month and year in English, whatever the machine's locale and time zone. */
export function formatDate(calendar: Calendar, days: number): string {
  const date = dateFromDays(calendar, days);
  return `${date.day} ${monthNames[date.month - 1]} ${date.year}`;
}

/**
 * Ticks of a time scale from `from` to `to` (days since 1970-01-01 in the calendar), at the finest step whose labels keep
 * apart. `fits` says whether a list of ticks may be drawn. January carries the year; months are written out where that
 * fits, else cut to three letters.
 */
export function timeTicks(
  calendar: Calendar,
  from: number,
  to: number,
  fits: (ticks: readonly Tick[]) => boolean,
): Tick[] {
  // A step this much finer than the span cannot fit; skipping it saves listing thousands of days.
  const most = 60;
  for (const step of steps) {
    if ((to - from) / approximateDays(step) > most) continue;
    const dates = stepDates(calendar, from, to, step);
    for (const letters of [9, 3]) {
      const ticks = dates.map(({ value, date }) => ({ value, label: label(date, step, letters) }));
      if (fits(ticks)) return ticks;
    }
  }
  return [];
}

function approximateDays(step: Step): number {
  return step.count * { day: 1, month: 30, year: 365 }[step.unit];
}

function label(date: CalendarDate, step: Step, letters: number): string {
  if (step.unit === "year") return String(date.year);
  if (date.day === 1 && date.month === 1) return String(date.year);
  const month = monthNames[date.month - 1].slice(0, letters);
  return step.unit === "day" ? `${date.day} ${month}` : month;
}

function stepDates(calendar: Calendar, from: number, to: number, step: Step) {
  const first = dateFromDays(calendar, from);
  const last = dateFromDays(calendar, to);
  const found: { value: number; date: CalendarDate }[] = [];
  const add = (year: number, month: number, day: number) => {
    const date = { year, month, day, hour: 0, minute: 0, second: 0 };
    // The standard calendar has no 5 to 14 October 1582.
    if (!dateExists(calendar, date)) return;
    const value = daysFromDate(calendar, date);
    if (value >= from && value <= to) found.push({ value, date });
  };
  for (let year = first.year; year <= last.year; year++) {
    if (step.unit === "year") {
      if (year % step.count === 0) add(year, 1, 1);
      continue;
    }
    for (let month = 1; month <= 12; month++) {
      if (step.unit === "month") {
        if ((month - 1) % step.count === 0) add(year, month, 1);
        continue;
      }
      for (const day of monthDays(step.count, daysInMonth(calendar, year, month))) add(year, month, day);
    }
  }
  return found;
}

/** Days of a month that a step of whole days marks: from the first, and none so late that the next first is crowded. */
function monthDays(count: 1 | 2 | 5 | 10, length: number): number[] {
  if (count === 1) return Array.from({ length }, (_, index) => index + 1);
  if (count === 2) return Array.from({ length: 14 }, (_, index) => 2 * index + 1);
  return count === 5 ? [1, 5, 10, 15, 20, 25] : [1, 10, 20];
}
