import type { Progress } from "../../core/contract/job";

/** Where a long call stands, as a line: "Reading heights, 120 of 900". */
export function progressText({ step, done, total }: Progress): string {
  return total > 0 ? `${step}, ${Math.min(done, total)} of ${total}` : `${step} …`;
}
