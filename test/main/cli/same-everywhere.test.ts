import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { expect, test } from "vitest";
import { findPlaces } from "../../../main/engine/process/places";
import { smallCut } from "../../sample";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const sample = fileURLToPath(new URL("../../../sample-data/", import.meta.url));

function runUnder(zone: string, language: string): Record<string, string> {
  const name = `${zone}-${language}`.replaceAll("/", "-");
  const study = join(temporary, "same.study.json");
  const grids = [{ id: "A", files: [join(sample, "grid/halcyon-a-*.nc")] }];
  writeFileSync(
    study,
    JSON.stringify({ strake: 1, grids, ...smallCut, eddyTest: { oceans: 4 }, outputs: { fields: "all" } }),
  );
  const command = join(findPlaces(import.meta.url).root, "dist/main/strake.js");
  const env = { ...process.env, TZ: zone, LANG: language, LC_ALL: language };
  const done = spawnSync(process.execPath, [command, "run", study, "--out", name], {
    cwd: temporary,
    env,
    encoding: "utf8",
  });
  expect(done.stderr).not.toContain("strake:");
  const files = readdirSync(join(temporary, name), { recursive: true, withFileTypes: true }).filter((entry) =>
    entry.isFile(),
  );
  return Object.fromEntries(
    files.map((entry) => [
      entry.name,
      createHash("sha256")
        .update(readFileSync(join(entry.parentPath, entry.name)))
        .digest("hex"),
    ]),
  );
}

test("every file of a run is the same, byte for byte, under any time zone and language, and when run again", () => {
  const one = runUnder("UTC", "C");
  expect(Object.keys(one).length).toBeGreaterThan(5);
  expect(runUnder("America/St_Johns", "de_DE.UTF-8")).toEqual(one);
  expect(runUnder("Pacific/Apia", "tr_TR.UTF-8")).toEqual(one);
});
