import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import { besideHeights, indexVariable } from "../readers/index-variable";
import { recogniseHeightError } from "../readers/recognise-error";
import { metresPerUnit } from "../readers/units";
import type { Job } from "./job";
import type { LoadedRecord } from "./load-record";
import type { WorkerPool } from "./pool";

/** Dates from which a file's own error is averaged. */
const mostDates = 60;

/**
 * The height error a study asks for: its number, or the root mean square over time of the files' own error variable, cell by
 * cell. null where the study asks for none. Error: "file" asked of files without an error variable.
 */
export async function heightError(
  { study }: OpenStudy,
  loaded: LoadedRecord,
  pool: WorkerPool,
  job: Job,
): Promise<number | Float64Array | null> {
  const { heightMetres } = study.errors;
  if (heightMetres !== "file") return heightMetres;
  const found = await besideHeights(loaded.index, recogniseHeightError);
  if (!found) {
    throw new Fault({
      tag: "study",
      where: "errors.heightMetres",
      expected: `an error variable beside ${loaded.index.height.name} in the files`,
      got: "none",
      advice: "give the height's standard error in metres instead",
    });
  }
  const index = await indexVariable(loaded.index, found.name, { siPerUnit: metresPerUnit, what: "a length" });
  const [from, to] = loaded.window.time;
  const window = { ...loaded.window, time: [from, Math.min(to, from + mostDates)] as const };
  return pool.run("rmsPlane", { index, window }, job);
}
