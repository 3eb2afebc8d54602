import { execFileSync } from "node:child_process";
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { createEngine } from "../../../main/engine/engine";
import { expectAllClose } from "../../expect-close";
import { sampleStudy } from "../../sample";
import { python, pythonJson } from "../../setup/python";
import { temporaryFolder } from "../../temporary-folder";

const folder = join(temporaryFolder(), "halcyon");
const open = sampleStudy({ outputs: { fields: "all" } });
const engine = createEngine({ workers: 2 });
let files: readonly string[] = [];

beforeAll(async () => {
  files = (await engine.run({ open, folder, overwrite: false })).files;
});
afterAll(() => engine.close());

interface Compared {
  readonly largest: number;
  readonly compared: number;
  readonly onlyOne: number;
}

describe("a run of the sample with every field", () => {
  test("writes the folder the command promises", () => {
    expect([...files].sort()).toEqual(
      [
        "fields.nc",
        "figures/latitudes.svg",
        "filter-response.csv",
        "jets.csv",
        "latitude-time.nc",
        "methods.md",
        "profile.csv",
        "scales.csv",
        "spectra.csv",
        "summary.json",
      ].sort(),
    );
  });

  test("u, v, vorticity and band-passed u at every point and date are numpy's, to 1e-6 of each field's rms", () => {
    const script = fileURLToPath(new URL("../../reference/sample_run.py", import.meta.url));
    const report = JSON.parse(execFileSync(python, ["-W", "ignore", script, folder]).toString());
    for (const name of ["u", "v", "vorticity", "u_band", "zonal_u"]) {
      const { largest, compared, onlyOne } = report[name] as Compared;
      expect(largest, name).toBeLessThan(1e-6);
      expect(onlyOne, `${name}: a value on one side only`).toBe(0);
      expect(compared, name).toBeGreaterThan(20_000);
    }
    expect(report.dates).toEqual(["2031-03-03", "2033-08-16", 300]);
    expect(report.names.u).toBe("surface_geostrophic_eastward_sea_water_velocity");
  });

  test("xarray decodes the times, and the files hold what the engine sends to the window", async () => {
    const request = { open, grid: "A", dateIndex: 140, columns: 1000 };
    const raw = await engine.latitudes({ ...request, choice: { quantity: "u", inBand: false } });
    const band = await engine.latitudes({ ...request, choice: { quantity: "vorticity", inBand: true } });
    const bandU = await engine.latitudes({ ...request, choice: { quantity: "u", inBand: true } });
    const read = pythonJson<Record<string, (number | null)[]>>(`
import json, numpy, xarray
fields = xarray.open_dataset("${folder}/fields.nc")
picture = xarray.open_dataset("${folder}/latitude-time.nc")
assert str(fields.time.dtype) == "datetime64[ns]" and str(picture.time.dtype) == "datetime64[ns]"
flat = lambda values: [None if numpy.isnan(value) else float(value) for value in numpy.asarray(values).ravel()]
print(json.dumps({
    "u": flat(fields.u[140]), "vorticity_band": flat(fields.vorticity_band[140]),
    "picture": flat(picture.u.values.T), "picture_band": flat(picture.u_band.values.T),
}))`);
    const same = { absolute: 0, because: "both are the engine's float32" };
    expectAllClose(raw.map.values, read.u, same, "map of u");
    expectAllClose(band.map.values, read.vorticity_band, same, "map of vorticity in the band");
    const rounded = { relative: 1e-7, because: "the window gets float32, the file float64" };
    expectAllClose(raw.latitudeTime.values, read.picture, rounded, "latitude–time u");
    expectAllClose(bandU.latitudeTime.values, read.picture_band, rounded, "latitude–time u in the band");
  });

  test("the files name units, standard names, settings and the simulated source, and no coordinate has a fill value", () => {
    const read = pythonJson<Record<string, string>>(`
import json, netCDF4
d = netCDF4.Dataset("${folder}/fields.nc")
v = d.variables
print(json.dumps({"model": d.data_model, "conventions": d.Conventions, "history": d.history, "title": d.title,
 "u": v["u"].units, "vorticity": v["vorticity"].units, "height": v["height"].standard_name,
 "fills": str([n for n in ("time", "latitude", "longitude") if "_FillValue" in v[n].ncattrs()]), "dims": str(v["u"].dimensions)}))`);
    expect(read).toMatchObject({
      conventions: "CF-1.11",
      u: "m s-1",
      vorticity: "s-1",
      height: "sea_surface_height_above_geoid",
      fills: "[]",
      dims: "('time', 'latitude', 'longitude')",
    });
    expect(read.history).toContain('"stencil":7');
    expect(read.title).toContain("simulated");
  });

  test("summary.json holds the full study, every headline number with a unit, and the inputs' SHA-256", () => {
    const summary = JSON.parse(readFileSync(join(folder, "summary.json"), "utf8"));
    expect(summary.study).toEqual(JSON.parse(JSON.stringify(open.study)));
    for (const [name, number] of Object.entries(
      summary.headline as Record<string, { value: unknown; unit: unknown }>,
    )) {
      expect(typeof number.unit, name).toBe("string");
      // A mean that rests on a single effective sample has no interval.
      if (!name.endsWith("Half95") || number.value !== null) expect(typeof number.value, name).toBe("number");
    }
    const [input] = summary.inputs;
    const sum = execFileSync("sha256sum", [join(open.folder, input.path)])
      .toString()
      .split(" ")[0];
    expect(input.sha256).toBe(sum);
    expect(summary.cautions.map(({ id }: { id: string }) => id)).toContain("standing");
  });

  test("the methods' numbers are the study's", () => {
    const text = readFileSync(join(folder, "methods.md"), "utf8");
    for (const part of ["7-point", "90 to 540 days", "WGS-84", "2031-03-03 to 2033-08-16", "180 weights a side"]) {
      expect(text).toContain(part);
    }
  });

  test("profile.csv names units in its header and has a row a latitude", () => {
    const [header, ...rows] = readFileSync(join(folder, "profile.csv"), "utf8").trim().split("\n");
    expect(header).toContain("latitude [degrees_north],u mean [m s-1]");
    expect(rows.length).toBe(86);
    for (const row of rows) expect(row.split(",").length).toBe(header.split(",").length);
  });

  test("the figure carries the study and can be read back from it", () => {
    const svg = readFileSync(join(folder, "figures/latitudes.svg"), "utf8");
    const metadata = /<metadata>([\s\S]*?)<\/metadata>/.exec(svg)?.[1] ?? "";
    const text = metadata
      .replaceAll("&quot;", '"')
      .replaceAll("&lt;", "<")
      .replaceAll("&gt;", ">")
      .replaceAll("&amp;", "&");
    expect(JSON.parse(text).study).toEqual(JSON.parse(JSON.stringify(open.study)));
  });

  test("an existing folder is refused and left as it was; with overwrite it is replaced", async () => {
    const before = readFileSync(join(folder, "summary.json"), "utf8");
    await expect(engine.run({ open, folder, overwrite: false })).rejects.toThrow(/does not exist yet/);
    expect(readFileSync(join(folder, "summary.json"), "utf8")).toBe(before);
    const small = sampleStudy({ outputs: { fields: "none" } });
    await engine.run({ open: small, folder, overwrite: true });
    expect(() => readFileSync(join(folder, "fields.nc"))).toThrow();
  });
});

test("a folder that is no result is never replaced, overwriting or not", async () => {
  const precious = join(temporaryFolder(), "papers");
  mkdirSync(precious);
  writeFileSync(join(precious, "thesis.txt"), "all of it");
  const refused = engine.run({ open, folder: precious, overwrite: true });
  await expect(refused).rejects.toThrow(/a folder with other files/);
  expect(readFileSync(join(precious, "thesis.txt"), "utf8")).toBe("all of it");
});
