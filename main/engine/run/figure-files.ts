import { readFileSync } from "node:fs";
import { mkdir } from "node:fs/promises";
import { createRequire } from "node:module";
import { join } from "node:path";
import { type FigureId, figures } from "../../../core/figure/index";
import { latitudesFigure } from "../../../core/figure/latitudes-figure";
import { printSize } from "../../../core/figure/print-size";
import { scalesFigure } from "../../../core/figure/scales-figure";
import type { Scene } from "../../../core/figure/scene";
import { sceneToSvg } from "../../../core/figure/scene-to-svg";
import { writeFileWhole } from "../../writers/atomic-file";
import type { Job } from "../job";
import type { Workspace } from "../workspace";
import type { Analysis } from "./analysis";
import { latitudesInput, scalesInput } from "./figure-inputs";
import { version } from "./version";

const fromHere = createRequire(import.meta.url);
const fontPackage = "@expo-google-fonts/atkinson-hyperlegible-next";

type Draw = (analysis: Analysis, size: PrintSize, workspace: Workspace, job: Job) => Promise<Scene>;
type PrintSize = ReturnType<typeof printSize>;

/** How a run draws each figure: every one that is registered must be here. */
const draw: Readonly<Record<FigureId, Draw>> = {
  latitudes: async (analysis, size, workspace, job) =>
    latitudesFigure.scene(await latitudesInput(analysis, workspace, job), size),
  scales: async (analysis, size) => scalesFigure.scene(scalesInput(analysis), size),
};

/** Draws the figures the study names into `folder` and gives their paths within the result folder. */
export async function writeFigures(
  folder: string,
  analysis: Analysis,
  workspace: Workspace,
  job: Job,
): Promise<string[]> {
  const { study } = analysis.open;
  const { widthMm } = study.outputs;
  const wanted = figures.filter(({ id }) => study.outputs.figures.includes(id));
  if (wanted.length === 0) return [];
  await mkdir(join(folder, "figures"));
  const paths: string[] = [];
  for (const { id, heightShare } of wanted) {
    job.throwIfCancelled();
    const scene = await draw[id](analysis, printSize(widthMm, heightShare), workspace, job);
    const svg = sceneToSvg(scene, {
      widthMm,
      metadata: { strake: version, study },
      fonts: [
        font(400, "400Regular/AtkinsonHyperlegibleNext_400Regular.ttf"),
        font(700, "700Bold/AtkinsonHyperlegibleNext_700Bold.ttf"),
      ],
    });
    const path = `figures/${id}.svg`;
    await writeFileWhole(join(folder, path), svg);
    paths.push(path);
  }
  return paths;
}

function font(weight: 400 | 700, file: string) {
  return { weight, bytes: new Uint8Array(readFileSync(fromHere.resolve(`${fontPackage}/${file}`))), type: "font/ttf" };
}
