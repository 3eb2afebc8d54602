import { readFileSync } from "node:fs";
import { resolve } from "node:path";
import { fileURLToPath } from "node:url";
import type { OpenStudy } from "../core/contract/engine";
import { readStudy } from "../core/study/read";

const folder = fileURLToPath(new URL("../sample-data", import.meta.url));

/** The sample study with some keys changed, as an engine would open it. */
export function sampleStudy(changes: object = {}): OpenStudy {
  const path = resolve(folder, "halcyon.study.json");
  // The defaults of band and background, and a short eddy test, unless a test asks otherwise.
  const plain = { band: {}, background: {}, eddyTest: { oceans: 20 } };
  const study = readStudy({ ...JSON.parse(readFileSync(path, "utf8")), ...plain, ...changes }, "sample");
  return { study, folder, path };
}

/** A smaller and shorter cut of the sample, for tests that need many engines. */
export const smallCut = {
  region: { west: -146, east: -140, south: 24, north: 31 },
  period: { from: "2031-03-03", to: "2031-12-31" },
  band: { shortestDays: 30, longestDays: 120 },
  background: { mean: true, trend: true, annual: false, semiannual: false },
};
