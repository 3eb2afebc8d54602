import type { GridIndex } from "../readers/joined-grid";

type Range = readonly [from: number, to: number];

/**
 * Splits dates among readers so that no stored chunk falls to two of them: a range a file, and a long file into up to
 * `parts` ranges that end on its chunks' borders in time.
 */
export function readRanges(index: GridIndex, [from, to]: Range, parts: number): Range[] {
  const ranges: [number, number][] = [];
  let last = -1;
  for (let date = from; date < to; date++) {
    const file = index.fileOf[date];
    if (file < 0) continue;
    const range = ranges.at(-1);
    if (range && file === last && !startsPart(index, date, range[0], (to - from) / parts)) range[1] = date + 1;
    else ranges.push([date, date + 1]);
    last = file;
  }
  return ranges;
}

/** True where a new range may begin: the one before is long enough and a chunk begins at this date. */
function startsPart(index: GridIndex, date: number, start: number, length: number): boolean {
  if (date - start < Math.max(length, 64)) return false;
  const { chunks, layout } = index.files[index.fileOf[date]];
  const depth = layout.time === null ? 1 : (chunks?.[layout.time] ?? 1);
  return index.localOf[date] % depth === 0;
}
