import { formatLatitude, formatNumber } from "../format";

/** A followed jet as the figure draws it: latitudes in degrees north on some of the record's dates. */
export interface JetLine {
  readonly id: number;
  /** 1 eastward, -1 westward. */
  readonly sign: 1 | -1;
  readonly meanLatitude: number;
  /** Rising indices into the record's dates. */
  readonly dates: Int32Array;
  readonly latitudes: Float64Array;
}

export interface JetPlace {
  readonly latitude: number;
  /** False where the jet was not found on the date itself. */
  readonly found: boolean;
}

/** Where a jet lies on a date: as found, else between the dates around, else (before or after its life) its mean latitude. */
export function jetPlaceOn(jet: JetLine, date: number): JetPlace {
  const { dates, latitudes, meanLatitude } = jet;
  const next = dates.findIndex((each) => each >= date);
  if (next < 0 || (next === 0 && dates[0] > date)) return { latitude: meanLatitude, found: false };
  if (dates[next] === date) return { latitude: latitudes[next], found: true };
  const share = (date - dates[next - 1]) / (dates[next] - dates[next - 1]);
  return { latitude: latitudes[next - 1] + share * (latitudes[next] - latitudes[next - 1]), found: false };
}

/** Writes jets' latitudes beside an axis that names the hemisphere, "37.5°": with it only where the axis has both. */
export function jetLatitudeText(latitude: number, digits: number, hasBothHemispheres: boolean): string {
  return hasBothHemispheres ? formatLatitude(latitude, digits) : `${formatNumber(Math.abs(latitude), digits)}°`;
}
