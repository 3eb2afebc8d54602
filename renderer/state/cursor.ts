/** Where the person points: a latitude in degrees north and a date as an index into the record's time axis. */
export interface Cursor {
  readonly latitude: number;
  readonly dateIndex: number;
}

/** Index of the axis value nearest to `value`; the axis is monotonic in either direction and not empty. */
export function nearestIndex(values: ArrayLike<number>, value: number): number {
  const last = values.length - 1;
  const rising = values[last] >= values[0];
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (values[middle] <= value === rising) low = middle;
    else high = middle;
  }
  return Math.abs(values[high] - value) < Math.abs(values[low] - value) ? high : low;
}

/** The latitude `steps` rows to the north (south if negative) of the row nearest to `latitude`, held to the axis. */
export function stepLatitude(latitudes: ArrayLike<number>, latitude: number, steps: number): number {
  const northward = latitudes[latitudes.length - 1] >= latitudes[0] ? steps : -steps;
  return latitudes[clampIndex(nearestIndex(latitudes, latitude) + northward, latitudes.length)];
}

export function clampIndex(index: number, length: number): number {
  return Math.min(length - 1, Math.max(0, Math.round(index)));
}

/** The two axes a cursor moves on. */
interface CursorAxes {
  readonly latitude: { readonly values: ArrayLike<number> };
  readonly time: { readonly values: ArrayLike<number> };
}

/**
 * The cursor of one record carried over to another: its latitude where that lies inside, else the middle one; the date
 * nearest to its own. Without a cursor the middle of both axes.
 */
export function fitCursor(cursor: Cursor | null, from: CursorAxes | null, to: CursorAxes): Cursor {
  const latitudes = to.latitude.values;
  const days = to.time.values;
  const [first, last] = [latitudes[0], latitudes[latitudes.length - 1]];
  const inside = cursor && cursor.latitude >= Math.min(first, last) && cursor.latitude <= Math.max(first, last);
  return {
    latitude: inside ? cursor.latitude : latitudes[latitudes.length >> 1],
    dateIndex: cursor && from ? nearestIndex(days, from.time.values[cursor.dateIndex]) : days.length >> 1,
  };
}
