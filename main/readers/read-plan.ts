import type { GridWindow } from "../../core/model/source";
import { arrayTypes } from "./container";
import type { GridFilePlan } from "./grid-file";

/** Half-open range of indices. */
export type Range = readonly [from: number, to: number];

/** Raw values held at a time; a decompressing library holds them twice. */
const blockBytes = 2 ** 25;

export interface DateInFile {
  readonly timeIndex: number;
  readonly local: number;
}

export interface ReadBlock {
  readonly time: Range;
  readonly dates: readonly DateInFile[];
}

/**
 * The file's column ranges to read for the window's longitudes: as they are, or, where two of them lie in one stored chunk,
 * the range that spans both, so that the chunk is decompressed once.
 */
export function columnReads(plan: GridFilePlan, window: GridWindow): Range[] {
  const { columns, descending, chunks, layout } = plan;
  const ranges = window.longitude.map(
    ([from, to]): Range => (descending.longitude ? [columns - to, columns - from] : [from, to]),
  );
  if (ranges.length < 2 || !chunks) return ranges;
  const width = chunks[layout.longitude];
  const sorted = [...ranges].sort((a, b) => a[0] - b[0]);
  const shared = sorted.some(
    ([from], i) => i > 0 && Math.floor((sorted[i - 1][1] - 1) / width) === Math.floor(from / width),
  );
  return shared ? [[sorted[0][0], sorted[sorted.length - 1][1]]] : ranges;
}

/**
 * Cuts the dates of one file, ascending by `local`, into blocks of neighbouring dates of at most `blockBytes`, ending on chunk borders
 * where one fits. Dates in one chunk go into one block even where dates between them are not wanted.
 */
export function timeBlocks(
  plan: GridFilePlan,
  window: GridWindow,
  reads: readonly Range[],
  dates: readonly DateInFile[],
): ReadBlock[] {
  const { layout, chunks, packing } = plan;
  if (layout.time === null) return dates.length === 0 ? [] : [{ time: [0, 1], dates }];
  const rows = window.latitude[1] - window.latitude[0];
  const width = reads.reduce((sum, [from, to]) => sum + to - from, 0);
  const planeBytes = rows * width * arrayTypes[packing.type].BYTES_PER_ELEMENT;
  const depth = chunks?.[layout.time] ?? 1;
  const planes = Math.max(1, Math.floor(blockBytes / planeBytes));
  // Whole chunks, or, where not even one fits, as many dates as do.
  const limit = planes >= depth ? planes - (planes % depth) : planes;
  const blocks: ReadBlock[] = [];
  let first = 0;
  for (let i = 1; i <= dates.length; i++) {
    const start = dates[first].local - (dates[first].local % (limit >= depth ? depth : 1));
    const previous = dates[i - 1].local;
    const next = dates[i]?.local;
    const joins =
      next !== undefined &&
      next - start < limit &&
      (next === previous + 1 || Math.floor(next / depth) === Math.floor(previous / depth));
    if (joins) continue;
    blocks.push({ time: [dates[first].local, previous + 1], dates: dates.slice(first, i) });
    first = i;
  }
  return blocks;
}
