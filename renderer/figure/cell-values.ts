import type { Picture } from "../state/bench-state";
import { nearestIndex } from "../state/cursor";

/** Row of the results at a latitude: results run northward, whichever way the axis does. */
export function rowAt({ record }: Picture, latitude: number): number {
  const { values } = record.latitude;
  const index = nearestIndex(values, latitude);
  return values[values.length - 1] >= values[0] ? index : values.length - 1 - index;
}

/**
 * The map's value in SI units at a place (NaN: no data) with its standard error where there is one, the cell's own
 * coordinates and whether it ever holds a value.
 */
export function mapValueAt(picture: Picture, latitude: number, longitude: number) {
  const { map, error } = picture.result;
  const { values: longitudes } = picture.record.longitude;
  const column = nearestIndex(longitudes, longitude);
  const cell = rowAt(picture, latitude) * map.columns + column;
  return {
    value: map.values[cell],
    standardError: error?.map.values[cell],
    isOcean: picture.record.ocean[cell] === 1,
    latitude: picture.record.latitude.values[nearestIndex(picture.record.latitude.values, latitude)],
    longitude: longitudes[column],
  };
}

/** The latitude-time picture's value in SI units, with the column's own date as an index; NaN where there is no data. */
export function timeValueAt(picture: Picture, latitude: number, day: number) {
  const { latitudeTime, columnDates } = picture.result;
  const { values: days } = picture.record.time;
  const dateIndex = nearestIndex(days, day);
  const column = nearestIndex(columnDates, dateIndex);
  return {
    value: latitudeTime.values[rowAt(picture, latitude) * latitudeTime.columns + column],
    latitude: picture.record.latitude.values[nearestIndex(picture.record.latitude.values, latitude)],
    dateIndex: columnDates[column],
  };
}
