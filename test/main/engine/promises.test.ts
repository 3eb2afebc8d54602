import { createHash } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { createEngine } from "../../../main/engine/engine";
import { line, studyOf, writeMadeGrid } from "../../properties/made-grid";
import { readBack } from "../../properties/read-back";
import { sampleStudy, smallCut } from "../../sample";
import { pythonJson } from "../../setup/python";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
/** Each of these starts engines of its own and makes several whole runs. */
const slow = 240_000;

/** SHA-256 of every file of a result, by its name. */
function hashesOf(folder: string): Record<string, string> {
  const files = readdirSync(folder, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());
  return Object.fromEntries(
    files.map((entry) => {
      const bytes = readFileSync(join(entry.parentPath, entry.name));
      return [entry.name, createHash("sha256").update(bytes).digest("hex")];
    }),
  );
}

/** Everything that acts on numbers at once: band, filter in space, errors, random oceans, every field. */
const everything = {
  ...smallCut,
  band: { filter: "butterworth", shortestDays: 30, longestDays: 120, order: 3 },
  space: { zonal: { shortestKm: null, longestKm: 400 }, removeZonalMean: true },
  errors: { heightMetres: 0.03, correlationKm: 80 },
  eddyTest: { oceans: 30 },
  outputs: { fields: "all" },
};

describe("the same bits", () => {
  test.each([
    ["a Butterworth band, filters in space and errors", everything],
    [
      "a running mean and a loess surface",
      {
        ...everything,
        band: { filter: "running-mean", shortestDays: 30, longestDays: 120, bridgeDays: 0 },
        space: { removeSurface: { zonalKm: 300, meridionalKm: 300 }, meridional: { shortestKm: 80, longestKm: null } },
      },
    ],
    ["means instead of every date", { ...everything, outputs: { fields: "mean" } }],
  ])(
    "come from one, two and four workers: %s",
    async (name, changes) => {
      const hashes = [];
      for (const workers of [1, 2, 4]) {
        const engine = createEngine({ workers });
        const folder = join(temporary, `${name.slice(0, 4)}-${workers}`);
        await engine.run({ open: sampleStudy(changes), folder, overwrite: false });
        await engine.close();
        hashes.push(hashesOf(folder));
      }
      expect(Object.keys(hashes[0])).toContain("fields.nc");
      expect(hashes[1]).toEqual(hashes[0]);
      expect(hashes[2]).toEqual(hashes[0]);
    },
    slow,
  );

  test("come from a second run of the same engine, after another study took its memory", async () => {
    const engine = createEngine({ workers: 2 });
    const [first, again] = [join(temporary, "first"), join(temporary, "again")];
    await engine.run({ open: sampleStudy(everything), folder: first, overwrite: false });
    await engine.load({ open: sampleStudy({ region: { west: -140, east: -135, south: 25, north: 30 } }), grid: "B" });
    await engine.run({ open: sampleStudy(everything), folder: again, overwrite: false });
    await engine.close();
    expect(hashesOf(again)).toEqual(hashesOf(first));
  });
});

describe("however the same heights are stored", () => {
  /** The sample's first year rewritten, packed numbers untouched. */
  function rewritten(): Record<string, string> {
    return pythonJson(`
import json, netCDF4
source = netCDF4.Dataset("${sampleStudy().folder}/grid/halcyon-a-2031.nc")
source.set_auto_maskandscale(False)
nt, ny, nx = source["adt"].shape
ways = {
    "a map a chunk": ("NETCDF4", {"chunksizes": (1, ny, nx), "zlib": True}),
    "odd blocks": ("NETCDF4", {"chunksizes": (50, 7, 9), "zlib": True, "shuffle": True}),
    "a series a chunk": ("NETCDF4", {"chunksizes": (nt, 1, nx), "zlib": True, "fletcher32": True}),
    "contiguous": ("NETCDF4", {"contiguous": True}),
    "netCDF-4 classic model": ("NETCDF4_CLASSIC", {"chunksizes": (30, 43, 50)}),
    "netCDF classic": ("NETCDF3_CLASSIC", {}),
    "64-bit offset": ("NETCDF3_64BIT_OFFSET", {}),
}
paths = {}
for i, (name, (model, options)) in enumerate(ways.items()):
    paths[name] = f"${temporary}/stored-{i}.nc"
    made = netCDF4.Dataset(paths[name], "w", format=model)
    made.set_auto_maskandscale(False)
    made.setncatts({k: source.getncattr(k) for k in source.ncattrs()})
    for dim in source.dimensions.values():
        made.createDimension(dim.name, None if model == "NETCDF3_CLASSIC" and dim.name == "time" else len(dim))
    for v in source.variables.values():
        more = options if v.name == "adt" else {}
        fill = {"fill_value": v.getncattr("_FillValue")} if "_FillValue" in v.ncattrs() else {}
        new = made.createVariable(v.name, v.dtype, v.dimensions, **more, **fill)
        new.set_auto_maskandscale(False)
        new.setncatts({k: v.getncattr(k) for k in v.ncattrs() if k != "_FillValue"})
        new[:] = v[:]
    made.close()
print(json.dumps(paths))`);
  }

  test("a result holds the same numbers and fields, bit for bit", async () => {
    const engine = createEngine({ workers: 2 });
    const results = new Map<string, { fields: string; picture: string; numbers: object }>();
    const paths = { "as it came": `${sampleStudy().folder}/grid/halcyon-a-2031.nc`, ...rewritten() };
    for (const [name, path] of Object.entries(paths)) {
      const folder = join(temporary, name.replaceAll(" ", "-"));
      const grids = [{ id: "A", files: [path] }];
      await engine.run({ open: sampleStudy({ ...everything, grids, tracks: [] }), folder, overwrite: false });
      const { "fields.nc": fields, "latitude-time.nc": picture } = hashesOf(folder);
      const { record, headline, filter, errors, cautions, grid } = JSON.parse(
        readFileSync(join(folder, "summary.json"), "utf8"),
      );
      results.set(name, {
        fields,
        picture,
        numbers: { record, headline, filter, errors, cautions, masked: grid.masked },
      });
    }
    await engine.close();
    const wanted = results.get("as it came");
    expect(results.size).toBe(8);
    for (const [name, result] of results) expect(result, name).toEqual(wanted);
  });

  test("so it does when the same dates come in one file or in many", async () => {
    const engine = createEngine({ workers: 2 });
    const grid = { latitudes: line(30, 0.5, 8), longitudes: line(-150, 0.5, 9) };
    const height = (day: number, y: number, x: number) => 0.5 + 0.1 * Math.sin(day / 8 + y + x / 2);
    const days = line(20000, 3, 120);
    const one = await writeMadeGrid(join(temporary, "one.nc"), { ...grid, days, height });
    const many = [];
    for (let from = 0; from < 120; from += 17) {
      const path = join(temporary, `many-${1000 - from}.nc`);
      many.push(await writeMadeGrid(path, { ...grid, days: days.slice(from, from + 17), height }));
    }
    const band = { filter: "lanczos", shortestDays: 30, longestDays: 90 };
    const sums = [];
    for (const [i, files] of [[one], many].entries()) {
      const folder = join(temporary, `joined-${i}`);
      await engine.run({ open: studyOf(files, { band }), folder, overwrite: false });
      const { "profile.csv": profile, "latitude-time.nc": _, ...rest } = hashesOf(folder);
      const { headline, filter } = JSON.parse(readFileSync(join(folder, "summary.json"), "utf8"));
      const fields = readBack(join(folder, "fields.nc"), ["u", "vorticity", "height_band"]);
      sums.push({ profile, headline, filter, fields, names: Object.keys(rest) });
    }
    await engine.close();
    expect(sums[1]).toEqual(sums[0]);
  });
});
