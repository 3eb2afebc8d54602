import { counted, formatLatitude, formatLongitude, formatNumber, formatSignificant } from "../../../core/figure/format";
import { nearestCell } from "../../../core/figure/resample";
import { directionText, shareText as percentText } from "../../../core/figure/scales/facts";
import { formatDate } from "../../../core/figure/time-ticks";
import type { Plane } from "../../../core/model/results";
import type { Drift, ScalesResult, WavenumberCurve } from "../../../core/model/scales-result";
import type { ScalesPicture } from "../../state/scales";

export interface ScalesReadout {
  readonly value: string;
  readonly place: string;
}

type Reader = (picture: ScalesPicture, across: number, up: number) => ScalesReadout | null;

/** What each panel tells of a place in its own units. */
const readers: Readonly<Record<string, Reader>> = {
  energy: ({ result }, across, up) => {
    const { plane } = result;
    if (!plane) return null;
    const value = cellOf(plane.density, plane.meridional, plane.zonal, up, across);
    return { value: shareText(value, plane.density), place: `zonal ${length(across)}, meridional ${length(up)}` };
  },
  waves: ({ result }, across, up) => {
    const found = result.frequencyWavenumber;
    if (!found) return null;
    const value = cellOf(found.density, found.frequency, found.wavenumber, up, across);
    const direction = across < 0 ? "westward" : "eastward";
    const period = up > 0 ? counted(formatSignificant(1 / up, 3), "day") : "standing";
    return { value: shareText(value, found.density), place: `${direction}, ${length(across)}, ${period}` };
  },
  wavelengths: ({ result }, across) => ({ value: spectraText(result, across), place: length(1 / across) }),
  period: ({ result }, across) => {
    const { period } = result;
    if (!period) return null;
    const k = nearestCell(period.frequency, 1 / across);
    const value = period.frequency[k] * period.density[k];
    return { value: variance(value), place: counted(formatSignificant(1 / period.frequency[k], 3), "day") };
  },
  zonality: ({ result }, across) => {
    const { days, zonality } = result.zonality;
    const k = nearestCell(days.map(Math.log), Math.log(across));
    return {
      value: formatNumber(zonality[k], 2),
      place: `averages over ${counted(formatSignificant(days[k], 3), "day")}`,
    };
  },
  "drift-along": (picture, across, up) =>
    driftText(picture, picture.result.drift.alongLatitude, across, up, (value) => formatLongitude(value, 2)),
  "drift-across": (picture, across, up) =>
    driftText(picture, picture.result.drift.acrossLatitudes, up, across, (value) => formatLatitude(value, 2)),
  "mean-flow": ({ result }, _, up) =>
    profileText(result, result.forcing.meanFlow, up, (value) => `${formatNumber(100 * value, 2)} cm s⁻¹`),
  push: ({ result }, _, up) =>
    profileText(
      result,
      result.forcing.convergence,
      up,
      (value) => `${formatNumber(8.64e9 * value, 1)} × 10⁻³ cm s⁻¹ per day`,
    ),
  gradient: ({ result }, _, up) =>
    profileText(result, result.forcing.gradient, up, (value) => `${formatNumber(1e11 * value, 2)} × 10⁻¹¹ m⁻¹ s⁻¹`),
  persistence: ({ result, record }, across, up) => {
    const { share, longestDays, sign } = result.persistence;
    const [row, column] = [nearestCell(result.latitude, up), nearestCell(record.longitude.values, across)];
    const cell = row * share.columns + column;
    return {
      value: persistenceText(share.values[cell], sign[cell], longestDays.values[cell]),
      place: `${formatLatitude(result.latitude[row], 2)}, ${formatLongitude(record.longitude.values[column], 2)}`,
    };
  },
  "longest-run": ({ result }, _, up) => {
    const { share, longestDays, sign } = result.persistence.byLatitude;
    const row = nearestCell(result.latitude, up);
    return {
      value: persistenceText(share[row], sign[row], longestDays[row]),
      place: formatLatitude(result.latitude[row], 2),
    };
  },
};

/** Value and place under the pointer, given in the panel's own units; null where a panel has nothing to tell. */
export function scalesReadout(picture: ScalesPicture, panel: string, across: number, up: number): ScalesReadout | null {
  return readers[panel]?.(picture, across, up) ?? null;
}

/** "82 % of dates eastward, longest run 450 days". */
function persistenceText(share: number, sign: number, days: number): string {
  if (!Number.isFinite(share)) return "no values";
  return `${percentText(share)} of dates ${directionText(sign)}, longest run ${counted(formatNumber(days, 0), "day")}`;
}

function cellOf(plane: Plane, rows: Float64Array, columns: Float64Array, up: number, across: number): number {
  return plane.values[nearestCell(rows, up) * plane.columns + nearestCell(columns, across)];
}

function shareText(value: number, { values }: Plane): string {
  const most = values.reduce((top, each) => Math.max(top, each || 0), 0);
  return value > 0 ? `${formatSignificant(value / most, 2)} of the peak` : "no value";
}

/** Wavelength of a wavenumber in cycles a metre. */
function length(wavenumber: number): string {
  const km = 1 / Math.abs(wavenumber) / 1000;
  return km < 20_000 ? `${formatSignificant(km, 3)} km` : "∞";
}

const variance = (value: number): string => `${formatSignificant(1e4 * value, 3)} cm² s⁻²`;

function spectraText({ meridional }: ScalesResult, wavelength: number): string {
  const named: [string, WavenumberCurve | null][] = [
    ["each map", meridional.eachMap],
    ["time mean", meridional.timeMean],
    ["in the band", meridional.inBand],
  ];
  const parts = named.flatMap(([name, curve]) => {
    if (!curve) return [];
    const k = nearestCell(curve.wavenumber, 1 / wavelength);
    return [`${name} ${formatSignificant(1e4 * curve.wavenumber[k] * curve.density[k], 3)}`];
  });
  return `${parts.join(", ")} cm² s⁻²`;
}

function driftText(
  { record }: ScalesPicture,
  drift: Drift | null,
  position: number,
  day: number,
  placeText: (value: number) => string,
): ScalesReadout | null {
  if (!drift) return null;
  const row = nearestCell(drift.position, position);
  const column = nearestCell(drift.days, day);
  const value = drift.picture.values[row * drift.picture.columns + column];
  return {
    value: Number.isFinite(value) ? `${formatNumber(100 * value, 1)} cm s⁻¹` : "no data",
    place: `${placeText(drift.position[row])}, ${formatDate(record.time.calendar, drift.days[column])}`,
  };
}

function profileText(
  { latitude }: ScalesResult,
  values: Float64Array,
  up: number,
  text: (value: number) => string,
): ScalesReadout {
  const row = nearestCell(latitude, up);
  const value = values[row];
  return { value: Number.isFinite(value) ? text(value) : "too few values", place: formatLatitude(latitude[row], 2) };
}
