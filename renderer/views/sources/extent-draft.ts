import { formatNumber } from "../../../core/figure/format";
import type { Period, Region } from "../../../core/study/schema";

/** Region and period as typed; all four or two left blank means "all there is". */
export interface ExtentDraft {
  readonly west: string;
  readonly east: string;
  readonly south: string;
  readonly north: string;
  readonly from: string;
  readonly to: string;
}

export type ExtentFaults = Partial<Record<keyof ExtentDraft, string>>;

export interface ExtentReading {
  readonly region: Region | undefined;
  readonly period: Period | undefined;
  readonly faults: ExtentFaults;
}

export function draftOf(region: Region | undefined, period: Period | undefined): ExtentDraft {
  const text = (value: number | undefined): string => (value === undefined ? "" : String(value));
  return {
    west: text(region?.west),
    east: text(region?.east),
    south: text(region?.south),
    north: text(region?.north),
    from: period?.from ?? "",
    to: period?.to ?? "",
  };
}

const bounds = {
  west: [-360, 720],
  east: [-360, 720],
  south: [-90, 90],
  north: [-90, 90],
} as const;

/** Reads the fields; `faults` says in a sentence what is wrong with each, and is empty where all can be used. */
export function readExtent(draft: ExtentDraft): ExtentReading {
  const faults: { -readonly [Key in keyof ExtentFaults]: string } = {};
  const sides = ["west", "east", "south", "north"] as const;
  const region = { west: 0, east: 0, south: 0, north: 0 };
  const noRegion = sides.every((side) => draft[side].trim() === "");
  for (const side of noRegion ? [] : sides) {
    const number = draft[side].trim() === "" ? Number.NaN : Number(draft[side].replace("−", "-").replace(",", "."));
    const [least, most] = bounds[side];
    if (!(number >= least && number <= most))
      faults[side] = `A number of degrees from ${formatNumber(least, 0)} to ${formatNumber(most, 0)}.`;
    region[side] = number;
  }
  if (!faults.south && !faults.north && !noRegion && region.north <= region.south) {
    faults.north = "North must lie north of south.";
  }
  if (!faults.west && !faults.east && !noRegion && region.east === region.west) {
    faults.east = "East must differ from west.";
  }
  const noPeriod = draft.from.trim() === "" && draft.to.trim() === "";
  for (const end of noPeriod ? [] : (["from", "to"] as const)) {
    if (!isDateText(draft[end].trim())) faults[end] = "A date as 2031-03-01.";
  }
  if (!noPeriod && !faults.from && !faults.to && draft.to.trim() <= draft.from.trim()) {
    faults.to = "The end must come after the start.";
  }
  return {
    region: noRegion ? undefined : region,
    period: noPeriod ? undefined : { from: draft.from.trim(), to: draft.to.trim() },
    faults,
  };
}

/** The form of a date; whether the record's calendar has it is for the engine to say. */
function isDateText(text: string): boolean {
  const parts = /^\d{4}-(\d{2})-(\d{2})$/.exec(text);
  return (
    parts !== null && Number(parts[1]) >= 1 && Number(parts[1]) <= 12 && Number(parts[2]) >= 1 && Number(parts[2]) <= 31
  );
}
