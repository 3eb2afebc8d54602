import { execFileSync, spawnSync } from "node:child_process";
import { copyFileSync, existsSync, mkdirSync, readdirSync, readFileSync, truncateSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, test } from "vitest";
import { findPlaces } from "../../../main/engine/process/places";
import { sampleStudy, smallCut } from "../../sample";
import { python } from "../../setup/python";
import { temporaryFolder } from "../../temporary-folder";

const { root } = findPlaces(import.meta.url);
const temporary = temporaryFolder();
const sample = fileURLToPath(new URL("../../../sample-data/", import.meta.url));

function strake(...words: string[]): { code: number | null; out: string; err: string } {
  const done = spawnSync(process.execPath, [join(root, "dist/main/strake.js"), ...words], {
    cwd: temporary,
    encoding: "utf8",
  });
  return { code: done.status, out: done.stdout, err: done.stderr };
}

function studyFile(name: string, changes: object): string {
  const { study } = sampleStudy(changes);
  const absolute = <T extends { files: string[] }>(source: T) => ({
    ...source,
    files: source.files.map((file) => (file.startsWith("/") ? file : join(sample, file))),
  });
  const path = join(temporary, `${name}.study.json`);
  writeFileSync(path, JSON.stringify({ ...study, grids: study.grids.map(absolute), tracks: [] }));
  return path;
}

/** One line on stderr, exit 2, nothing on stdout. */
function expectRefused(done: ReturnType<typeof strake>, pattern: RegExp): void {
  const lines = done.err.trim().split("\n");
  expect(lines[lines.length - 1]).toMatch(pattern);
  expect(lines.filter((line) => line.startsWith("strake: ")).length).toBe(1);
  expect(done.code).toBe(2);
  expect(done.out).toBe("");
}

describe("strake describe", () => {
  test("says what is in grids and tracks and exits 0", () => {
    const done = strake("describe", join(sample, "grid/halcyon-b.nc"), join(sample, "tracks/dunlin.nc"));
    expect(done.code).toBe(0);
    expect(done.out).toMatch(/height +ssh \[cm\], found by standard name/);
    expect(done.out).toMatch(/points +\d+ on \d+ passes/);
  });

  test("as JSON carries the same with plain lists", () => {
    const [file] = JSON.parse(strake("describe", "--json", join(sample, "grid/halcyon-b.nc")).out);
    expect(file.report.time.values.length).toBe(90);
    expect(file.report.height.fileUnits).toBe("cm");
  });

  test("gives the reason for each refused file and exits 2, describing the rest", () => {
    const text = join(temporary, "notes.nc");
    writeFileSync(text, "these are only words\n");
    const torn = join(temporary, "torn.nc");
    copyFileSync(join(sample, "grid/halcyon-a-2031.nc"), torn);
    truncateSync(torn, 400_000);
    const bare = join(temporary, "bare.nc");
    const made = `import netCDF4; d = netCDF4.Dataset("${bare}", "w"); d.createDimension("x", 3); d.createVariable("salinity", "f4", ("x",)); d.close()`;
    execFileSync(python, ["-c", made]);
    const blind = join(temporary, "no-latitude.nc");
    const noLatitude = `import netCDF4; d = netCDF4.Dataset("${blind}", "w"); d.createDimension("x", 3); v = d.createVariable("adt", "f4", ("x",)); v.units = "m"; v.standard_name = "sea_surface_height_above_geoid"; d.close()`;
    execFileSync(python, ["-c", noLatitude]);
    const done = strake(
      "describe",
      text,
      torn,
      bare,
      blind,
      join(temporary, "absent.nc"),
      join(sample, "grid/halcyon-b.nc"),
    );
    const lines = done.err.trim().split("\n");
    expect(lines.length).toBe(5);
    expect(lines[0]).toMatch(/notes\.nc: expected/);
    expect(lines[1]).toMatch(/torn\.nc.*: expected/);
    expect(lines[2]).toMatch(/bare\.nc.*height.*salinity/);
    expect(lines[3]).toMatch(/no-latitude\.nc.*latitude/);
    expect(lines[4]).toMatch(/absent\.nc/);
    expect(done.code).toBe(2);
    expect(done.out).toContain("halcyon-b.nc");
  });
});

describe("strake run", () => {
  test("writes the folder, one line a step, and refuses to write it twice", () => {
    const study = studyFile("small", smallCut);
    const done = strake("run", study, "--out", "result", "--json");
    expect(done.err).not.toContain("strake:");
    expect(done.code).toBe(0);
    expect(JSON.parse(done.out).files).toContain("summary.json");
    expect(done.err).toContain("Reading grid A\n");
    const before = readFileSync(join(temporary, "result/summary.json"), "utf8");
    expectRefused(strake("run", study, "--out", "result"), /result: expected a folder that does not exist yet/);
    expect(readFileSync(join(temporary, "result/summary.json"), "utf8")).toBe(before);
    expect(strake("run", study, "--out", "result", "--overwrite").code).toBe(0);
  });

  test.each([
    ["a band under twice the sampling", { band: { shortestDays: 4 } }, /at least twice the sampling/],
    ["one date with a band", { period: { from: "2031-03-03", to: "2031-03-04" } }, /a record of many dates/],
    ["a region outside the data", { region: { west: 0, east: 5, south: 20, north: 40 } }, /cells within/],
    [
      "a file without the height named",
      { grids: [{ id: "A", files: [join(sample, "grid/halcyon-b.nc")], height: "zos" }] },
      /zos/,
    ],
  ])("refuses %s with one line, exit 2 and nothing half-written", (name, changes, pattern) => {
    const out = name.replaceAll(" ", "-");
    expectRefused(strake("run", studyFile(out, changes), "--out", out), pattern);
    expect(existsSync(join(temporary, out))).toBe(false);
    expect(readdirSync(temporary).filter((entry) => entry.startsWith("."))).toEqual([]);
  });

  test("an --out that is a file, or holds other things, is left alone", () => {
    writeFileSync(join(temporary, "plain"), "text");
    mkdirSync(join(temporary, "full"));
    writeFileSync(join(temporary, "full/keep.txt"), "text");
    const study = studyFile("again", smallCut);
    expectRefused(strake("run", study, "--out", "plain"), /expected a folder/);
    expectRefused(strake("run", study, "--out", "full", "--overwrite"), /a folder with other files/);
    expect(readFileSync(join(temporary, "full/keep.txt"), "utf8")).toBe("text");
  });

  test("a truncated file is named, whatever was read before it", () => {
    const torn = join(temporary, "torn-grid.nc");
    copyFileSync(join(sample, "grid/halcyon-a-2032.nc"), torn);
    truncateSync(torn, 1_000_000);
    const study = studyFile("torn", { grids: [{ id: "A", files: [torn] }] });
    expectRefused(strake("run", study, "--out", "torn-out"), /torn-grid\.nc/);
  });
});

describe("the command's own words", () => {
  test.each([
    [["sail"], /"sail" is not a command/],
    [["run"], /expected strake run STUDY/],
    [["run", "a.json"], /no --out/],
    [["describe"], /no file/],
    [["describe", "--colour", "x"], /Unknown option/],
    [["open", "--port", "seven"], /the port "seven"/],
    [["run", "absent.study.json", "--out", "x"], /absent\.study\.json: expected a study file, got no such file/],
  ])("%j is refused with what was expected", (words, pattern) => {
    expectRefused(strake(...words), pattern);
  });

  test("help lists every command and exits 0", () => {
    const done = strake("--help");
    expect(done.code).toBe(0);
    for (const name of ["describe", "run", "open"]) expect(done.out).toContain(`strake ${name}`);
  });
});
