import { formatLatitude, formatLongitude } from "../../../core/figure/format";
import { formatDate } from "../../../core/figure/time-ticks";
import { mapValueAt, rowAt, timeValueAt } from "../../figure/cell-values";
import type { Pointed } from "../../figure/pointing";
import type { Picture } from "../../state/bench-state";
import { nearestIndex } from "../../state/cursor";
import { doubtText, intervalText, type ValueStyle, valueStyle, valueText } from "../../text/values";
import { quantityText } from "./quantities";

export interface Readout {
  readonly value: string;
  readonly place: string;
}

/** How the map's values are written. */
export function mapStyle({ result }: Picture): ValueStyle {
  return styleFor(result.choice.quantity, result.limits);
}

/** How zonal means are written: they are weaker than the map they average. */
export function meanStyle({ result }: Picture): ValueStyle {
  return styleFor(result.choice.quantity, result.pictureLimits);
}

function styleFor(quantity: string, [lower, upper]: readonly [number, number]): ValueStyle {
  return valueStyle(quantityText(quantity).units, Math.max(Math.abs(lower), Math.abs(upper)));
}

/** The zonal mean on the picture's date, with its error where that is known. */
export function onDateText({ result }: Picture, row: number, style: ValueStyle): string {
  return doubtText(style, result.onDate[row], result.error?.onDate[row]);
}

/** Date at an index of the picture's record. */
export function dateText({ record }: Picture, index: number): string {
  return formatDate(record.time.calendar, record.time.values[index]);
}

/** Value, unit, place and date under the pointer; null where a panel has nothing to tell. */
export function pointerReadout(picture: Picture, pointed: Pointed): Readout | null {
  const { latitude, longitude, day } = pointed;
  if (latitude !== null && longitude !== null) {
    const cell = mapValueAt(picture, latitude, longitude);
    const place = `${formatLatitude(cell.latitude, 2)} ${formatLongitude(cell.longitude, 2)}`;
    return {
      value: cell.isOcean ? doubtText(mapStyle(picture), cell.value, cell.standardError) : "never any data",
      place: `${place}, ${dateText(picture, picture.result.dateIndex)}`,
    };
  }
  if (latitude !== null && day !== null) {
    const cell = timeValueAt(picture, latitude, day);
    const place = `${formatLatitude(cell.latitude, 2)}, ${dateText(picture, cell.dateIndex)}`;
    return { value: valueText(meanStyle(picture), cell.value), place };
  }
  if (latitude !== null) {
    const { mean, half95 } = picture.result.profile;
    const row = rowAt(picture, latitude);
    return {
      value: intervalText(meanStyle(picture), mean[row], half95[row]),
      place: `${formatLatitude(latitude, 2)}, mean of the period`,
    };
  }
  return day === null ? null : dayReadout(picture, day);
}

function dayReadout(picture: Picture, day: number): Readout {
  const { time, coverage, hasData } = picture.record;
  const index = nearestIndex(time.values, day);
  const value = hasData[index] === 1 ? `${Math.round(100 * coverage[index])} % of cells` : "no data";
  const weak = picture.result.filterEnd[index] === 1 ? ", near an end or a gap" : "";
  return { value, place: dateText(picture, index) + weak };
}
