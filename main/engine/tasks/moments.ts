import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Sums over dates, cell by cell: `sum[q][cell]`, `squares[q][cell]`, and how many valid dates entered. */
export interface Moments {
  readonly sum: readonly Float64Array[];
  readonly squares: readonly Float64Array[];
  readonly count: readonly Int32Array[];
}

/**
 * Sums and sums of squares of several quantities over a range of dates with data, in date order. NaN cells are left out.
 * Counts one a date.
 */
export function momentsTask(
  args: FieldArguments & {
    readonly quantities: readonly string[];
    readonly dates: readonly [number, number];
  },
  job: JobFlags,
): Moments {
  const source = fieldSource(args);
  const cells = source.geometry.rows * source.geometry.columns;
  const sum = args.quantities.map(() => new Float64Array(cells));
  const squares = args.quantities.map(() => new Float64Array(cells));
  const count = args.quantities.map(() => new Int32Array(cells));
  for (let date = args.dates[0]; date < args.dates[1]; date++) {
    job.poll();
    job.count();
    if (!args.record.hasData[date]) continue;
    const planes = source.on(date);
    args.quantities.forEach((id, q) => {
      const plane = planes(id);
      for (let cell = 0; cell < cells; cell++) {
        const value = plane[cell];
        if (Number.isNaN(value)) continue;
        sum[q][cell] += value;
        squares[q][cell] += value * value;
        count[q][cell]++;
      }
    });
  }
  return { sum, squares, count };
}

/** Sums of blocks added in order, so that the result does not depend on who made which block. */
export function addMoments(blocks: readonly Moments[]): Moments {
  const add = <T extends Float64Array | Int32Array>(pick: (block: Moments) => readonly T[]): T[] =>
    pick(blocks[0]).map((first, q) => {
      const total = first.slice() as T;
      for (const block of blocks.slice(1)) {
        const part = pick(block)[q];
        for (let cell = 0; cell < total.length; cell++) total[cell] += part[cell];
      }
      return total;
    });
  return { sum: add((b) => b.sum), squares: add((b) => b.squares), count: add((b) => b.count) };
}
