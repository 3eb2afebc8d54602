/** A quantity that changes with latitude: straight lines between the latitudes given (ascending), level beyond them. */
export interface LatitudeTable {
  readonly latitudesDegrees: readonly number[];
  readonly values: readonly number[];
}

/** The same value at every latitude. */
export function sameEverywhere(value: number): LatitudeTable {
  return { latitudesDegrees: [0], values: [value] };
}

export function valueAtLatitude({ latitudesDegrees, values }: LatitudeTable, latitudeDegrees: number): number {
  const last = latitudesDegrees.length - 1;
  if (latitudeDegrees <= latitudesDegrees[0]) return values[0];
  if (latitudeDegrees >= latitudesDegrees[last]) return values[last];
  let above = 1;
  while (latitudesDegrees[above] < latitudeDegrees) above++;
  const share =
    (latitudeDegrees - latitudesDegrees[above - 1]) / (latitudesDegrees[above] - latitudesDegrees[above - 1]);
  return values[above - 1] + share * (values[above] - values[above - 1]);
}
