import { describe, expect, test } from "vitest";
import {
  cellEdges,
  gatherCells,
  nearestCell,
  nearestCells,
  nearestCellsOrGaps,
  usualSpacing,
} from "../../../core/figure/resample";

describe("cells about their centres", () => {
  test("edges lie half a cell beyond the end centres", () => {
    expect(cellEdges([10, 11, 12])).toEqual([9.5, 12.5]);
    expect(cellEdges([0, 1, 4])).toEqual([-0.5, 5.5]);
    expect(cellEdges([7], 2)).toEqual([6, 8]);
  });

  test("the nearest cell is the one a linear search finds", () => {
    const centres = [-3, -1, 0, 0.5, 4, 9];
    for (let position = -5; position < 11; position += 0.13) {
      const distances = centres.map((centre) => Math.abs(centre - position));
      expect(distances[nearestCell(centres, position)]).toBe(Math.min(...distances));
    }
  });

  test("as many pixels as even cells show each cell once, in either direction", () => {
    const centres = Float64Array.from({ length: 168 }, (_, index) => 20.0625 + 0.125 * index);
    const [first, last] = cellEdges(centres);
    const indices = Array.from(centres.keys());
    expect([...nearestCells(centres, first, last, 168)]).toEqual(indices);
    expect([...nearestCells(centres, last, first, 168)]).toEqual(indices.reverse());
  });

  test("uneven cells take pixels in proportion to their widths", () => {
    const cells = nearestCells([0, 1, 4], -0.5, 5.5, 600);
    const counts = [0, 1, 2].map((cell) => cells.filter((owner) => owner === cell).length);
    // Boundaries at 0.5 and 2.5 on a span of 6.
    expect(counts).toEqual([100, 200, 300]);
  });

  test("a gap longer than 1.5 steps stays blank but for half a step on either side", () => {
    const cells = nearestCellsOrGaps([0, 1, 2, 6, 7], -0.5, 7.5, 80);
    const blank = [...cells.entries()].filter(([, cell]) => cell === -1).map(([pixel]) => -0.5 + (pixel + 0.5) / 10);
    expect(Math.min(...blank)).toBeCloseTo(2.55, 9);
    expect(Math.max(...blank)).toBeCloseTo(5.45, 9);
    expect(blank.length).toBe(30);
  });

  test("a gap of 1.5 steps or less is shared between its neighbours", () => {
    expect([...nearestCellsOrGaps([0, 1, 2.5, 3.5], -0.5, 4, 45)]).not.toContain(-1);
  });

  test("pixels beyond the last cell's half step are blank", () => {
    const cells = nearestCellsOrGaps([0, 1, 2], -0.5, 4.5, 50);
    expect([...cells.subarray(30)]).toEqual(new Array(20).fill(-1));
  });

  test("the usual spacing is the median, not stretched by one gap", () => {
    expect(usualSpacing([0, 1, 2, 9, 10])).toBe(1);
    expect(usualSpacing([3])).toBeNaN();
  });

  test("gathering turns blank rows and columns into NaN and copies the rest", () => {
    const gathered = gatherCells([1, 2, 3, 4], 2, [1, 0], [0, -1, 1]);
    expect([...gathered]).toEqual([3, Number.NaN, 4, 1, Number.NaN, 2]);
  });
});
