import type { Calendar } from "./calendar";

/** Mean length of a year in days, by calendar (CF-1.11 section 4.4.1; Gregorian year 365.2425 days). */
const yearDays: Readonly<Record<Calendar, number>> = {
  standard: 365.2425,
  proleptic_gregorian: 365.2425,
  julian: 365.25,
  noleap: 365,
  all_leap: 366,
  "360_day": 360,
};

export function yearLengthDays(calendar: Calendar): number {
  return yearDays[calendar];
}
