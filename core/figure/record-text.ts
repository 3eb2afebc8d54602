import { formatLatitudeRange, formatLongitudeRange, formatSignificant } from "./format";
import type { RecordAxes } from "./latitudes/input";

/** The corners of a record's region, "20.5–40.5° N, 150–125° W": centres of the outermost cells. */
export function boxText({ latitude, longitude }: Pick<RecordAxes, "latitude" | "longitude">): string {
  return `${formatLatitudeRange(...ends(latitude.values))}, ${formatLongitudeRange(...ends(longitude.values))}`;
}

function ends(values: Float64Array): [number, number] {
  const last = values[values.length - 1];
  return values[0] <= last ? [values[0], last] : [last, values[0]];
}

/** A grid's name with its spacing and sampling: "Grid A · 0.125° · 3 d". */
export function gridText(name: string, { latitude, time }: Pick<RecordAxes, "latitude" | "time">): string {
  const degrees = Math.abs(latitude.step);
  const days = Math.abs(time.step);
  const parts = [name];
  if (degrees > 0) parts.push(`${formatSignificant(degrees, 3)}°`);
  if (days > 0) parts.push(`${formatSignificant(days, 3)} d`);
  return parts.join(" · ");
}

/** What standard errors come from: "a 2 cm height error", "the file's own height error", with the distance it is alike over. */
export function errorSourceText(settings: {
  readonly heightMetres: number | "file" | null;
  readonly correlationKm: number;
}): string {
  const { heightMetres, correlationKm } = settings;
  if (heightMetres === null) return "no height error";
  const error =
    heightMetres === "file"
      ? "the file’s own height error"
      : `a ${formatSignificant(100 * heightMetres, 3)} cm height error`;
  return correlationKm > 0 ? `${error} alike over ${formatSignificant(correlationKm, 4)} km` : error;
}
