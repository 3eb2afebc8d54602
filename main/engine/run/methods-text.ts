import { boxText } from "../../../core/figure/record-text";
import { formatDay } from "../../../core/model/calendar";
import { crossingDays } from "../../../core/study/band";
import { bandWords } from "../../../core/study/band-words";
import { cautionsFor } from "../../../core/study/cautions";
import { leastZonalCoverage } from "../../../core/study/reduction";
import type { Study } from "../../../core/study/schema";
import type { Analysis } from "./analysis";
import { jetsMethods } from "./jets-methods";
import { scalesMethods, scalesReferences } from "./scales-methods";
import { version } from "./version";

/** methods.md: what was done, in sentences whose numbers are the study's own, with the papers to cite and the cautions. */
export function methodsText(analysis: Analysis): string {
  const { open, stages } = analysis;
  const { study } = open;
  const cautions = cautionsFor(study, stages.record).map(({ text }) => `- ${text}`);
  return [
    `# Methods${study.title ? `: ${study.title}` : ""}`,
    "",
    dataText(analysis),
    "",
    geostrophyText(study),
    "",
    ...spaceText(study),
    ...errorText(study),
    backgroundText(study, analysis),
    "",
    bandText(study, analysis),
    "",
    `Zonal means weight cells by their width and need ${100 * leastZonalCoverage} % of a row's ocean cells. The 95 % interval of a mean over time uses Student's t with the effective sample size ${study.band.filter === "none" ? "" : "(as it stands: "}N(1 − r)/(1 + r) from the lag-one autocorrelation r (Leith 1973)${study.band.filter === "none" ? "" : "; in the band: from the products of the autocorrelations over all lags, Bretherton et al. 1999)"}.`,
    "",
    ...jetsMethods(analysis.jets, study),
    ...scalesMethods(analysis.scales, study),
    "## Cautions",
    "",
    ...cautions,
    "",
    "## References",
    "",
    ...[...new Set([...references(study, analysis.jets.eddyTest !== null), ...scalesReferences(analysis.scales)])]
      .sort()
      .map((entry) => `- ${entry}`),
    "",
    `Made with Strake ${version}.`,
    "",
  ].join("\n");
}

function dataText({ loaded, stages, grid }: Analysis): string {
  const { record } = stages;
  const { time, cube, hasData, axes } = record;
  const { height, files } = loaded.index;
  const dated = hasData.reduce((sum, flag) => sum + flag, 0);
  const surface = {
    geoid: "the geoid",
    "mean-sea-level": "mean sea level",
    ellipsoid: "the ellipsoid",
    unknown: "an unstated surface",
  };
  return (
    `Sea-surface height above ${surface[height.reference]} (variable ${height.name} of grid ${grid}, ${files.length} ${files.length === 1 ? "file" : "files"}) ` +
    `on ${cube.rows} latitudes and ${cube.columns} longitudes (cell centres ${boxText(axes)}), ` +
    `${cube.dates} dates from ${formatDay(time.calendar, time.values[0])} to ${formatDay(time.calendar, time.values[cube.dates - 1])}` +
    `${cube.dates > 1 ? ` every ${tidy(time.step)} days` : ""}, ${dated} of them with data.`
  );
}

function geostrophyText(study: Study): string {
  const { geostrophy } = study;
  const earth =
    geostrophy.earth === "ellipsoid" ? "the WGS-84 ellipsoid" : `a sphere of radius ${geostrophy.radius / 1000} km`;
  const gravity =
    geostrophy.gravity === "latitude"
      ? "gravity varying with latitude (IOC, SCOR and IAPSO 2010)"
      : `gravity ${geostrophy.gravity} m s⁻²`;
  return (
    `Geostrophic velocity is the slope of height by ${geostrophy.stencil}-point centred differences (Fornberg 1988) on ${earth}, ` +
    `with ${gravity} and a rotation rate of ${(geostrophy.omega * 1e5).toFixed(6)} × 10⁻⁵ rad s⁻¹. Beside gaps, land and the region's edge the stencil narrows ` +
    `symmetrically, then becomes one-sided of second order. ${equatorText(study)} ` +
    "Relative vorticity is the curl on the same earth, the convergence of meridians included."
  );
}

function equatorText({ geostrophy }: Study): string {
  const { equator, equatorDegrees, blendScaleDegrees, blendWidthDegrees } = geostrophy;
  if (equator === "blank") return `Rows within ${equatorDegrees}° of the equator are blank.`;
  return (
    `Near the equator velocity is blended with a beta-plane solution (Lagerloef et al. 1999): weight exp[−(φ/${blendScaleDegrees}°)²], ` +
    `from a cubic fit of the height's slope within ${blendWidthDegrees}°.`
  );
}

function spaceText({ space }: Study): string[] {
  const parts: string[] = [];
  const words = (band: NonNullable<Study["space"]["zonal"]>) =>
    [
      band.shortestKm === null ? "" : `over ${band.shortestKm} km`,
      band.longestKm === null ? "" : `under ${band.longestKm} km`,
    ]
      .filter(Boolean)
      .join(" and ");
  if (space.removeSurface) {
    const { zonalKm, meridionalKm } = space.removeSurface;
    parts.push(
      `a large-scale loess surface (Cleveland and Devlin 1988) of half-spans ${zonalKm} km (zonal) and ${meridionalKm} km (meridional) was taken off`,
    );
  }
  if (space.removeZonalMean) parts.push("each row's zonal mean was taken off");
  if (space.zonal) parts.push(`zonal wavelengths ${words(space.zonal)} were kept by Lanczos weights (Duchon 1979)`);
  if (space.meridional)
    parts.push(`meridional wavelengths ${words(space.meridional)} were kept by Lanczos weights (Duchon 1979)`);
  return parts.length > 0 ? [`Of every height map, before differencing, ${listed(parts)}.`, ""] : [];
}

function errorText({ errors }: Study): string[] {
  if (errors.heightMetres === null) return [];
  const size = errors.heightMetres === "file" ? "the files' own error" : `a height error of ${errors.heightMetres} m`;
  const reach = errors.correlationKm === 0 ? "independent between cells" : `correlated over ${errors.correlationKm} km`;
  return [
    `Standard errors of velocity and vorticity are propagated from ${size}, ${reach}, through the weights used at each cell.`,
    "",
  ];
}

function backgroundText({ background }: Study, { stages }: Analysis): string {
  if (stages.background.basis.names.length === 0) return "Nothing was taken off before filtering.";
  const names = {
    mean: "mean",
    trend: "linear trend",
    annual: "annual cycle",
    semiannual: "semi-annual cycle",
  } as const;
  const removed = (Object.keys(names) as (keyof typeof names)[])
    .filter((key) => background[key])
    .map((key) => names[key]);
  return `Before filtering, the ${listed(removed)} were ${background.mean ? "fitted together" : "fitted together with the mean"} by least squares over the dates with data and taken off${background.mean ? "" : "; the mean stays"}. Maps and means that are not in the band keep them.`;
}

function bandText({ band }: Study, { stages }: Analysis): string {
  const { filter, record } = stages;
  if (!filter || band.filter === "none") return "No band-pass was applied.";
  const { time } = record;
  const periods = (level: number) => listed(crossingDays(filter, level, time).map((days) => days.toFixed(1)));
  const weights = filter.reach;
  const kinds = {
    lanczos: `a Lanczos filter (Duchon 1979) of ${weights} weights a side, ${2 * weights + 1} in all`,
    butterworth: `a Butterworth filter of order ${band.order} run forward and back with odd extension at the ends`,
    "running-mean": "running means",
  } as const;
  return (
    `${capitalised(bandWords(band))} were kept by ${kinds[band.filter]}; its response is one half in amplitude at ${periods(0.5)} days and one half in power ` +
    `at ${periods(Math.SQRT1_2)} days. Gaps of up to ${band.bridgeDays} days are bridged ` +
    `(${band.filter === "lanczos" ? "missing dates get no weight and the weights left are scaled to the same sum" : band.filter === "butterworth" ? "by straight lines" : "a missing date is left out with the one opposite"}); ` +
    "the filter does not reach across longer ones. Dates without data stay blank. Values that rest on less than 90 % of the filter's weight, " +
    "or on padding, are marked. Heights are filtered first and differenced after, which is the same for a linear filter; where single cells " +
    "of a map are missing the picture filters each latitude's zonal means, and the map each cell's own heights."
  );
}

function references({ geostrophy, space, band }: Study, isTested: boolean): string[] {
  const hasLanczos = band.filter === "lanczos" || space.zonal !== null || space.meridional !== null;
  return [
    ...(isTested ? ["Benjamini, Y., and Hochberg, Y. (1995). J. R. Stat. Soc. B 57, 289–300."] : []),
    "Bretherton, C. S., et al. (1999). J. Climate 12, 1990–2009.",
    ...(space.removeSurface ? ["Cleveland, W. S., and Devlin, S. J. (1988). J. Am. Stat. Assoc. 83, 596–610."] : []),
    ...(hasLanczos ? ["Duchon, C. E. (1979). J. Appl. Meteor. 18, 1016–1022."] : []),
    "Fornberg, B. (1988). Math. Comp. 51, 699–706.",
    ...(geostrophy.equator === "blend"
      ? ["Lagerloef, G. S. E., et al. (1999). J. Geophys. Res. 104, 23313–23326."]
      : []),
    ...(geostrophy.gravity === "latitude"
      ? ["IOC, SCOR and IAPSO (2010). The international thermodynamic equation of seawater – 2010. UNESCO."]
      : []),
    "Leith, C. E. (1973). J. Appl. Meteor. 12, 1066–1069.",
  ];
}

function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function listed(words: readonly string[]): string {
  if (words.length < 2) return words.join("");
  return `${words.slice(0, -1).join(", ")} and ${words[words.length - 1]}`;
}

function tidy(value: number): string {
  return String(Number(value.toFixed(4)));
}
