import type { VariableInfo } from "./container";
import { fileFault } from "./faults";
import type { Recognised } from "./recognise";

/** Which of the height's dimensions is which; time is null where one date stands beside the map. Plain data. */
export interface GridLayout {
  readonly rank: number;
  readonly time: number | null;
  readonly latitude: number;
  readonly longitude: number;
}

/**
 * Finds time, latitude and longitude among the height's dimensions, in any order. Further dimensions (depth, a model run)
 * must have length one. Throws a Fault (tag "file") for coordinates over two dimensions and for longer further ones.
 */
export function gridLayout(path: string, { height, latitude, longitude, time }: Recognised): GridLayout {
  const where = `${path}: ${height.name}`;
  const indexOf = (coordinate: VariableInfo): number => {
    if (coordinate.shape.length === 1) return height.dimensions.indexOf(coordinate.dimensions[0]);
    const got = `${coordinate.name} over ${coordinate.dimensions.join(", ")}`;
    const advice = "interpolate the data to a grid of latitude and longitude first";
    throw fileFault(where, "latitude and longitude over one dimension each", got, advice);
  };
  const layout = { rank: height.shape.length, latitude: indexOf(latitude), longitude: indexOf(longitude) };
  const timeIndex = time.shape.length === 1 ? height.dimensions.indexOf(time.dimensions[0]) : -1;
  const used = new Set([layout.latitude, layout.longitude, timeIndex]);
  const distinct =
    layout.latitude !== layout.longitude && timeIndex !== layout.latitude && timeIndex !== layout.longitude;
  const extra = height.dimensions.filter((_, i) => !used.has(i) && height.shape[i] !== 1);
  if (extra.length > 0 || !distinct) {
    const dimensions = height.dimensions.map((name, i) => `${name} ${height.shape[i]}`).join(", ");
    const advice = "cut the file down to one value along its other dimensions";
    throw fileFault(where, "dimensions time, latitude, longitude", dimensions, advice);
  }
  return { ...layout, time: timeIndex < 0 ? null : timeIndex };
}
