/** Periods of the largest tides in hours. Ref: Doodson 1921, Proc. R. Soc. A 100, 305 [from memory]. */
export const tidePeriodsHours = {
  M2: 12.4206012,
  S2: 12,
  N2: 12.65834751,
  K1: 23.93447213,
  O1: 25.81933871,
  P1: 24.06588766,
} as const;

export type Tide = keyof typeof tidePeriodsHours;

/** Below this share of a cycle a repeat the tide looks still: the tables above carry no more digits. */
const stillCycles = 1e-6;

/**
 * Period in days at which a tide shows in samples `repeatDays` apart: repeat over the distance of cycles a repeat from the
 * nearest whole number. Infinity for a tide that looks still.
 */
export function aliasPeriodDays(tide: Tide, repeatDays: number): number {
  const cycles = (repeatDays * 24) / tidePeriodsHours[tide];
  const rest = Math.abs(cycles - Math.round(cycles));
  return rest < stillCycles ? Number.POSITIVE_INFINITY : repeatDays / rest;
}

export interface TidalAlias {
  readonly tide: Tide;
  readonly repeatDays: number;
  readonly periodDays: number;
}

/** Aliases that lie within a band of periods, by repeat, then by period; null leaves a side open. */
export function aliasesInBand(
  repeats: readonly number[],
  shortestDays: number | null,
  longestDays: number | null,
): TidalAlias[] {
  return repeats.flatMap((repeatDays) =>
    (Object.keys(tidePeriodsHours) as Tide[])
      .map((tide) => ({ tide, repeatDays, periodDays: aliasPeriodDays(tide, repeatDays) }))
      .filter(
        ({ periodDays }) =>
          Number.isFinite(periodDays) &&
          periodDays >= (shortestDays ?? 0) &&
          periodDays <= (longestDays ?? Number.POSITIVE_INFINITY),
      )
      .sort((a, b) => a.periodDays - b.periodDays),
  );
}
