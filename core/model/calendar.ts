/** CF-1.11 section 4.4.1 calendars; "gregorian" reads as "standard", "365_day" as "noleap", "366_day" as "all_leap". */
export const calendars = ["standard", "proleptic_gregorian", "julian", "noleap", "all_leap", "360_day"] as const;
export type Calendar = (typeof calendars)[number];

export interface CalendarDate {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
  readonly second: number;
}
