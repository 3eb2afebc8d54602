import { expect, test } from "vitest";
import { planeOf } from "../../../core/model/cube";
import { rowMean } from "../../../core/numeric/row-mean";
import { surveyValidity } from "../../../core/study/record";

test("the mean of 2^25 float32 ones is one: sums are taken in float64", () => {
  const columns = 2 ** 25;
  const cube = { dates: 1, rows: 1, columns, values: new Float32Array(columns).fill(1) };
  const ocean = new Uint8Array(columns).fill(1);
  expect(rowMean(planeOf(cube, 0), 0, columns, ocean, null, 0.5)).toEqual({ mean: 1, valid: columns });
  const long = { dates: 2 ** 16, rows: 1, columns: 1, values: new Float32Array(2 ** 16).fill(0.1) };
  expect(surveyValidity(long).mean[0]).toBe(Math.fround(0.1));
});

test("land is what never has a value; a date is complete when every other cell has one", () => {
  const gap = Number.NaN;
  const values = Float64Array.of(1, gap, 3, 2, gap, gap, gap, gap, gap);
  const { ocean, hasData, complete, coverage, irregular } = surveyValidity({ dates: 3, rows: 1, columns: 3, values });
  expect([...ocean]).toEqual([1, 0, 1]);
  expect([...hasData]).toEqual([1, 1, 0]);
  expect([...complete]).toEqual([1, 0, 0]);
  expect([...coverage]).toEqual([1, 0.5, 0]);
  expect([...irregular]).toEqual([2]);
});
