import { describe, expect, test } from "vitest";
import { doubtfulCells } from "../../../../core/figure/latitudes/doubtful-cells";
import { hatchPath } from "../../../../core/figure/latitudes/hatch";

interface Segment {
  readonly x: number;
  readonly y: number;
  readonly length: number;
}

function segments(d: string): Segment[] {
  return [...d.matchAll(/M(-?[\d.]+) (-?[\d.]+)l-([\d.]+) ([\d.]+)/g)].map(([, x, y, left, down]) => {
    expect(left).toBe(down);
    return { x: Number(x), y: Number(y), length: Number(down) };
  });
}

const box = { x: 10, y: 20, width: 60, height: 40 };
// Tenths of a pixel in each of a segment's three numbers.
const rounding = 0.15;

describe("hatching", () => {
  test("nothing marked gives nothing", () => {
    expect(hatchPath(new Uint8Array(12), 4, box, 5)).toBe("");
    expect(hatchPath(new Uint8Array(0), 0, box, 5)).toBe("");
  });

  test("everything marked gives one unbroken segment a line, from side to side of the box", () => {
    const found = segments(hatchPath(new Uint8Array(12).fill(1), 4, box, 5));
    expect(found.length).toBe((box.width + box.height) / 5);
    for (const { x, y, length } of found) {
      const begins = Math.abs(y - box.y) <= rounding || Math.abs(x - box.x - box.width) <= rounding;
      const ends = Math.abs(y + length - box.y - box.height) <= rounding || Math.abs(x - length - box.x) <= rounding;
      expect(begins && ends).toBe(true);
    }
  });

  test("every point of every segment lies in a marked cell, and a line's marked length is all drawn", () => {
    const [columns, rows, spacing] = [12, 10, 3];
    const marked = Uint8Array.from({ length: columns * rows }, (_, cell) => ((cell * 2654435761) % 7 < 3 ? 1 : 0));
    const size = { width: box.width / columns, height: box.height / rows };
    const isMarked = (x: number, y: number): boolean => {
      const [column, row] = [Math.floor((x - box.x) / size.width), Math.floor((y - box.y) / size.height)];
      return column >= 0 && column < columns && row >= 0 && row < rows && marked[row * columns + column] === 1;
    };
    const found = segments(hatchPath(marked, columns, box, spacing));
    for (const { x, y, length } of found) {
      for (let depth = rounding; depth < length - rounding; depth += 0.1) {
        expect(isMarked(x - depth, y + depth) || isMarked(x - depth + rounding, y + depth)).toBe(true);
      }
    }
    // The slow way: walk every line in small steps and count those in marked cells.
    const stride = 0.01;
    let walked = 0;
    for (let foot = spacing / 2; foot < box.width + box.height; foot += spacing) {
      for (let depth = stride / 2; depth < box.height; depth += stride) {
        if (isMarked(box.x + foot - depth, box.y + depth)) walked += stride;
      }
    }
    const drawn = found.reduce((sum, { length }) => sum + length, 0);
    expect(Math.abs(drawn - walked)).toBeLessThan(0.1 * found.length);
  });

  test("a map of a thousand rows and columns full of eddies stays under 200 kB", () => {
    const size = 1000;
    const marked = Uint8Array.from({ length: size * size }, (_, cell) => {
      const [y, x] = [Math.floor(cell / size), cell % size];
      return Math.abs(Math.sin(x / 9 + y / 40) + Math.sin(y / 7 - x / 60)) < 0.5 ? 1 : 0;
    });
    expect(hatchPath(marked, size, { x: 0, y: 0, width: 700, height: 500 }, 5.4).length).toBeLessThan(200_000);
  });
});

describe("cells within their error", () => {
  const plane = (values: number[]) => ({ rows: 1, columns: values.length, values: Float32Array.from(values) });

  test("a magnitude under 1.96 standard errors is marked, whatever its sign; a missing value or error never", () => {
    const values = plane([1, -1, 3, -3, Number.NaN, 1, 0]);
    const errors = plane([1, 1, 1, 1, 1, Number.NaN, 0]);
    expect([...doubtfulCells(values, errors)]).toEqual([1, 1, 0, 0, 0, 0, 0]);
  });
});
