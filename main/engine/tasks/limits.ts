import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { colourLimits } from "../../../core/study/colour-limits";
import type { JobFlags } from "../job";
import { type FieldArguments, fieldSource } from "./field";

/** Colour limits of a field from three dates spread over those with data, so that they do not change while time plays. */
export function limitsTask(
  args: FieldArguments & { readonly quantity: string },
  job: JobFlags,
): readonly [number, number] {
  const source = fieldSource(args);
  const dated: number[] = [];
  args.record.hasData.forEach((flag, date) => {
    if (flag) dated.push(date);
  });
  const chosen = new Set([0.25, 0.5, 0.75].map((share) => dated[Math.floor(share * (dated.length - 1))]));
  const planes = [...chosen].map((date) => {
    job.poll();
    return source.on(date)(args.quantity);
  });
  return colourLimits(planes, quantityById(args.quantity));
}
