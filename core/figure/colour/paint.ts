import { bytesFromHex } from "./hex";
import type { ColourMap } from "./maps";

/** Colours of cells that carry no value. */
export interface BlankColours {
  /** For NaN: nothing known here on this date. */
  readonly missing: string;
  /** For cells whose `ocean` entry is 0: never any value. */
  readonly land?: string;
  readonly ocean?: Uint8Array;
}

/**
 * RGBA of `values`, one opaque pixel a value, in the same order. Values at or beyond the limits take the end colours;
 * every NaN gets exactly the missing colour, every cell off the ocean exactly the land colour: no pixel mixes two cells.
 */
export function paint(
  values: ArrayLike<number>,
  limits: readonly [lower: number, upper: number],
  map: ColourMap,
  blank: BlankColours,
): Uint8ClampedArray<ArrayBuffer> {
  const pixels = new Uint8ClampedArray(4 * values.length);
  const packed = new Uint32Array(pixels.buffer);
  const colours = new Uint32Array(map.table.slice().buffer);
  const missing = packedColour(blank.missing);
  const land = packedColour(blank.land ?? blank.missing);
  const last = colours.length - 1;
  const perUnit = colours.length / (limits[1] - limits[0]);
  for (let i = 0; i < values.length; i++) {
    if (blank.ocean && blank.ocean[i] === 0) {
      packed[i] = land;
      continue;
    }
    const position = (values[i] - limits[0]) * perUnit;
    // Written so that NaN (also from a zero-width range) falls to the missing colour.
    if (position >= 0) packed[i] = colours[position >= last ? last : Math.floor(position)];
    else packed[i] = position < 0 ? colours[0] : missing;
  }
  return pixels;
}

/** The four bytes of an opaque pixel in the machine's own byte order. */
function packedColour(hex: string): number {
  return new Uint32Array(new Uint8Array([...bytesFromHex(hex), 255]).buffer)[0];
}
