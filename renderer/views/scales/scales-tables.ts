import { counted, formatLatitude, formatNumber, formatSignificant } from "../../../core/figure/format";
import { powerText } from "../../../core/figure/scales/estimate-text";
import { directionText, shareText } from "../../../core/figure/scales/facts";
import { signChangesText } from "../../../core/figure/scales/profile-panels";
import type { Drift, Estimate, ScalesResult } from "../../../core/model/scales-result";

export interface NumberRow {
  readonly name: string;
  readonly value: string;
  /** "–" where there are none. */
  readonly limits: string;
  readonly basis: string;
}

export interface NumberTable {
  readonly title: string;
  readonly rows: readonly NumberRow[];
}

/** Numbers by latitude, north first as on the figure. */
export interface LatitudeTable {
  readonly title: string;
  readonly heads: readonly string[];
  /** The latitude, then a text for each other head. */
  readonly rows: readonly (readonly string[])[];
}

const none = "–";

/** Lengths, drift and waves, forcing and energy: what the figure draws, as rows. */
export function scalesTables(result: ScalesResult): NumberTable[] {
  return [
    { title: "Lengths, as half-wavelengths", rows: lengthRows(result) },
    { title: `Drift, and waves at ${formatLatitude(result.alongLatitude, 2)}`, rows: driftRows(result) },
    { title: "Forcing and energy", rows: forcingRows(result) },
  ];
}

/** How lastingly the zonal-mean flow of each latitude keeps its sign. */
export function persistenceTable({ latitude, persistence: { byLatitude, inBand } }: ScalesResult): LatitudeTable {
  const { share, longestDays, sign } = byLatitude;
  const rows = [...latitude.keys()].sort((a, b) => latitude[b] - latitude[a]);
  return {
    title: `Persistence of the zonal mean of u${inBand ? " in the band" : ""}`,
    heads: ["Latitude", "Prevailing", "Share of dates with it", "Longest run of one sign"],
    rows: rows.map((row) => [
      formatLatitude(latitude[row], 2),
      ...(Number.isFinite(share[row])
        ? [directionText(sign[row]), shareText(share[row]), counted(formatNumber(longestDays[row], 0), "day")]
        : [none, none, none]),
    ]),
  };
}

function estimateRow(name: string, { value, low95, high95 }: Estimate, scale: number, units: string, basis: string) {
  const text = (each: number) => `${formatSignificant(each * scale, 3)} ${units}`.trim();
  return {
    name,
    value: Number.isFinite(value) ? text(value) : "unknown",
    limits: high95 > low95 ? `${formatSignificant(low95 * scale, 3)} to ${text(high95)}` : none,
    basis,
  };
}

function plainRow(name: string, value: string, basis = ""): NumberRow {
  return { name, value, limits: none, basis };
}

const formulas: Readonly<Record<string, string>> = {
  root: "√(U/β)",
  "root-width": "π√(U/β)",
  "root-wavelength": "2π√(U/β)",
  "root-two": "√(2U/β)",
  "root-two-width": "π√(2U/β)",
  "root-two-wavelength": "2π√(2U/β)",
};

function lengthRows({ lengths }: ScalesResult): NumberRow[] {
  const km = (value: number) => `${formatNumber(value / 1000, 0)} km`;
  const other = Object.entries(lengths.rhines).map(([convention, { total, eddy }]) =>
    plainRow(
      `Rhines scale ${formulas[convention] ?? convention}`,
      `${km(total)}, eddies ${km(eddy)}`,
      "as it stands, not halved: rms speed of the whole flow, and of the eddies",
    ),
  );
  return [
    ...lengths.ruler.map(({ title, halfWavelength, basis }) => estimateRow(title, halfWavelength, 0.001, "km", basis)),
    ...other,
  ];
}

function driftRows({ drift, waves }: ScalesResult): NumberRow[] {
  const limits = (found: Drift) =>
    `${found.limits === "bootstrap" ? "resampling" : "width of the peak"}; lines hold ${formatNumber(100 * found.share, 0)} % of the variance`;
  const found: [string, Drift | null][] = [
    ["Drift along the latitude, eastward", drift.alongLatitude],
    ["Drift across latitudes, northward", drift.acrossLatitudes],
  ];
  const speed = (name: string, value: number, basis = "") =>
    plainRow(name, Number.isFinite(value) ? `${formatNumber(100 * value, 2)} cm s⁻¹` : "unknown", basis);
  return [
    ...found.map(([name, each]) =>
      each ? estimateRow(name, each.speed, 100, "cm s⁻¹", limits(each)) : plainRow(name, "unknown"),
    ),
    speed("Long Rossby waves at rest", waves.longWave),
    speed("Long Rossby waves in the mean flow", waves.longWaveInFlow),
    speed("Rossby waves of the spectra’s peaks at rest", waves.atPeak),
    speed("Rossby waves of the spectra’s peaks in the mean flow", waves.atPeakInFlow),
    speed("Mean flow", waves.meanFlow),
    plainRow("Shortest period of waves at rest", counted(formatNumber(waves.shortestPeriodDays, 0), "day")),
  ];
}

function forcingRows({ forcing, energy, plane, lengths }: ScalesResult): NumberRow[] {
  const share = (value: number) => `${formatNumber(100 * value, 0)} %`;
  const { push, pushInTime, pushOfMeans, conversion } = forcing;
  const pairs = (count: number, r: number) =>
    `r ${formatNumber(r, 2)}, some ${formatNumber(count, 0)} independent pairs`;
  return [
    estimateRow("Push on the jets, per day", push.perDay, 1, "", pairs(push.effectivePairs, push.correlation)),
    estimateRow(
      "Push on their changes in time, per day",
      pushInTime.perDay,
      1,
      "",
      pairs(pushInTime.effectivePairs, pushInTime.correlation),
    ),
    estimateRow(
      "Push of the mean on the mean flow, per day",
      pushOfMeans.perDay,
      1,
      "",
      pairs(pushOfMeans.effectivePairs, pushOfMeans.correlation),
    ),
    plainRow("Energy from the eddies to the mean flow", `${powerText(conversion)} W kg⁻¹`),
    plainRow("Sign changes of β − ∂²U/∂y²", signChangesText(forcing.signChanges)),
    ...(plane ? [plainRow("Kinetic energy inside the boundary of waves", share(plane.shareInside))] : []),
    ...(energy
      ? [
          plainRow(
            `Kinetic energy under ${counted(formatSignificant(energy.weeksDays, 4), "day")}`,
            share(energy.weeksShare),
          ),
          plainRow(
            `Kinetic energy from ${formatSignificant(energy.weeksDays, 4)} to ${counted(formatSignificant(energy.monthsDays, 4), "day")}`,
            share(energy.monthsShare),
          ),
          plainRow("Kinetic energy of longer periods and the mean", share(energy.longerShare)),
        ]
      : []),
    plainRow("Root-mean-square speed of the whole flow", `${formatNumber(100 * lengths.totalSpeed, 1)} cm s⁻¹`),
    plainRow("Root-mean-square speed of the eddies", `${formatNumber(100 * lengths.eddySpeed, 1)} cm s⁻¹`),
  ];
}
