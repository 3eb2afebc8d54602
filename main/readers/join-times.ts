import type { TimeAxis } from "../../core/model/axis";
import { makeTimeAxis } from "../../core/model/axis";
import type { Calendar } from "../../core/model/calendar";
import { formatDay } from "../../core/model/calendar";
import { fileFault } from "./faults";

/** Dates closer than about a second are one date. */
const sameDateDays = 1e-5;
/** Dates may lie this share of a step from a regular step and still be snapped to it. */
const snapShare = 0.1;

export interface JoinedTimes {
  /** On a regular step, missing dates present, where the dates fit one; else the dates as they are and `even` false. */
  readonly axis: TimeAxis;
  /** File and index within the file of each date; -1 where no file has it. */
  readonly fileOf: Int32Array;
  readonly localOf: Int32Array;
  readonly deviationDays: number;
  readonly notes: readonly string[];
}

interface Entry {
  readonly day: number;
  readonly file: number;
  readonly local: number;
}

/**
 * Joins the dates of many files, which must share `calendar`, into one ascending axis. Of dates that occur twice the one in
 * the first file is kept. The step is the median one, refined over the whole record and rounded to whole days, hours, minutes or
 * seconds where that fits as well; dates within a tenth of a step of it are snapped to it (the largest distance is
 * reported), others are left as they are. Throws a Fault (tag "file") for a date that is missing or so far from the others that the
 * axis would be nearly empty.
 */
export function joinTimes(files: readonly { path: string; days: Float64Array }[], calendar: Calendar): JoinedTimes {
  const { entries, notes } = sortedEntries(files, calendar);
  const days = entries.map(({ day }) => day);
  const fitted = fitStep(days);
  if (!fitted) {
    if (entries.length > 1) notes.push("the dates are on no regular step and are kept as they are");
    return {
      axis: makeTimeAxis(days, calendar, files[0].path),
      fileOf: Int32Array.from(entries, ({ file }) => file),
      localOf: Int32Array.from(entries, ({ local }) => local),
      deviationDays: 0,
      notes,
    };
  }
  const { origin, step, steps, deviationDays } = fitted;
  const length = steps[steps.length - 1] + 1;
  if (length > 100 * entries.length + 1000) throw nearlyEmpty(files, entries, calendar);
  const fileOf = new Int32Array(length).fill(-1);
  const localOf = new Int32Array(length).fill(-1);
  entries.forEach(({ file, local }, i) => {
    fileOf[steps[i]] = file;
    localOf[steps[i]] = local;
  });
  if (length > entries.length) notes.push(`${length - entries.length} of ${length} dates are missing`);
  if (deviationDays > 1e-5) notes.push(`dates lie up to ${deviationDays.toPrecision(2)} days from their regular step`);
  const values = Float64Array.from({ length }, (_, i) => origin + i * step);
  return { axis: makeTimeAxis(values, calendar, files[0].path), fileOf, localOf, deviationDays, notes };
}

function sortedEntries(files: readonly { path: string; days: Float64Array }[], calendar: Calendar) {
  const all: Entry[] = [];
  files.forEach(({ path, days }, file) => {
    days.forEach((day, local) => {
      if (!Number.isFinite(day)) {
        const got = `${day} at index ${local}`;
        throw fileFault(path, "a date for every map", got, "mend the time variable or leave the file out");
      }
      all.push({ day, file, local });
    });
  });
  if (all.length === 0) throw fileFault(files[0]?.path ?? "", "at least one date", "none", "choose files with data");
  all.sort((a, b) => a.day - b.day || a.file - b.file || a.local - b.local);
  const entries: Entry[] = [];
  const notes: string[] = [];
  let repeated = 0;
  for (const entry of all) {
    const previous = entries.at(-1);
    if (!previous || entry.day - previous.day > sameDateDays) {
      entries.push(entry);
      continue;
    }
    repeated++;
    const [kept, left] = entry.file < previous.file ? [entry, previous] : [previous, entry];
    entries[entries.length - 1] = kept;
    if (repeated <= 3) {
      notes.push(
        `${formatDay(calendar, kept.day)} is in ${files[kept.file].path} and again in ${files[left.file].path}: the first is kept`,
      );
    }
  }
  if (repeated > 3) notes.push(`${repeated} dates occur more than once: the first is kept each time`);
  return { entries, notes };
}

interface Fit {
  readonly origin: number;
  readonly step: number;
  /** Number of steps from the origin, by date. */
  readonly steps: readonly number[];
  readonly deviationDays: number;
}

/** The regular step that the ascending `days` lie on; null where they lie on none, or there is one date only. */
function fitStep(days: readonly number[]): Fit | null {
  if (days.length < 2) return null;
  const differences = days.slice(1).map((day, i) => day - days[i]);
  const median = [...differences].sort((a, b) => a - b)[(differences.length - 1) >> 1];
  // Counted from date to date: an error of the median step does not add up over the record.
  const steps = [0];
  for (const difference of differences) {
    const count = Math.round(difference / median);
    if (count < 1) return null;
    steps.push(steps[steps.length - 1] + count);
  }
  const total = steps[steps.length - 1];
  const fitted = fitOrigin(days, steps, (days[days.length - 1] - days[0]) / total);
  let best = fitted;
  for (const unit of [1, 1 / 24, 1 / 1440, 1 / 86400]) {
    const rounded = fitOrigin(days, steps, Math.round(fitted.step / unit) * unit);
    if (rounded.step === 0 || !fitsAsWell(rounded.deviationDays, fitted.deviationDays)) continue;
    best = rounded;
    break;
  }
  return best.deviationDays <= snapShare * best.step ? best : null;
}

function fitsAsWell(deviation: number, reference: number): boolean {
  return deviation <= 1.5 * reference + 1e-6;
}

/** The origin that makes the largest distance smallest, rounded to an hour, minute or second where that fits as well. */
function fitOrigin(days: readonly number[], steps: readonly number[], step: number): Fit {
  let [lowest, highest] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  days.forEach((day, i) => {
    lowest = Math.min(lowest, day - steps[i] * step);
    highest = Math.max(highest, day - steps[i] * step);
  });
  const middle = (lowest + highest) / 2;
  const distance = (origin: number) => Math.max(Math.abs(highest - origin), Math.abs(lowest - origin));
  const perDay = [24, 1440, 86400].find((count) =>
    fitsAsWell(distance(Math.round(middle * count) / count), distance(middle)),
  );
  const origin = perDay === undefined ? middle : Math.round(middle * perDay) / perDay;
  return { origin, step, steps, deviationDays: distance(origin) };
}

function nearlyEmpty(files: readonly { path: string }[], entries: readonly Entry[], calendar: Calendar) {
  let widest = 1;
  for (let i = 2; i < entries.length; i++) {
    if (entries[i].day - entries[i - 1].day > entries[widest].day - entries[widest - 1].day) widest = i;
  }
  const [before, after] = [entries[widest - 1], entries[widest]];
  const got = `${formatDay(calendar, before.day)}, then ${formatDay(calendar, after.day)} in ${files[after.file].path}`;
  return fileFault(files[before.file].path, "dates of one record", got, "leave out the file with the stray date");
}
