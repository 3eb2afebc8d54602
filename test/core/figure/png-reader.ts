import { crc32, inflateSync } from "node:zlib";

export interface ReadPng {
  readonly columns: number;
  readonly rows: number;
  readonly colourType: number;
  readonly pixels: Uint8ClampedArray;
}

/** Reads PNGs of 8 bits and unfiltered lines with Node's own zlib; checks every chunk's CRC. Independent of the encoder. */
export function readPng(file: Uint8Array): ReadPng {
  const bytes = Buffer.from(file);
  if (bytes.subarray(0, 8).toString("latin1") !== "\x89PNG\r\n\x1a\n") throw new Error("no PNG signature");
  const chunks = new Map<string, Buffer>();
  for (let offset = 8; offset < bytes.length; ) {
    const length = bytes.readUInt32BE(offset);
    const type = bytes.subarray(offset + 4, offset + 8).toString("latin1");
    const body = bytes.subarray(offset + 8, offset + 8 + length);
    const stored = bytes.readUInt32BE(offset + 8 + length);
    if (crc32(bytes.subarray(offset + 4, offset + 8 + length)) !== stored) throw new Error(`CRC of ${type} is wrong`);
    chunks.set(type, Buffer.concat([chunks.get(type) ?? Buffer.alloc(0), body]));
    offset += 12 + length;
  }
  const header = chunks.get("IHDR") ?? Buffer.alloc(13);
  const columns = header.readUInt32BE(0);
  const rows = header.readUInt32BE(4);
  const colourType = header[9];
  const samples = { 2: 3, 3: 1, 6: 4 }[colourType] ?? 0;
  const palette = chunks.get("PLTE") ?? Buffer.alloc(0);
  const lines = inflateSync(chunks.get("IDAT") ?? Buffer.alloc(0));
  const pixels = new Uint8ClampedArray(4 * columns * rows);
  for (let row = 0; row < rows; row++) {
    const start = row * (columns * samples + 1);
    if (lines[start] !== 0) throw new Error("a filtered line");
    for (let column = 0; column < columns; column++) {
      const source = start + 1 + column * samples;
      const colour =
        samples === 1
          ? [...palette.subarray(3 * lines[source], 3 * lines[source] + 3), 255]
          : [lines[source], lines[source + 1], lines[source + 2], samples === 4 ? lines[source + 3] : 255];
      pixels.set(colour, 4 * (row * columns + column));
    }
  }
  return { columns, rows, colourType, pixels };
}
