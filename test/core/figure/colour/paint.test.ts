import { describe, expect, test } from "vitest";
import { bytesFromHex } from "../../../../core/figure/colour/hex";
import { rustTealPaper } from "../../../../core/figure/colour/maps";
import { paint } from "../../../../core/figure/colour/paint";

const missing = "#dfdcd4";
const land = "#bdb8ac";

function pixel(pixels: Uint8ClampedArray, index: number): number[] {
  return [...pixels.subarray(4 * index, 4 * index + 4)];
}

function entry(index: number): number[] {
  return [...rustTealPaper.table.subarray(4 * index, 4 * index + 4)];
}

describe("paint", () => {
  test("NaN is exactly the missing colour and colours none of its neighbours", () => {
    const values = new Float32Array([-1, Number.NaN, 1]);
    const pixels = paint(values, [-1, 1], rustTealPaper, { missing });
    expect(pixel(pixels, 0)).toEqual(entry(0));
    expect(pixel(pixels, 1)).toEqual([...bytesFromHex(missing), 255]);
    expect(pixel(pixels, 2)).toEqual(entry(255));
  });

  test("land is exactly the land colour whatever the value there", () => {
    const values = new Float32Array([0.5, Number.NaN, 0.5]);
    const pixels = paint(values, [-1, 1], rustTealPaper, { missing, land, ocean: Uint8Array.of(0, 0, 1) });
    expect(pixel(pixels, 0)).toEqual([...bytesFromHex(land), 255]);
    expect(pixel(pixels, 1)).toEqual([...bytesFromHex(land), 255]);
    expect(pixel(pixels, 2)).toEqual(entry(192));
  });

  test("values beyond the limits, infinities too, take the end colours", () => {
    const values = [-9, Number.NEGATIVE_INFINITY, 9, Number.POSITIVE_INFINITY];
    const pixels = paint(values, [-1, 1], rustTealPaper, { missing });
    expect([0, 1, 2, 3].map((index) => pixel(pixels, index))).toEqual([entry(0), entry(0), entry(255), entry(255)]);
  });

  test("zero lies between the two middle entries", () => {
    const pixels = paint([-1e-6, 1e-6], [-1, 1], rustTealPaper, { missing });
    expect(pixel(pixels, 0)).toEqual(entry(127));
    expect(pixel(pixels, 1)).toEqual(entry(128));
  });

  test("limits that are not numbers leave everything missing", () => {
    const pixels = paint([0, 1], [Number.NaN, Number.NaN], rustTealPaper, { missing });
    expect(pixel(pixels, 1)).toEqual([...bytesFromHex(missing), 255]);
  });
});
