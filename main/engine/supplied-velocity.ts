import type { OpenStudy } from "../../core/contract/engine";
import type { SuppliedVelocityReport } from "../../core/model/results";
import { besideHeights, indexVariable } from "../readers/index-variable";
import { recogniseVelocity } from "../readers/recognise-velocity";
import { metresPerSecond } from "../readers/velocity-units";
import type { Job } from "./job";
import type { Workspace } from "./workspace";

/** Dates compared at most, spread over the record. */
const mostDates = 12;

/** How the velocities that the files supply agree with ours; null where they supply none. */
export async function suppliedVelocity(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  job: Job,
): Promise<SuppliedVelocityReport | null> {
  const { record, index, window } = await workspace.record(open, grid, job);
  const found = await besideHeights(index, recogniseVelocity);
  if (!found) return null;
  const options = { siPerUnit: metresPerSecond, what: "a velocity" };
  const eastward = await indexVariable(index, found.eastward, options);
  const northward = await indexVariable(index, found.northward, options);
  const dated = Array.from(record.hasData.keys()).filter((date) => record.hasData[date]);
  const stride = Math.max(1, Math.ceil(dated.length / mostDates));
  const dates = dated.filter((_, i) => i % stride === 0);
  const about = found.matchesHeight === false && dates.length > 1 ? "mean" : "zero";
  const { agreement, conventions } = await job.step("Comparing supplied velocities", dates.length, () =>
    workspace.pool.run(
      "velocities",
      { record, eastward, northward, window, dates, geostrophy: open.study.geostrophy, about },
      job,
    ),
  );
  const { eastward: eastwardName, northward: northwardName, reference, matchesHeight, foundBy, notes } = found;
  return {
    eastward: eastwardName,
    northward: northwardName,
    reference,
    matchesHeight,
    foundBy,
    notes,
    dates: dates.length,
    agreement,
    conventions,
  };
}
