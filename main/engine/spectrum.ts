import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { SpectrumResult } from "../../core/model/results";
import { quantityById } from "../../core/ocean/quantities/evaluate";
import type { Job } from "./job";
import type { Workspace } from "./workspace";

/** Fewest dates from which a spectrum is taken. */
const fewestDates = 16;

/** Region-mean spectrum by period of one quantity. Error: fewer than 16 dates. */
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
  if (dates < fewestDates) {
    throw new Fault({
      tag: "period",
      where: "spectrum",
      expected: `at least ${fewestDates} dates`,
      got: `${dates} ${dates === 1 ? "date" : "dates"}`,
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
      time: record.time,
      basis,
      settings: open.study.spectrum,
    },
    job,
  );
}
