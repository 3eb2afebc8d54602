import { expect, it } from "vitest";
import type { GridWindow } from "../../../core/model/source";
import type { GridFilePlan } from "../../../main/readers/grid-file";
import { columnReads, timeBlocks } from "../../../main/readers/read-plan";

const plan = (shape: number[], chunks: number[] | null): GridFilePlan => ({
  path: "a.nc",
  bytes: 0,
  modifiedMs: 0,
  height: "adt",
  shape,
  chunks,
  layout: { rank: 3, time: 0, latitude: 1, longitude: 2 },
  packing: { type: "int16", fills: [], validMin: null, validMax: null, scale: 1, offset: 0, notes: [] },
  metres: 1,
  rows: shape[1],
  columns: shape[2],
  descending: { latitude: false, longitude: false },
});
const whole = ([times, rows, columns]: number[]): GridWindow => ({
  time: [0, times],
  latitude: [0, rows],
  longitude: [[0, columns]],
});
const dates = (locals: readonly number[]) => locals.map((local) => ({ timeIndex: local, local }));
const run = (from: number, to: number) => Array.from({ length: to - from }, (_, i) => from + i);

it.each([
  ["a chunk a map", [4000, 720, 1440], [1, 720, 1440]],
  ["seven maps a chunk", [1000, 720, 1440], [7, 90, 90]],
  ["sixteen maps a chunk", [1003, 720, 1440], [16, 100, 100]],
])("with %s no chunk is read twice and no block is larger than 32 MiB", (_, shape, chunks) => {
  const grid = plan(shape, chunks);
  const window = whole(shape);
  const blocks = timeBlocks(grid, window, columnReads(grid, window), dates(run(0, shape[0])));
  const read = blocks.flatMap(({ time: [from, to] }) =>
    run(Math.floor(from / chunks[0]), Math.floor((to - 1) / chunks[0]) + 1),
  );
  expect(new Set(read).size).toBe(read.length);
  expect(blocks.flatMap((block) => block.dates.map(({ local }) => local))).toEqual(run(0, shape[0]));
  for (const { time } of blocks) expect((time[1] - time[0]) * shape[1] * shape[2] * 2).toBeLessThanOrEqual(2 ** 25);
});

it("dates that do not start on a chunk border still end their blocks on one", () => {
  const shape = [1000, 720, 1440];
  const grid = plan(shape, [7, 90, 90]);
  const window = whole(shape);
  const blocks = timeBlocks(grid, window, columnReads(grid, window), dates(run(3, 60)));
  for (const { time } of blocks.slice(0, -1)) expect(time[1] % 7).toBe(0);
});

it("dates apart are read apart, those in one chunk together", () => {
  const shape = [100, 10, 10];
  const grid = plan(shape, [10, 10, 10]);
  const window = whole(shape);
  const blocks = timeBlocks(grid, window, columnReads(grid, window), dates([1, 5, 30, 31]));
  expect(blocks.map(({ time }) => time)).toEqual([
    [1, 6],
    [30, 32],
  ]);
});

it("where one chunk's depth is beyond the limit the dates are cut all the same", () => {
  const shape = [1000, 720, 1440];
  const grid = plan(shape, [1000, 20, 20]);
  const window = whole(shape);
  const blocks = timeBlocks(grid, window, columnReads(grid, window), dates(run(0, 1000)));
  for (const { time } of blocks) expect((time[1] - time[0]) * 720 * 1440 * 2).toBeLessThanOrEqual(2 ** 25);
});

it("two longitude ranges in one chunk are read as one, in different chunks apart", () => {
  const seam: GridWindow = {
    time: [0, 1],
    latitude: [0, 10],
    longitude: [
      [90, 100],
      [0, 10],
    ],
  };
  expect(columnReads(plan([1, 10, 100], [1, 10, 100]), seam)).toEqual([[0, 100]]);
  expect(columnReads(plan([1, 10, 100], [1, 10, 50]), seam)).toEqual([
    [90, 100],
    [0, 10],
  ]);
  expect(columnReads(plan([1, 10, 100], null), seam)).toEqual([
    [90, 100],
    [0, 10],
  ]);
});
