import type { HeightReference } from "../../core/model/source";

/**
 * CF standard names (and their aliases) of sea-surface height, best first: heights above the geoid carry the mean jets,
 * heights above the mean sea level only anomalies, heights above the ellipsoid are dominated by the geoid itself.
 */
export const heightStandardNames: readonly (readonly [name: string, reference: HeightReference])[] = [
  ["sea_surface_height_above_geoid", "geoid"],
  ["sea_surface_elevation", "geoid"],
  ["sea_surface_height_above_geopotential_datum", "geoid"],
  ["sea_surface_height_above_mean_sea_level", "mean-sea-level"],
  ["sea_surface_height_above_sea_level", "mean-sea-level"],
  ["sea_surface_elevation_anomaly", "mean-sea-level"],
  ["sea_surface_height_above_reference_ellipsoid", "ellipsoid"],
];

/** Names that people give to heights where a file has no standard names, with what each is measured from. */
const customaryNames: readonly (readonly [pattern: RegExp, reference: HeightReference])[] = [
  [/^(adt|madt|absolute_dynamic_topography|zos)(_|$)/i, "geoid"],
  [/^(sla|msla|ssha|sea_level_anomaly|sea_surface_height_anomaly)(_|$)/i, "mean-sea-level"],
  [/^(ssh|eta|zeta|sea_level|sea_surface_height|sea_surface_elevation|height)(_|$)/i, "unknown"],
];

/** Rank (0 best) and reference of a standard name; null for another or for one with a modifier ("… standard_error"). */
export function heightByStandardName(name: string): { rank: number; reference: HeightReference } | null {
  const rank = heightStandardNames.findIndex(([known]) => known === name.trim().toLowerCase());
  return rank < 0 ? null : { rank, reference: heightStandardNames[rank][1] };
}

/** As `heightByStandardName` for the variable's own name. */
export function heightByCustomaryName(name: string): { rank: number; reference: HeightReference } | null {
  const rank = customaryNames.findIndex(([pattern]) => pattern.test(name));
  return rank < 0 ? null : { rank, reference: customaryNames[rank][1] };
}

/** Whether name or description say that the variable is an uncertainty, a flag or a count and no height. */
export function isNoHeight(name: string, longName: string): boolean {
  return /(^|[_ ])(err|error|uncertainty|variance|std|flag|quality|number|count)([_ ]|$)/i.test(`${name} ${longName}`);
}
