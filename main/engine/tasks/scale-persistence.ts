import { countPersistence, type Persistence } from "../../../core/jets/persistence";
import type { JobFlags } from "../job";
import { noSign } from "./scale-signs";

/** Persistence of a range of cells from planes of signs, `signs[i * cells + cell]`. */
export function scalePersistenceTask(
  args: {
    readonly signs: Int8Array;
    readonly cells: number;
    readonly range: readonly [number, number];
    readonly stepDays: number;
    readonly bridgedDates: number;
  },
  job: JobFlags,
): Persistence {
  const [from, to] = args.range;
  const count = countPersistence(to - from, args.stepDays, args.bridgedDates);
  const plane = new Float64Array(to - from);
  for (let start = from; start < args.signs.length; start += args.cells) {
    job.poll();
    for (let i = 0; i < plane.length; i++) {
      const sign = args.signs[start + i];
      plane[i] = sign === noSign ? Number.NaN : sign;
    }
    count.add(plane);
  }
  return count.result();
}
