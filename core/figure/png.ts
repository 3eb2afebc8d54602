import { zlibSync } from "fflate";

const signature = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a];
const colourTypes = { palette: 3, rgb: 2, rgba: 6 } as const;

/**
 * RGBA pixels (rows from the top) as a PNG file, 8 bits deep: a palette where there are at most 256 opaque colours, else
 * RGB where all are opaque, else RGBA. No time stamp, so equal pixels give equal bytes.
 * Ref: W3C Portable Network Graphics (PNG) Specification.
 */
export function encodePng(pixels: Uint8ClampedArray, columns: number, rows: number): Uint8Array {
  const packed = new Uint32Array(pixels.slice().buffer);
  const isOpaque = everyOpaque(pixels);
  const palette = isOpaque ? paletteOf(packed) : undefined;
  const kind = palette ? "palette" : isOpaque ? "rgb" : "rgba";
  const header = new Uint8Array(13);
  const view = new DataView(header.buffer);
  view.setUint32(0, columns);
  view.setUint32(4, rows);
  header.set([8, colourTypes[kind], 0, 0, 0], 8);
  const lines = palette
    ? paletteLines(packed, palette, columns, rows)
    : colourLines(pixels, columns, rows, isOpaque ? 3 : 4);
  const chunks = [chunk("IHDR", header)];
  if (palette) chunks.push(chunk("PLTE", paletteBytes(palette)));
  chunks.push(chunk("IDAT", zlibSync(lines, { level: 6 })), chunk("IEND", new Uint8Array(0)));
  return joined([Uint8Array.from(signature), ...chunks]);
}

function everyOpaque(pixels: Uint8ClampedArray): boolean {
  for (let i = 3; i < pixels.length; i += 4) if (pixels[i] !== 255) return false;
  return true;
}

/** Index by packed colour, in order of first appearance; undefined when there are more than 256. */
function paletteOf(packed: Uint32Array): Map<number, number> | undefined {
  const palette = new Map<number, number>();
  let previous = -1;
  for (const colour of packed) {
    if (colour === previous) continue;
    previous = colour;
    if (palette.has(colour)) continue;
    if (palette.size === 256) return undefined;
    palette.set(colour, palette.size);
  }
  return palette;
}

function paletteBytes(palette: Map<number, number>): Uint8Array {
  const bytes = new Uint8Array(3 * palette.size);
  for (const [colour, index] of palette) {
    bytes.set(new Uint8Array(Uint32Array.of(colour).buffer).subarray(0, 3), 3 * index);
  }
  return bytes;
}

/** Each line starts with filter type 0 (none). */
function paletteLines(packed: Uint32Array, palette: Map<number, number>, columns: number, rows: number): Uint8Array {
  const lines = new Uint8Array(rows * (columns + 1));
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      lines[row * (columns + 1) + 1 + column] = palette.get(packed[row * columns + column]) ?? 0;
    }
  }
  return lines;
}

function colourLines(pixels: Uint8ClampedArray, columns: number, rows: number, samples: 3 | 4): Uint8Array {
  const lines = new Uint8Array(rows * (columns * samples + 1));
  let target = 0;
  for (let row = 0; row < rows; row++) {
    target += 1;
    for (let column = 0; column < columns; column++) {
      const source = 4 * (row * columns + column);
      for (let sample = 0; sample < samples; sample++) lines[target++] = pixels[source + sample];
    }
  }
  return lines;
}

function chunk(type: string, data: Uint8Array): Uint8Array {
  const bytes = new Uint8Array(12 + data.length);
  const view = new DataView(bytes.buffer);
  view.setUint32(0, data.length);
  for (let i = 0; i < 4; i++) bytes[4 + i] = type.charCodeAt(i);
  bytes.set(data, 8);
  view.setUint32(8 + data.length, crc32(bytes.subarray(4, 8 + data.length)));
  return bytes;
}

const crcTable = Uint32Array.from({ length: 256 }, (_, index) => {
  let remainder = index;
  for (let bit = 0; bit < 8; bit++) remainder = remainder & 1 ? 0xedb88320 ^ (remainder >>> 1) : remainder >>> 1;
  return remainder;
});

/** CRC-32 as PNG uses it (ISO 3309, reflected polynomial 0xEDB88320). */
function crc32(bytes: Uint8Array): number {
  let remainder = 0xffffffff;
  for (const byte of bytes) remainder = crcTable[(remainder ^ byte) & 255] ^ (remainder >>> 8);
  return (remainder ^ 0xffffffff) >>> 0;
}

function joined(parts: readonly Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let offset = 0;
  for (const part of parts) {
    whole.set(part, offset);
    offset += part.length;
  }
  return whole;
}
