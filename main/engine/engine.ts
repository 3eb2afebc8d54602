import { dirname, relative, resolve } from "node:path";
import type { Engine, OpenStudy, RecognisedFile, RecordOverview } from "../../core/contract/engine";
import type { CallOptions } from "../../core/contract/job";
import { faultData, isUserFault } from "../../core/model/errors";
import { blendedRows } from "../../core/ocean/equator";
import { cautionsFor } from "../../core/study/cautions";
import { geometryOf } from "../../core/study/geometry";
import { readStudy } from "../../core/study/read";
import type { Study } from "../../core/study/schema";
import { describeFile } from "../readers/describe";
import { writeFileWhole } from "../writers/atomic-file";
import { eddyTestResult } from "./eddy-test";
import { jetsResult } from "./jets";
import { Job } from "./job";
import { latitudesResult } from "./latitudes";
import { openStudy } from "./open-study";
import { runStudy } from "./run/run-study";
import { scalesResult } from "./scales";
import { sourceFiles } from "./source-files";
import { spectrumResult } from "./spectrum";
import { suppliedVelocity } from "./supplied-velocity";
import { Workspace } from "./workspace";

/** The engine: everything Strake computes, behind the contract. One record is kept in memory at a time. */
export function createEngine(options: { readonly workers?: number } = {}): Engine & { close(): Promise<void> } {
  // Started with the first call that computes: describing a file needs no threads.
  let started: Workspace | null = null;
  const workspace = () => {
    started ??= new Workspace(options.workers);
    return started;
  };

  async function withJob<T>(call: CallOptions | undefined, work: (job: Job) => Promise<T>): Promise<T> {
    const job = new Job(call);
    try {
      return await work(job);
    } finally {
      job.close();
    }
  }

  return {
    open: ({ paths }) => openStudy(paths),
    describe: ({ paths }, call) => withJob(call, (job) => recognise(paths, job)),
    check: async ({ study }) => readStudy(study, "study"),
    load: ({ open, grid }, call) =>
      withJob(call, async (job) => {
        const { record, coverage, bytes, index } = await workspace().record(open, grid, job);
        return {
          latitude: record.axes.latitude,
          longitude: record.axes.longitude,
          time: record.time,
          hasData: record.hasData.slice(),
          coverage,
          ocean: record.ocean.slice(),
          timeDeviationDays: index.timeDeviationDays,
          blendedRows: blendedRows(geometryOf(record.axes, open.study.geostrophy)),
          cautions: cautionsFor(open.study, record),
          bytes,
        } satisfies RecordOverview;
      }),
    latitudes: (request, call) => withJob(call, (job) => latitudesResult(workspace(), request, job)),
    spectrum: ({ open, grid, quantity }, call) =>
      withJob(call, (job) => spectrumResult(workspace(), open, grid, quantity, job)),
    velocities: ({ open, grid }, call) => withJob(call, (job) => suppliedVelocity(workspace(), open, grid, job)),
    jets: ({ open, grid }, call) => withJob(call, (job) => jetsResult(workspace(), open, grid, job)),
    eddyTest: ({ open, grid }, call) => withJob(call, (job) => eddyTestResult(workspace(), open, grid, job)),
    scales: (request, call) => withJob(call, (job) => scalesResult(workspace(), request, job)),
    run: (request, call) => withJob(call, (job) => runStudy(workspace(), request, job)),
    save: async ({ open, path }) => {
      await writeFileWhole(path, `${JSON.stringify(studyFrom(open, dirname(path)), null, 2)}\n`);
      return { path };
    },
    close: async () => started?.close(),
  };
}

/** The study with its files named from another folder. */
function studyFrom({ study, folder }: OpenStudy, target: string): Study {
  const moved = <T extends { readonly files: string[] }>(source: T): T => ({
    ...source,
    files: source.files.map((file) => relative(target, resolve(folder, file)).replaceAll("\\", "/")),
  });
  const { deformation } = study.scales;
  const table =
    typeof deformation === "object" && "file" in deformation
      ? { file: moved({ files: [deformation.file] }).files[0] }
      : deformation;
  const scales = { ...study.scales, deformation: table };
  return { ...study, grids: study.grids.map(moved), tracks: study.tracks.map(moved), scales };
}

async function recognise(paths: readonly string[], job: Job): Promise<RecognisedFile[]> {
  const found: RecognisedFile[] = [];
  for (const [i, pattern] of paths.entries()) {
    let path = pattern;
    try {
      for (const file of await sourceFiles([pattern], dirname(pattern), "file")) {
        path = file;
        job.throwIfCancelled();
        job.report({ step: "Reading headers", done: i, total: paths.length });
        found.push({ path, report: await describeFile(path) });
      }
    } catch (error) {
      if (!isUserFault(error) || error.tag === "cancelled") throw error;
      found.push({ path, refused: faultData(error) });
    }
  }
  return found;
}
