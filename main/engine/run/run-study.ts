import { readdir } from "node:fs/promises";
import { join } from "node:path";
import type { OpenStudy, RunSummaryPlace } from "../../../core/contract/engine";
import { figures } from "../../../core/figure/index";
import { Fault } from "../../../core/model/errors";
import { nearestWord } from "../../../core/study/read";
import { writeFileWhole } from "../../writers/atomic-file";
import { refuseExisting, writeFolderAtomically } from "../../writers/atomic-folder";
import type { Job } from "../job";
import type { Workspace } from "../workspace";
import { analyse } from "./analysis";
import { writeFields } from "./fields-file";
import { writeFigures } from "./figure-files";
import { fingerprints } from "./fingerprint";
import { jetsTable } from "./jets-table";
import { writeLatitudeTime } from "./latitude-time-file";
import { methodsText } from "./methods-text";
import { profileTable } from "./profile-table";
import { responseTable } from "./response-table";
import { scalesTable } from "./scales-table";
import { spectraTable } from "./spectra-table";
import { summaryOf } from "./summary";

/** Runs a study and writes its result folder, whole or not at all; an existing folder is refused before any work. */
export async function runStudy(
  workspace: Workspace,
  request: { readonly open: OpenStudy; readonly folder: string; readonly overwrite: boolean },
  job: Job,
): Promise<RunSummaryPlace> {
  const { open, folder, overwrite } = request;
  requireKnownFigures(open);
  await refuseExisting(folder, overwrite);
  if (overwrite) await refuseForeignFolder(folder);
  const analysis = await analyse(workspace, open, job);
  const written = await writeFolderAtomically(folder, { overwrite }, async (stage) => {
    job.report({ step: "Writing results", done: 0, total: 1 });
    const files = ["latitude-time.nc", "profile.csv", "methods.md"];
    if (open.study.outputs.fields !== "none") {
      await writeFields(join(stage, "fields.nc"), analysis, workspace.pool, job);
      files.unshift("fields.nc");
    }
    await writeLatitudeTime(join(stage, "latitude-time.nc"), analysis);
    await writeFileWhole(join(stage, "profile.csv"), profileTable(analysis));
    if (analysis.jets.jets) {
      const { time } = analysis.stages.record;
      await writeFileWhole(join(stage, "jets.csv"), jetsTable(analysis.jets.jets, analysis.jets.eddyTest, time));
      files.push("jets.csv");
    }
    await writeFileWhole(join(stage, "scales.csv"), scalesTable(analysis.scales));
    await writeFileWhole(join(stage, "spectra.csv"), spectraTable(analysis.scales));
    files.push("scales.csv", "spectra.csv");
    const { filter, record } = analysis.stages;
    if (filter) {
      const table = responseTable(filter, record.time.step, record.cube.dates);
      await writeFileWhole(join(stage, "filter-response.csv"), table);
      files.push("filter-response.csv");
    }
    await writeFileWhole(join(stage, "methods.md"), methodsText(analysis));
    files.push(...(await writeFigures(stage, analysis, workspace, job)));
    const inputs = await fingerprints(analysis.loaded.index, open.folder, () => job.throwIfCancelled());
    const summary = JSON.stringify(summaryOf(analysis, inputs, files), null, 2);
    await writeFileWhole(join(stage, "summary.json"), `${summary}\n`);
    job.throwIfCancelled();
    return ["summary.json", ...files];
  });
  return { folder, files: written };
}

/** Only an earlier result, or an empty folder, may be replaced: everything in the old folder goes. */
async function refuseForeignFolder(folder: string): Promise<void> {
  const names: readonly string[] = await readdir(folder).catch(() => []);
  if (names.length === 0 || names.includes("summary.json")) return;
  throw new Fault({
    tag: "output",
    where: folder,
    expected: "a folder that an earlier run wrote, with its summary.json",
    got: "a folder with other files",
    advice: "choose another folder; overwriting would delete what is in this one",
  });
}

function requireKnownFigures({ study, path }: OpenStudy): void {
  const known = figures.map(({ id }) => id as string);
  const unknown = study.outputs.figures.find((id) => !known.includes(id));
  if (unknown === undefined) return;
  throw new Fault({
    tag: "study",
    where: `${path || "study"}: outputs.figures`,
    expected: `figures among ${known.join(", ")}`,
    got: `"${unknown}"`,
    advice: `did you mean "${nearestWord(unknown, known)}"?`,
  });
}
