import type { OpenStudy } from "../../../core/contract/engine";
import { type FaultData, isUserFault } from "../../../core/model/errors";
import type { EddyTestResult, JetsResult } from "../../../core/model/jets-result";
import { eddyTestResult } from "../eddy-test";
import { jetsResult } from "../jets";
import type { Job } from "../job";
import type { Workspace } from "../workspace";

/** Jets of a run and their test; where one could not be made, why. */
export interface JetsAnalysis {
  readonly jets: JetsResult | null;
  readonly eddyTest: EddyTestResult | null;
  /** Why jets or test are missing: the record is too short, no eddies were found … null where nothing is. */
  readonly missing: FaultData | null;
}

/** Finds and tests the jets. What the record cannot carry is told in the result and does not end the run. */
export async function analyseJets(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  job: Job,
): Promise<JetsAnalysis> {
  let jets: JetsResult | null = null;
  try {
    jets = await jetsResult(workspace, open, grid, job);
    const isTested = jets.jets.length > 0 && open.study.eddyTest.oceans > 0;
    return { jets, eddyTest: isTested ? await eddyTestResult(workspace, open, grid, job) : null, missing: null };
  } catch (error) {
    if (!isUserFault(error) || error.tag === "cancelled") throw error;
    return { jets, eddyTest: null, missing: error.toData() };
  }
}
