import { formatSignificant } from "../../../../core/figure/format";
import type { Study } from "../../../../core/study/schema";

const number = (value: number): string => formatSignificant(value, 4);

/** "shortest–longest unit", "over" or "under" where one side is open; empty where both are. */
function rangeText(shortest: number | null, longest: number | null, unit: string): string {
  if (shortest === null && longest === null) return "";
  if (longest === null) return `over ${number(shortest ?? 0)} ${unit}`;
  return shortest === null ? `under ${number(longest)} ${unit}` : `${number(shortest)}–${number(longest)} ${unit}`;
}

/** "7 points, ellipsoid, blank to 5°" (of the equator). */
export function currentsSummary({ geostrophy }: Study): string {
  const { stencil, earth, gravity, equator, equatorDegrees } = geostrophy;
  const weight = gravity === "latitude" ? "" : `, gravity ${gravity}`;
  const belt = equator === "blend" ? "equator blended" : `blank to ${number(equatorDegrees)}°`;
  return `${stencil} points, ${earth}${weight}, ${belt}`;
}

/** "mean, trend, annual and half-year cycle"; "nothing". */
export function backgroundSummary({ background, space }: Study): string {
  const parts = [
    background.mean && "mean",
    background.trend && "trend",
    background.annual && "annual",
    background.semiannual && "half-year",
    space.removeZonalMean && "zonal mean",
    space.removeSurface && "large-scale surface",
  ].filter((part) => part !== false && part !== null);
  return parts.length === 0 ? "nothing" : parts.join(", ");
}

const filters = {
  lanczos: "Lanczos",
  butterworth: "Butterworth",
  "running-mean": "running mean",
  none: "none",
} as const;

/** "Lanczos, 90–540 days"; "none". */
export function filterSummary({ band }: Study): string {
  const { filter, order, shortestDays, longestDays } = band;
  if (filter === "none") return "none: all periods";
  const name = filter === "butterworth" ? `Butterworth of order ${order}` : filters[filter];
  return [name, rangeText(shortestDays, longestDays, "days")].filter((part) => part !== "").join(", ");
}

/** "along meridians 100–500 km"; "all wavelengths". */
export function spaceSummary({ space }: Study): string {
  const parts = [
    ["along meridians", space.meridional],
    ["along parallels", space.zonal],
  ] as const;
  const kept = parts.flatMap(([along, band]) => {
    const range = band ? rangeText(band.shortestKm, band.longestKm, "km") : "";
    return range === "" ? [] : [`${along} ${range}`];
  });
  return kept.length === 0 ? "all wavelengths" : kept.join(", ");
}

/** "2 cm, alike over 100 km"; "from the file"; "none given". */
export function errorSummary({ errors }: Study): string {
  const { heightMetres, correlationKm } = errors;
  if (heightMetres === null) return "none given";
  const size = heightMetres === "file" ? "from the file" : `${number(100 * heightMetres)} cm`;
  return correlationKm > 0 ? `${size}, alike over ${number(correlationKm)} km` : size;
}
