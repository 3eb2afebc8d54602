import type { RecordOverview } from "../../core/contract/engine";
import { counted, decimalsForStep, formatNumber } from "../../core/figure/format";
import { boxText, gridText } from "../../core/figure/record-text";
import { formatDate } from "../../core/figure/time-ticks";
import type { Study } from "../../core/study/schema";

type RecordAxes = Pick<RecordOverview, "latitude" | "longitude" | "time">;

/** A record in a line: "20–41° N, 150–125° W · 900 days". */
export function recordText(record: RecordAxes): string {
  const { time } = record;
  const days = Math.round(time.values.length * Math.abs(time.step || 1));
  return `${boxText(record)} · ${counted(days, "day")}`;
}

/** A grid's label, with its spacing and sampling once they are known: "Grid A · 0.125° · 3 d". */
export function gridTitle(study: Study, id: string, record: RecordAxes | null): string {
  const name = study.grids.find((grid) => grid.id === id)?.label || `Grid ${id}`;
  return record ? gridText(name, record) : name;
}

/** First and last date of a time axis; one date stands alone. */
export function periodText(time: RecordOverview["time"]): string {
  const { values, calendar } = time;
  if (values.length === 1) return formatDate(calendar, values[0]);
  return `${formatDate(calendar, values[0])} to ${formatDate(calendar, values[values.length - 1])}`;
}

/** How many dates and how far apart: "300 dates, every 3 days", "30 dates, daily", "one date". */
export function datesText(time: RecordOverview["time"]): string {
  const count = time.values.length;
  return count === 1 ? samplingText(time) : `${counted(count, "date")}, ${samplingText(time)}`;
}

/** "every 3 days", "daily", "one date". */
export function samplingText(time: RecordOverview["time"]): string {
  const step = Math.abs(time.step);
  if (!Number.isFinite(step)) return "one date";
  return step === 1 ? "daily" : `every ${formatNumber(step, Math.min(2, decimalsForStep(step)))} days`;
}

/** Bytes in the unit a person would say. */
export function bytesText(bytes: number): string {
  const units = ["bytes", "kB", "MB", "GB", "TB"];
  const power = bytes > 0 ? Math.min(4, Math.floor(Math.log10(bytes) / 3)) : 0;
  return `${formatNumber(bytes / 1000 ** power, power < 2 ? 0 : 1)} ${units[power]}`;
}
