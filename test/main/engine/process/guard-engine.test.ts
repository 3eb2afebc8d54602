import { mkdir, mkdtemp, realpath, rm, symlink, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, test } from "vitest";
import type { Engine, OpenStudy } from "../../../../core/contract/engine";
import { studySchema } from "../../../../core/study/schema";
import { createGrants } from "../../../../main/engine/process/grants";
import { guardEngine } from "../../../../main/engine/process/guard-engine";
import { createStandIn, type StandIn } from "../../../core/contract/stand-in-engine";

let root: string;
let standIn: StandIn;
let guarded: Engine;
const at = (...parts: string[]) => path.join(root, ...parts);

beforeAll(async () => {
  root = await realpath(await mkdtemp(path.join(tmpdir(), "strake-guard-")));
  for (const folder of ["open/grid", "linked/deep", "secret"]) await mkdir(at(folder), { recursive: true });
  for (const name of ["open/grid/a.nc", "open/grid/b.nc", "secret/s.nc", "secret/t.nc", "linked/deep/a.nc"])
    await writeFile(at(name), "x");
  await symlink(at("secret", "s.nc"), at("linked", "out.nc"));
  await symlink(at("secret"), at("linked", "deep", "folder"));
});
afterAll(() => rm(root, { recursive: true }));
beforeEach(async () => {
  standIn = createStandIn();
  const grants = createGrants();
  await grants.grant([at("open"), at("linked")]);
  guarded = guardEngine(standIn, grants);
});

function study(files: string[], folder = at("open")): OpenStudy {
  return { study: studySchema.parse({ strake: 1, grids: [{ id: "A", files }] }), folder, path: "" };
}

const choice = { quantity: "u", inBand: true };
const calls: readonly (readonly [string, (open: OpenStudy) => Promise<unknown>])[] = [
  ["load", (open) => guarded.load({ open, grid: "A" })],
  ["latitudes", (open) => guarded.latitudes({ open, grid: "A", choice, dateIndex: 0, columns: 1 })],
  ["spectrum", (open) => guarded.spectrum({ open, grid: "A", quantity: "u" })],
  ["scales", (open) => guarded.scales({ open, grid: "A" })],
  ["run", (open) => guarded.run({ open, folder: at("open", "r"), overwrite: false })],
];

describe.each(calls)("%s", (_method, call) => {
  test.each([
    ["at the root", ["/etc/passwd"]],
    ["steps out", ["../secret/s.nc"]],
    ["among right ones", ["grid/a.nc", "../secret/s.nc"]],
    ["a wildcard for a folder beside", ["../*/s.nc"]],
    ["a wildcard at the root", ["/**"]],
    ["steps out behind a wildcard", ["*/../../secret/s.nc"]],
    ["a null character", ["grid/a.nc\0"]],
    ["a linked file under a wildcard", ["../linked/*.nc"]],
    ["a linked folder under a wildcard", ["../linked/*/folder/s.nc"]],
    ["a linked folder under a deep wildcard", ["../linked/**/s.nc"]],
    ["a linked folder under braces", ["../linked/{deep,none}/folder/*"]],
    ["a linked file under brackets", ["../linked/[o]ut.nc"]],
  ])("is refused a study with a file %s, and the engine hears nothing", async (_what, files) => {
    await expect(call(study(files))).rejects.toMatchObject({ tag: "request" });
    expect(standIn.called).toEqual([]);
  });

  test("is refused a study whose tracks, table of radii, path or folder are elsewhere, or that is no study", async () => {
    const right = study(["grid/a.nc"]);
    const tracks = [{ id: "T", label: "", files: ["../secret/s.nc"], height: "auto" }];
    await expect(call({ ...right, study: { ...right.study, tracks } })).rejects.toMatchObject({ tag: "request" });
    const scales = { ...right.study.scales, deformation: { file: "../secret/s.nc" } };
    await expect(call({ ...right, study: { ...right.study, scales } })).rejects.toMatchObject({ tag: "request" });
    await expect(call({ ...right, path: at("secret", "s.nc") })).rejects.toMatchObject({ tag: "request" });
    await expect(call({ ...right, folder: at("secret") })).rejects.toMatchObject({ tag: "request" });
    await expect(call({ ...right, folder: "open" })).rejects.toMatchObject({ tag: "study" });
    await expect(call({ ...right, study: { grids: [] } as never })).rejects.toMatchObject({ tag: "study" });
    await expect(call({ ...right, study: [] as never })).rejects.toMatchObject({ tag: "study" });
    expect(standIn.called).toEqual([]);
  });
});

describe("the engine behind the guard", () => {
  test("gets studies whose files were opened, the same again without following the links again", async () => {
    for (let time = 0; time < 2; time++) await guarded.load({ open: study(["grid/*.nc"]), grid: "A" });
    expect(standIn.called).toEqual(["load", "load"]);
  });

  test("opens and describes only opened paths, and no folder with a link that leads out", async () => {
    expect((await guarded.open({ paths: [at("open", "grid", "..", "grid")] })).path).toBe(at("open", "grid"));
    expect(await guarded.describe({ paths: [at("open")] })).toHaveLength(1);
    for (const paths of [[at("secret")], [at("open"), at("secret", "s.nc")], [at("linked")], ["/"]]) {
      await expect(guarded.open({ paths })).rejects.toMatchObject({ tag: "request" });
      await expect(guarded.describe({ paths })).rejects.toMatchObject({ tag: "request" });
    }
    expect(standIn.called).toEqual(["open", "describe"]);
  });

  test("reads nothing beside a single opened file, though results may be written there", async () => {
    const grants = createGrants();
    await grants.grant([at("open", "grid", "a.nc")]);
    const narrow = guardEngine(standIn, grants);
    const folder = at("open", "grid");
    await expect(narrow.open({ paths: [at("open", "grid", "b.nc")] })).rejects.toMatchObject({ tag: "request" });
    await expect(narrow.open({ paths: [folder] })).rejects.toMatchObject({ tag: "request" });
    for (const files of [["b.nc"], ["*.nc"], ["a.nc", "b.nc"]]) {
      await expect(narrow.load({ open: study(files, folder), grid: "A" })).rejects.toMatchObject({ tag: "request" });
    }
    await narrow.open({ paths: [at("open", "grid", "a.nc")] });
    await narrow.load({ open: study(["a.nc"], folder), grid: "A" });
    expect(standIn.called).toEqual(["open", "load"]);
  });

  test("opens no folder that holds a link to beside an opened file", async () => {
    const grants = createGrants();
    await grants.grant([at("linked"), at("secret", "t.nc")]);
    const narrow = guardEngine(standIn, grants);
    await expect(narrow.open({ paths: [at("linked")] })).rejects.toMatchObject({ tag: "request" });
    await expect(narrow.load({ open: study(["*.nc"], at("linked")), grid: "A" })).rejects.toMatchObject({
      tag: "request",
    });
  });

  test("writes results only below opened folders", async () => {
    const open = study(["grid/a.nc"]);
    for (const folder of [at("secret", "r"), at("linked", "deep", "folder", "r"), "/r", "r"]) {
      await expect(guarded.run({ open, folder, overwrite: false })).rejects.toMatchObject({ tag: "request" });
    }
    expect(standIn.called).toEqual([]);
  });

  test("saves only under the name of a study, and opens again what it saved", async () => {
    const open = study(["grid/a.nc"]);
    await expect(guarded.save({ open, path: at("open", "grid", "a.nc") })).rejects.toMatchObject({ tag: "output" });
    await expect(guarded.save({ open, path: at("secret", "b.study.json") })).rejects.toMatchObject({ tag: "request" });
    const { path: saved } = await guarded.save({ open, path: at("open", "b.study.json") });
    expect((await guarded.open({ paths: [saved] })).path).toBe(saved);
  });

  test("checks a study without touching a file", async () => {
    await guarded.check({ study: { grids: [{ files: ["/etc/passwd"] }] } });
    expect(standIn.called).toEqual(["check"]);
  });
});
