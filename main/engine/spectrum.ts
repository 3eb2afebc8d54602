import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { SpectrumResult } from "../../core/model/results";
import { quantityById } from "../../core/ocean/quantities/evaluate";
import type { Job } from "./job";
import type { Workspace } from "./workspace";

/** Fewest dates from which a spectrum is taken. */
const fewestDates = 16;

/** Region-mean spectrum by period of one quantity. Errors: an irregular record, fewer than 16 dates. */
export async function spectrumResult(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  quantity: string,
  job: Job,
): Promise<SpectrumResult> {
  quantityById(quantity);
  const { record } = await workspace.record(open, grid, job);
  const { dates } = record.cube;
  if (!record.time.even || dates < fewestDates) {
    throw new Fault({
      tag: "period",
      where: "spectrum",
      expected: `at least ${fewestDates} dates an even step apart`,
      got: `${dates} ${record.time.even ? "dates" : "dates at uneven steps"}`,
      advice: "choose a longer period",
    });
  }
  const { basis } = await workspace.background(open, grid, job);
  const { sampleCells, samples } = await workspace.reduction(open, grid, quantity, job);
  const { values: latitudes } = record.axes.latitude;
  return workspace.pool.run(
    "spectrum",
    {
      quantity,
      samples,
      cellWeights: Float64Array.from(sampleCells, (cell) =>
        Math.cos((latitudes[Math.floor(cell / record.cube.columns)] * Math.PI) / 180),
      ),
      stepDays: record.time.step,
      basis,
    },
    job,
  );
}
