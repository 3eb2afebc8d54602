import { statSync } from "node:fs";
import type { AbortSignalLike } from "../../core/contract/job";
import { formatDay } from "../../core/model/calendar";
import { Fault } from "../../core/model/errors";
import type { GridWindow, MaskCounts } from "../../core/model/source";
import type { Container, NumericArray } from "./container";
import { fileFault } from "./faults";
import type { GridFilePlan } from "./grid-file";
import { openContainer } from "./index";
import type { GridIndex } from "./joined-grid";
import { noMasked, unpack } from "./packing";
import type { Range, ReadBlock } from "./read-plan";
import { columnReads, timeBlocks } from "./read-plan";

export interface ReadHeightsOptions {
  readonly signal?: AbortSignalLike;
  /** Called before each plane; may throw to stop (a worker polls a shared flag here). */
  readonly poll?: () => void;
}

/**
 * Reads the heights of `window` in metres and hands each date to `onPlane`: rows from south to north, columns from west to
 * east over the window's longitude ranges in turn, NaN where the file has no valid value. The plane is reused: copy what is to
 * be kept. Files are read one after another, the dates of each in ascending order; a date that no file has is not handed over.
 * Each stored chunk is decompressed once, unless one chunk's depth in time of the whole window exceeds the 32 MiB that are held
 * at a time. Returns the masked cells by rule. Throws a Fault: "file" (damaged, cut, changed since it was indexed, naming
 * the dates), "cancelled".
 */
export async function readHeights(
  index: GridIndex,
  window: GridWindow,
  onPlane: (timeIndex: number, plane: Float64Array) => void,
  options: ReadHeightsOptions = {},
): Promise<MaskCounts> {
  const counts = noMasked();
  const byFile = new Map<number, { timeIndex: number; local: number }[]>();
  for (let timeIndex = window.time[0]; timeIndex < window.time[1]; timeIndex++) {
    const file = index.fileOf[timeIndex];
    if (file < 0) continue;
    const dates = byFile.get(file) ?? [];
    dates.push({ timeIndex, local: index.localOf[timeIndex] });
    byFile.set(file, dates);
  }
  const columns = window.longitude.reduce((sum, [from, to]) => sum + to - from, 0);
  const plane = new Float64Array((window.latitude[1] - window.latitude[0]) * columns);
  for (const [file, dates] of byFile) {
    const plan = index.files[file];
    dates.sort((a, b) => a.local - b.local);
    const container = await openUnchanged(plan);
    try {
      const reads = columnReads(plan, window);
      for (const block of timeBlocks(plan, window, reads, dates)) {
        // Lets an abort message arrive between two synchronous blocks.
        await new Promise((resolve) => setImmediate(resolve));
        const pieces = readBlock(container, plan, window, reads, block, index);
        for (const { timeIndex, local } of block.dates) {
          if (options.signal?.aborted) throw cancelled(plan.path);
          options.poll?.();
          const raw = gatherPlane(plan, window, reads, pieces, local - block.time[0]);
          unpack(raw, plan.packing, plan.metres, counts, plane);
          onPlane(timeIndex, plane);
        }
      }
    } finally {
      container.close();
    }
  }
  return counts;
}

async function openUnchanged(plan: GridFilePlan): Promise<Container> {
  const container = await openContainer(plan.path);
  if (container.bytes === plan.bytes && statSync(plan.path).mtimeMs === plan.modifiedMs) return container;
  container.close();
  throw fileFault(plan.path, "the file as it was indexed", "one changed since", "load the grid again");
}

function readBlock(
  container: Container,
  plan: GridFilePlan,
  window: GridWindow,
  reads: readonly Range[],
  block: ReadBlock,
  index: GridIndex,
): NumericArray[] {
  const { layout, shape } = plan;
  const rows = storedRows(plan, window);
  try {
    return reads.map((columns) => {
      const range = (i: number): Range =>
        i === layout.time ? block.time : i === layout.latitude ? rows : i === layout.longitude ? columns : [0, 1];
      return container.read(
        plan.height,
        shape.map((_, i) => range(i)[0]),
        shape.map((_, i) => range(i)[1] - range(i)[0]),
      );
    });
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const date = (at: number) => formatDay(index.time.calendar, index.time.values[block.dates.at(at)?.timeIndex ?? 0]);
    const dates = block.dates.length > 1 ? `${date(0)} to ${date(-1)}` : date(0);
    throw new Fault({ ...error.toData(), where: `${error.where}, ${dates}` }, { cause: error });
  }
}

/** The one place where the file's order of dimensions and directions becomes rows northward, columns eastward. */
function gatherPlane(
  plan: GridFilePlan,
  window: GridWindow,
  reads: readonly Range[],
  pieces: readonly NumericArray[],
  time: number,
): NumericArray {
  const rows = window.latitude[1] - window.latitude[0];
  const columns = window.longitude.reduce((sum, [from, to]) => sum + to - from, 0);
  const { layout, descending } = plan;
  const plane = new (pieces[0].constructor as new (length: number) => NumericArray)(rows * columns);
  let firstColumn = 0;
  for (const [from, to] of window.longitude) {
    const stored = storedColumns(plan, [from, to]);
    const which = reads.findIndex(([start, end]) => start <= stored[0] && stored[1] <= end);
    const read = reads[which];
    const piece = pieces[which];
    const size = (i: number) => (i === layout.latitude ? rows : i === layout.longitude ? read[1] - read[0] : 1);
    const blockLength = piece.length / (rows * (read[1] - read[0]));
    const strides = stridesOf(plan.shape.map((_, i) => (i === layout.time ? blockLength : size(i))));
    const rowStride = strides[layout.latitude] * (descending.latitude ? -1 : 1);
    const columnStride = strides[layout.longitude] * (descending.longitude ? -1 : 1);
    const width = to - from;
    const firstRow = descending.latitude ? (rows - 1) * strides[layout.latitude] : 0;
    const westmost = (descending.longitude ? stored[1] - 1 : stored[0]) - read[0];
    const origin =
      (layout.time === null ? 0 : time * strides[layout.time]) + firstRow + westmost * strides[layout.longitude];
    for (let row = 0; row < rows; row++) {
      let at = origin + row * rowStride;
      const target = row * columns + firstColumn;
      for (let column = 0; column < width; column++, at += columnStride) plane[target + column] = piece[at];
    }
    firstColumn += width;
  }
  return plane;
}

function storedRows({ rows, descending }: GridFilePlan, window: GridWindow): Range {
  const [from, to] = window.latitude;
  return descending.latitude ? [rows - to, rows - from] : [from, to];
}

/** Columns of the file that hold a range of ascending longitudes. */
function storedColumns({ columns, descending }: GridFilePlan, [from, to]: Range): Range {
  return descending.longitude ? [columns - to, columns - from] : [from, to];
}

function stridesOf(shape: readonly number[]): number[] {
  const strides = new Array<number>(shape.length);
  for (let i = shape.length - 1, stride = 1; i >= 0; stride *= shape[i], i--) strides[i] = stride;
  return strides;
}

function cancelled(where: string): Fault {
  return new Fault({
    tag: "cancelled",
    where,
    expected: "to read on",
    got: "a cancel",
    advice: "start again if wanted",
  });
}
