import type { OpenStudy } from "../../core/contract/engine";
import type {
  BackgroundSettings,
  BandSettings,
  ErrorSettings,
  GeostrophySettings,
  Period,
  Region,
  SpaceSettings,
} from "../../core/study/schema";

/** Each returns a new study with one part replaced; the one given is left as it was. */
export function withBand(open: OpenStudy, band: BandSettings): OpenStudy {
  return band === open.study.band ? open : { ...open, study: { ...open.study, band } };
}

export function withGeostrophy(open: OpenStudy, change: Partial<GeostrophySettings>): OpenStudy {
  return { ...open, study: { ...open.study, geostrophy: { ...open.study.geostrophy, ...change } } };
}

export function withBackground(open: OpenStudy, change: Partial<BackgroundSettings>): OpenStudy {
  return { ...open, study: { ...open.study, background: { ...open.study.background, ...change } } };
}

export function withSpace(open: OpenStudy, change: Partial<SpaceSettings>): OpenStudy {
  return { ...open, study: { ...open.study, space: { ...open.study.space, ...change } } };
}

export function withErrors(open: OpenStudy, change: Partial<ErrorSettings>): OpenStudy {
  return { ...open, study: { ...open.study, errors: { ...open.study.errors, ...change } } };
}

/** `undefined` takes the part out: all of the first grid. */
export function withExtent(open: OpenStudy, region: Region | undefined, period: Period | undefined): OpenStudy {
  const { region: _region, period: _period, ...rest } = open.study;
  return { ...open, study: { ...rest, ...(region ? { region } : {}), ...(period ? { period } : {}) } };
}

/** Names the cells and dates that a study reads of one grid: equal where a loaded record can serve both. */
export function recordKey({ folder, study }: OpenStudy, grid: string): string {
  return JSON.stringify([folder, study.grids, study.region ?? null, study.period ?? null, grid]);
}
