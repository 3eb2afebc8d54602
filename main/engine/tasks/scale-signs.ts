import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Stands for a missing value among signs. */
export const noSign = 2;

/**
 * Signs of u on a range of the dates chosen into shared planes, `signs[i * cells + cell]`: 1, 0, -1 or noSign. Counts one a date.
 */
export function scaleSignsTask(
  args: FieldArguments & {
    readonly chosen: Int32Array;
    readonly range: readonly [number, number];
    readonly signs: Int8Array;
  },
  job: JobFlags,
): void {
  const source = fieldSource(args);
  const cells = args.record.cube.rows * args.record.cube.columns;
  for (let i = args.range[0]; i < args.range[1]; i++) {
    job.poll();
    const u = source.on(args.chosen[i])("u");
    for (let cell = 0; cell < cells; cell++) {
      args.signs[i * cells + cell] = Number.isNaN(u[cell]) ? noSign : Math.sign(u[cell]);
    }
    job.count();
  }
}
