import { mkdir, mkdtemp, realpath, rm, symlink, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { createGrants, type Grants, isWithin } from "../../../../main/engine/process/grants";

let root: string;
let grants: Grants;
const at = (...parts: string[]) => path.join(root, ...parts);

beforeAll(async () => {
  root = await realpath(await mkdtemp(path.join(tmpdir(), "strake-grants-")));
  for (const folder of ["open/inner", "open-2", "single", "studies"]) await mkdir(at(folder), { recursive: true });
  const names = [
    "open/a.nc",
    "open/inner/b.nc",
    "open-2/c.nc",
    "single/d.nc",
    "single/e.nc",
    "studies/s.study.json",
    "studies/f.nc",
  ];
  for (const name of names) await writeFile(at(name), "x");
  await symlink(at("open-2"), at("open", "link"));
  await symlink(at("open-2", "c.nc"), at("open", "link.nc"));
  await symlink(at("nowhere"), at("open", "dangling"));
  await symlink(at("open", "loop"), at("open", "loop"));
  await symlink(at("open", "inner"), at("way-in"));
});
afterAll(() => rm(root, { recursive: true }));

async function openGrants(): Promise<Grants> {
  grants = createGrants();
  await grants.grant([at("open"), at("single", "d.nc"), at("studies", "s.study.json")]);
  return grants;
}

describe("what was opened may be read", () => {
  test.each([
    ["an opened folder", "open", "open"],
    ["a file below it", "open/inner/b.nc", "open/inner/b.nc"],
    ["a file below it that is not there", "open/none/z.nc", "open/none/z.nc"],
    ["steps that stay below it", "open/inner/../a.nc", "open/a.nc"],
    ["an opened file", "single/d.nc", "single/d.nc"],
    ["what lies beside an opened study", "studies/f.nc", "studies/f.nc"],
    ["a link into it, as where it leads", "way-in/b.nc", "open/inner/b.nc"],
  ])("%s", async (_what, requested, real) => {
    expect(await (await openGrants()).readable(`${root}/${requested}`)).toBe(at(real));
  });
});

describe("nothing else may be read", () => {
  test.each([
    ["the folder above", "."],
    ["a sibling whose name begins alike", "open-2/c.nc"],
    ["a file beside an opened file", "single/e.nc"],
    ["the folder of an opened file", "single"],
    ["steps that lead out", "open/../open-2/c.nc"],
    ["steps that lead out behind folders that are not there", "open/none/../../open-2/c.nc"],
    ["a linked file that leads out", "open/link.nc"],
    ["a linked folder that leads out", "open/link/c.nc"],
    ["a link to nothing", "open/dangling"],
    ["a link to itself", "open/loop"],
    ["a path with a null character", "open/a.nc\0.json"],
    ["a path through a file", "open/a.nc/b"],
    ["steps written as addresses write them", "open/..%2fopen-2/c.nc/../../../open-2/c.nc"],
    ["another letter case, where the disk tells them apart", "OPEN-2/c.nc"],
    ["a long path", `open/${"a/".repeat(3000)}b`],
    ["a name longer than the disk takes", `open/${"a".repeat(300)}`],
  ])("%s", async (_what, requested) => {
    await expect((await openGrants()).readable(`${root}/${requested}`)).rejects.toMatchObject({ tag: "request" });
  });

  test("a path that does not start at the root", async () => {
    await expect((await openGrants()).readable("open/a.nc")).rejects.toMatchObject({ tag: "request" });
    await expect((await openGrants()).readable("")).rejects.toMatchObject({ tag: "request" });
  });

  test("what a name in another writing of an address would be is a name like any other", async () => {
    expect(await (await openGrants()).readable(at("open", "..%2f..%2fetc"))).toBe(at("open", "..%2f..%2fetc"));
  });
});

describe("writing", () => {
  test.each(["open/new/result", "single/new", "studies/again.study.json"])("may go to %s", async (requested) => {
    expect(await (await openGrants()).writable(at(requested))).toBe(at(requested));
  });

  test.each(["open-2/new", "new", "open/link/new", "open/dangling/new", "open/dangling"])(
    "may not go to %s",
    async (requested) => {
      await expect((await openGrants()).writable(at(requested))).rejects.toMatchObject({ tag: "request" });
    },
  );

  test("to a chosen place opens that place and nothing beside it", async () => {
    await (await openGrants()).grantPlace(at("open-2", "new"));
    expect(await grants.writable(at("open-2", "new", "figures"))).toBe(at("open-2", "new", "figures"));
    await expect(grants.writable(at("open-2", "new-2"))).rejects.toThrow();
    await expect(grants.readable(at("open-2", "c.nc"))).rejects.toThrow();
  });

  test("a file by the window lets that file be read and nothing beside it be written", async () => {
    await (await openGrants()).grantFile(at("open-2", "c.nc"));
    expect(await grants.readable(at("open-2", "c.nc"))).toBe(at("open-2", "c.nc"));
    await expect(grants.writable(at("open-2", "new"))).rejects.toThrow();
  });
});

test("a path that is not there cannot be opened", async () => {
  await expect(createGrants().grant([at("none")])).rejects.toMatchObject({ tag: "file", got: "nothing there" });
});

test.each([
  ["/data", "/data", true],
  ["/data", "/data/a", true],
  ["/data", "/data-2", false],
  ["/data", "/", false],
  ["/data", "/data/..a", true],
  ["/data", "/other", false],
  ["/", "/data", true],
])("within %s lies %s: %s", (outer, inner, isSo) => {
  expect(isWithin(outer, inner)).toBe(isSo);
});
