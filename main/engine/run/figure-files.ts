import { readFileSync } from "node:fs";
import { mkdir } from "node:fs/promises";
import { createRequire } from "node:module";
import { join } from "node:path";
import { figures } from "../../../core/figure/index";
import { printSize } from "../../../core/figure/print-size";
import { boxText, gridText } from "../../../core/figure/record-text";
import { sceneToSvg } from "../../../core/figure/scene-to-svg";
import { formatDate } from "../../../core/figure/time-ticks";
import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { writeFileWhole } from "../../writers/atomic-file";
import type { Job } from "../job";
import { latitudesResult } from "../latitudes";
import type { Workspace } from "../workspace";
import type { Analysis } from "./analysis";
import { version } from "./version";

const fromHere = createRequire(import.meta.url);
const fontPackage = "@expo-google-fonts/atkinson-hyperlegible-next";

/** Draws the figures the study names into `folder` and gives their paths within the result folder. */
export async function writeFigures(
  folder: string,
  analysis: Analysis,
  workspace: Workspace,
  job: Job,
): Promise<string[]> {
  const { study } = analysis.open;
  const wanted = figures.filter(({ id }) => study.outputs.figures.includes(id));
  if (wanted.length === 0) return [];
  await mkdir(join(folder, "figures"));
  const { record } = analysis.stages;
  const result = await latitudesResult(
    workspace,
    {
      open: analysis.open,
      grid: analysis.grid,
      choice: { quantity: "u", inBand: analysis.band !== null },
      dateIndex: middleDate(record.hasData),
      columns: record.cube.dates,
    },
    job,
  );
  const u = quantityById("u");
  const source = study.grids.find(({ id }) => id === analysis.grid);
  const axes = {
    ...record.axes,
    time: record.time,
    hasData: record.hasData,
    ocean: record.ocean,
    coverage: analysis.loaded.coverage,
  };
  const input = {
    record: axes,
    result,
    ...(analysis.spectrum ? { spectrum: analysis.spectrum } : {}),
    quantity: { title: u.title, units: u.units, signed: u.signed },
    band: study.band,
    region: boxText(axes),
    grid: gridText(source?.label || `Grid ${analysis.grid}`, axes),
    date: formatDate(record.time.calendar, record.time.values[result.dateIndex]),
  };
  const paths: string[] = [];
  for (const figure of wanted) {
    job.throwIfCancelled();
    const svg = sceneToSvg(figure.scene(input, printSize(study.outputs.widthMm)), {
      widthMm: study.outputs.widthMm,
      metadata: { strake: version, study },
      fonts: [
        font(400, "400Regular/AtkinsonHyperlegibleNext_400Regular.ttf"),
        font(700, "700Bold/AtkinsonHyperlegibleNext_700Bold.ttf"),
      ],
    });
    const path = `figures/${figure.id}.svg`;
    await writeFileWhole(join(folder, path), svg);
    paths.push(path);
  }
  return paths;
}

function font(weight: 400 | 700, file: string) {
  return { weight, bytes: new Uint8Array(readFileSync(fromHere.resolve(`${fontPackage}/${file}`))), type: "font/ttf" };
}

/** The date with data nearest the middle of the record. */
function middleDate(hasData: Uint8Array): number {
  const middle = Math.floor((hasData.length - 1) / 2);
  for (let distance = 0; distance < hasData.length; distance++) {
    if (hasData[middle + distance]) return middle + distance;
    if (hasData[middle - distance]) return middle - distance;
  }
  return middle;
}
