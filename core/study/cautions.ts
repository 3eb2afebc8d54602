import { formatDay } from "../model/calendar";
import { Fault } from "../model/errors";
import { bridgedDates, timeFilter } from "./band";
import { geometryOf } from "./geometry";
import type { HeightRecord } from "./record";
import { shortScaleChange } from "./scales/short-scale-change";
import { aliasesInBand } from "./scales/tidal-aliases";
import type { Study } from "./schema";
import { filtersInSpace } from "./space-filter";

export interface Caution {
  readonly id: string;
  readonly text: string;
}

/** Ratio of short-scale variance, last third to first, beyond which maps count as made from unlike data. Our choice, no source. */
const unlikeRatio = 1.5;

type Rule = (study: Study, record: HeightRecord) => string | null;

const rules: Readonly<Record<string, Rule>> = {
  standing: () =>
    "Geostrophic part only: no wind drift, tides, inertial or wave-driven motion. Not for navigation or operations at sea; follow local rules and licensed practice.",
  resolution: ({ band, scales }) =>
    band.filter !== "none" && (band.shortestDays ?? 0) < scales.resolvedDays
      ? `The band starts at ${band.shortestDays ?? 0} days; mapped heights hold little true signal below about ${scales.resolvedDays} days and ${scales.resolvedKm} km.`
      : null,
  resolutionInSpace: ({ space, scales }) => {
    const below = [space.meridional, space.zonal].flatMap((side) =>
      side && (side.shortestKm ?? 0) < scales.resolvedKm ? [side.shortestKm ?? 0] : [],
    );
    return below.length > 0
      ? `The filter in space keeps wavelengths from ${Math.min(...below)} km; the mapping resolves about ${scales.resolvedKm} km.`
      : null;
  },
  tides: ({ band, scales }) => {
    if (band.filter === "none") return null;
    const aliases = aliasesInBand(scales.repeatDays, band.shortestDays, band.longestDays);
    const words = aliases.map(
      ({ tide, repeatDays, periodDays }) =>
        `${tide} ${periodDays.toFixed(1)} (repeat ${Number(repeatDays.toFixed(2))})`,
    );
    return words.length > 0
      ? `What tides are left in the heights shows at these periods in the band, in days: ${words.join(", ")}.`
      : null;
  },
  unlikeMaps: (_, record) => {
    const ratio = shortScaleChange(record);
    if (!(ratio > unlikeRatio || ratio < 1 / unlikeRatio)) return null;
    const [word, factor] = ratio > 1 ? ["more", ratio] : ["less", 1 / ratio];
    return `Scales below about 200 km hold ${factor.toFixed(1)} times ${word} variance in the last third of the record than in the first: the number of altimeters may have changed, and trends in eddies and jets may be its own.`;
  },
  shortRecord: ({ band }, { time, cube }) => {
    const days = cube.dates * time.step;
    const { longestDays } = band;
    if (band.filter === "none" || longestDays === null) return null;
    return days < 10 * longestDays
      ? `The record of ${Math.round(days)} days holds ${(days / longestDays).toFixed(1)} of the longest period kept (${longestDays} days); ten or more are wanted for firm statistics.`
      : null;
  },
  annualFit: ({ background }, { time, cube }) => {
    const days = cube.dates * time.step;
    return (background.annual || background.semiannual) && days < 730
      ? `An annual cycle fitted to ${Math.round(days)} days also takes up slow changes that are not annual.`
      : null;
  },
  equator: ({ geostrophy }, { axes }) => {
    const { blanked, equatorBlend, equatorNote } = geometryOf(axes, geostrophy);
    const rows = blanked.reduce((sum, flag) => sum + flag, 0);
    if (rows === 0) return null;
    const belt = `within ${geostrophy.equatorDegrees}° of the equator`;
    if (equatorBlend)
      return `Velocities near the equator come in part from a beta-plane fit (15 % is a fair error there); what divides by f is blank ${belt}.`;
    const why = equatorNote ? ` The blend asked for was not made: ${equatorNote}.` : "";
    return `${rows} rows ${belt} are blank: f vanishes there.${why}`;
  },
  gaps: ({ band }, { hasData, time }) => {
    const missing = hasData.length - hasData.reduce((sum, flag) => sum + flag, 0);
    if (missing === 0) return null;
    const first = formatDay(time.calendar, time.values[hasData.indexOf(0)]);
    const bridged = bridgedDates(band, { time, hasData }).reduce((sum, flag) => sum + flag, 0);
    const reached =
      band.filter === "none"
        ? ""
        : bridged === missing
          ? " and the filter bridges them"
          : bridged === 0
            ? " and the filter stops at them"
            : `; the filter bridges ${bridged} of them and stops at the others`;
    return `${missing} of ${hasData.length} dates have no data (the first is ${first}): they stay blank${reached}.`;
  },
  unfiltered: ({ band }, { hasData, time }) => {
    const blank = datesWithoutBand(band, time, hasData);
    if (blank === 0) return null;
    return `${blank} of ${hasData.reduce((sum, flag) => sum + flag, 0)} dates with data have no value in the band: they stand between gaps too far apart to bridge, in stretches too short for this filter. A shorter longest period, or longer bridges, brings them back.`;
  },
  irregular: (_, { time, cube }) =>
    cube.dates > 2 && !time.even
      ? "The dates are on no regular step: nothing can be filtered in time, and the spectrum is a Lomb–Scargle one."
      : null,
  space: ({ space }) =>
    filtersInSpace(space)
      ? "Heights are filtered in space before currents are taken: speeds, energies and zonal means are of what is left."
      : null,
  errors: ({ errors, space }) =>
    errors.heightMetres !== null && filtersInSpace(space)
      ? "No standard errors are given: what filters in space do to the height's error is not worked out."
      : null,
  coast: (_, record) => {
    const share = nearLandShare(record);
    return share >= 0.01
      ? `${(100 * share).toFixed(1)} % of the ocean cells touch land or the edge of the data, where slopes are one-sided and altimetry is poor.`
      : null;
  },
};

/** Dates with data in stretches that the study's filter is too long for; 0 where it cannot be made at all, which is told elsewhere. */
function datesWithoutBand(band: Study["band"], time: HeightRecord["time"], hasData: Uint8Array): number {
  try {
    const share = timeFilter(band, time)?.share(hasData);
    return share ? share.reduce((sum, value, date) => sum + (hasData[date] && value === 0 ? 1 : 0), 0) : 0;
  } catch (error) {
    if (error instanceof Fault) return 0;
    throw error;
  }
}

/** The cautions that apply to this study and record, each a sentence with its numbers. */
export function cautionsFor(study: Study, record: HeightRecord): Caution[] {
  return Object.entries(rules).flatMap(([id, rule]) => {
    const text = rule(study, record);
    return text ? [{ id, text }] : [];
  });
}

/** Share of ocean cells with a land cell among their four neighbours inside the region. */
function nearLandShare({ ocean, cube: { rows, columns } }: HeightRecord): number {
  let near = 0;
  let total = 0;
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const cell = row * columns + column;
      if (!ocean[cell]) continue;
      total++;
      const landBeside =
        (row > 0 && !ocean[cell - columns]) ||
        (row < rows - 1 && !ocean[cell + columns]) ||
        (column > 0 && !ocean[cell - 1]) ||
        (column < columns - 1 && !ocean[cell + 1]);
      if (landBeside) near++;
    }
  }
  return total > 0 ? near / total : 0;
}
