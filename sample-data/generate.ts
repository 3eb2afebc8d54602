import { mkdir, stat } from "node:fs/promises";
import { join, resolve } from "node:path";
import { parseArgs } from "node:util";
import { writeGridA, writeGridB } from "./make/grid-files";
import { fullScenario, smallScenario } from "./make/scenario";
import { simulate } from "./make/simulate";
import { writeStudy } from "./make/study-file";
import { writeTracks } from "./make/track-files";
import { writeTruth } from "./make/truth-file";

/**
 * Makes the sample data: `npx tsx sample-data/generate.ts` remakes the committed files (some minutes of one core);
 * `--small --out DIR` makes a miniature of them in seconds.
 */
async function main(): Promise<void> {
  const { values } = parseArgs({ options: { small: { type: "boolean", default: false }, out: { type: "string" } } });
  const home = import.meta.dirname;
  const folder = resolve(values.out ?? home);
  const truthFolder = values.out ? join(folder, "truth") : resolve(home, "..", "test", "truth");
  const scenario = values.small ? smallScenario : fullScenario;
  for (const made of [join(folder, "grid"), join(folder, "tracks"), truthFolder])
    await mkdir(made, { recursive: true });

  const simulation = simulate(scenario, (line) => process.stderr.write(`${line}\n`));
  const files = [
    ...(await writeGridA(simulation, join(folder, "grid"))),
    ...(await writeGridB(simulation, join(folder, "grid"))),
    ...(await writeTracks(scenario, simulation.tracks, join(folder, "tracks"))),
    await writeTruth(simulation, join(truthFolder, "halcyon-truth.nc")),
    await writeStudy(scenario, join(folder, "halcyon.study.json")),
  ];
  for (const file of files)
    process.stdout.write(`${((await stat(file)).size / 1e3).toFixed(0).padStart(7)} kB  ${file}\n`);
}

await main();
