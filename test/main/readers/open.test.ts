import { mkdirSync, readdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";
import type { FileFormat } from "../../../main/readers/container";
import { fileFormats, openContainer } from "../../../main/readers/index";
import { faultOf, temporaryFolder } from "./places";

const folder = temporaryFolder();
const place = (name: string, content: string | Uint8Array) => {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
};

it.each([
  ["text.nc", "latitude,longitude\n1,2\n", /got a text file/],
  ["page.nc", "<!DOCTYPE html><html>not found</html>", /the download gave an error page/],
  ["empty.nc", "", /got an empty file/],
  ["archive.nc", Uint8Array.of(0x1f, 0x8b, 8, 0), /a gzip archive; unpack it first/],
  ["forecast.nc", "GRIB\x00\x00\x00\x02", /a GRIB file; convert it/],
  ["noise.nc", Uint8Array.of(0, 1, 2, 3, 250), /a file that starts with 00 01 02 03 fa/],
  ["stub.nc", "CDF", /got a text file/],
  ["stub4.nc", Uint8Array.of(0x89, 0x48, 0x44, 0x46, 0x0d, 0x0a, 0x1a, 0x0a), /expected readable HDF5 data/],
])("%s is refused with the reason", async (name, content, reason) => {
  const path = place(name, content);
  const fault = await faultOf(() => openContainer(path));
  expect(fault.tag).toBe("file");
  expect(fault.message).toMatch(reason);
  expect(fault.where).toContain(path);
});

it("a missing file and a folder are refused with the reason", async () => {
  expect((await faultOf(() => openContainer(join(folder, "nowhere.nc")))).message).toMatch(
    /got no such file; check the path/,
  );
  mkdirSync(join(folder, "maps.nc"));
  expect((await faultOf(() => openContainer(join(folder, "maps.nc")))).message).toMatch(
    /got a folder; name the files in it/,
  );
});

it("every format's folder is registered", async () => {
  const readers = fileURLToPath(new URL("../../../main/readers", import.meta.url));
  const folders = readdirSync(readers, { withFileTypes: true }).filter((entry) => entry.isDirectory());
  const found: FileFormat[] = [];
  for (const { name } of folders) {
    const module = (await import(`../../../main/readers/${name}/format.ts`)) as Record<string, FileFormat>;
    found.push(...Object.values(module));
  }
  expect(new Set(found)).toEqual(new Set(fileFormats));
});
