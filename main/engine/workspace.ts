import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { Background } from "../../core/study/band-plane";
import type { ReductionTarget } from "../../core/study/reduction";
import { filtersInSpace } from "../../core/study/space-filter";
import { type GridIndex, indexGrid } from "../readers/joined-grid";
import { heightError } from "./height-error";
import type { Job } from "./job";
import { Kept } from "./kept";
import { type LoadedRecord, loadRecord } from "./load-record";
import { WorkerPool } from "./pool";
import { fitBackgrounds, reduceRecord } from "./prepared";
import { sourceFiles } from "./source-files";
import type { TaskResult } from "./tasks";

/** Where a study's stages live between calls: each is made once and kept until a study needs another. */
export class Workspace {
  readonly pool: WorkerPool;
  readonly #indices = new Kept<GridIndex>(8);
  /** One at a time: records are large. */
  readonly #records = new Kept<LoadedRecord>(1);
  readonly #backgrounds = new Kept<Background>(2);
  readonly #errors = new Kept<TaskResult<"errorPlanes">>(2);
  readonly #reductions = new Kept<ReductionTarget>(24);

  constructor(workers?: number) {
    this.pool = new WorkerPool(workers);
  }

  /** Headers of one grid's files. Errors: unknown grid, no such files, what reading the headers says. */
  async index(open: OpenStudy, gridId: string, job: Job): Promise<GridIndex> {
    const grid = open.study.grids.find((each) => each.id === gridId);
    if (!grid) {
      throw new Fault({
        tag: "request",
        where: "grid",
        expected: `one of ${open.study.grids.map((each) => each.id).join(", ")}`,
        got: `"${gridId}"`,
        advice: "choose a grid of the study",
      });
    }
    const paths = await sourceFiles(grid.files, open.folder, `grids.${grid.id}`);
    const make = () =>
      indexGrid(paths, {
        height: grid.height,
        id: grid.id,
        onFile: (done, total) => {
          job.throwIfCancelled();
          job.report({ step: `Reading headers of grid ${grid.id}`, done, total });
        },
      });
    return this.#indices.get(JSON.stringify([paths, grid.height, grid.id]), make, () => !job.cancelled);
  }

  async record(open: OpenStudy, gridId: string, job: Job): Promise<LoadedRecord> {
    const index = await this.index(open, gridId, job);
    const { region, period } = open.study;
    return this.#records.get(
      recordKey(index, open),
      () => loadRecord(index, region, period, this.pool, job),
      () => !job.cancelled,
    );
  }

  async background(open: OpenStudy, gridId: string, job: Job): Promise<Background> {
    const loaded = await this.record(open, gridId, job);
    return this.#backgrounds.get(
      JSON.stringify([recordKey(loaded.index, open), open.study.background]),
      () => fitBackgrounds(loaded, open.study.background, this.pool, job),
      () => !job.cancelled,
    );
  }

  /** Zonal means and sampled cells of one quantity. */
  async reduction(open: OpenStudy, gridId: string, quantity: string, job: Job): Promise<ReductionTarget> {
    const loaded = await this.record(open, gridId, job);
    return this.#reductions.get(
      JSON.stringify([recordKey(loaded.index, open), open.study.geostrophy, open.study.space, quantity]),
      () => reduceRecord(loaded, open.study, quantity, this.pool, job),
      () => !job.cancelled,
    );
  }

  /**
   * Standard errors from the study's height error; null where it names none, and where heights are filtered in space, whose
   * part in the error is not worked out.
   */
  async errors(open: OpenStudy, gridId: string, job: Job): Promise<TaskResult<"errorPlanes"> | null> {
    const { geostrophy, errors, space } = open.study;
    if (errors.heightMetres === null || filtersInSpace(space)) return null;
    const loaded = await this.record(open, gridId, job);
    return this.#errors.get(
      JSON.stringify([recordKey(loaded.index, open), geostrophy, errors]),
      async () => {
        const sigmaMetres = await heightError(open, loaded, this.pool, job);
        const { correlationKm } = errors;
        return job.step("Propagating the height's error", 1, () =>
          this.pool.run(
            "errorPlanes",
            { record: loaded.record, geostrophy, sigmaMetres: sigmaMetres ?? 0, correlationKm },
            job,
          ),
        );
      },
      () => !job.cancelled,
    );
  }

  close(): Promise<void> {
    return this.pool.close();
  }
}

function recordKey(index: GridIndex, { study }: OpenStudy): string {
  const files = index.files.map((file) => [file.path, file.bytes, file.modifiedMs]);
  return JSON.stringify([files, index.height.name, index.id, study.region ?? null, study.period ?? null]);
}
