import { describe, expect, test } from "vitest";
import { base64 } from "../../../core/figure/base64";
import { encodePng } from "../../../core/figure/png";
import { readPng } from "./png-reader";

function pixelsOf(count: number, colour: (index: number) => readonly number[]): Uint8ClampedArray {
  return Uint8ClampedArray.from(Array.from({ length: count }, (_, index) => colour(index)).flat());
}

describe("PNG", () => {
  test("few opaque colours make a palette that decodes to the same pixels", () => {
    const pixels = pixelsOf(7 * 5, (index) => [index * 7, 255 - index, index % 3, 255]);
    const read = readPng(encodePng(pixels, 7, 5));
    expect(read).toMatchObject({ columns: 7, rows: 5, colourType: 3 });
    expect(read.pixels).toEqual(pixels);
  });

  test("256 colours still fit a palette, 257 make RGB", () => {
    const colour = (index: number) => [index & 255, index >> 8, 9, 255];
    for (const [count, type] of [
      [256, 3],
      [257, 2],
    ]) {
      const pixels = pixelsOf(count, colour);
      const read = readPng(encodePng(pixels, count, 1));
      expect(read.colourType).toBe(type);
      expect(read.pixels).toEqual(pixels);
    }
  });

  test("translucent pixels keep their alpha", () => {
    const pixels = pixelsOf(12, (index) => [index, 2 * index, 3 * index, 20 * index]);
    const read = readPng(encodePng(pixels, 4, 3));
    expect(read.colourType).toBe(6);
    expect(read.pixels).toEqual(pixels);
  });

  test("equal pixels give equal bytes", () => {
    const pixels = pixelsOf(100, (index) => [index, 0, 0, 255]);
    expect(encodePng(pixels, 10, 10)).toEqual(encodePng(pixels.slice(), 10, 10));
  });
});

test("base64 agrees with Node's for every remainder of three", () => {
  for (let length = 0; length < 9; length++) {
    const bytes = Uint8Array.from({ length }, (_, index) => 250 - 31 * index);
    expect(base64(bytes)).toBe(Buffer.from(bytes).toString("base64"));
  }
});
