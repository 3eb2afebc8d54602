import { execFileSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { studySchema } from "../../core/study/schema";

const project = new URL("../..", import.meta.url).pathname;
let place: string;

function generate(folder: string): void {
  const script = join(project, "sample-data", "generate.ts");
  const args = ["--import", "tsx", script, "--small", "--out", folder];
  execFileSync(process.execPath, args, { cwd: project, stdio: "pipe" });
}

/** Runs a script in Debian's Python with xarray, and reads the JSON it prints. */
function python(script: string): Record<string, number & number[] & string> {
  const text = execFileSync("/usr/bin/python3", ["-W", "ignore", "-c", `import json, numpy, xarray\n${script}`]);
  return JSON.parse(text.toString());
}

function netcdfFiles(folder: string): string[] {
  return readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((name) => name.endsWith(".nc"))
    .map((name) => join(folder, name))
    .sort();
}

beforeAll(() => {
  place = mkdtempSync(join(tmpdir(), "strake-sample-"));
  generate(join(place, "one"));
});
afterAll(() => {
  rmSync(place, { recursive: true, force: true });
});

describe("the generator in miniature", () => {
  test("gives the same bytes for the same seed", () => {
    generate(join(place, "two"));
    const files = netcdfFiles(join(place, "one"));
    expect(files.length).toBe(5);
    for (const file of files) {
      const again = join(place, "two", file.slice(join(place, "one").length));
      expect(readFileSync(file).equals(readFileSync(again)), file).toBe(true);
    }
  });

  test("writes maps that xarray opens, with decoded dates, the gaps left out and one date empty", () => {
    const seen = python(`
a = xarray.open_dataset("${place}/one/grid/halcyon-a-2031.nc")
filled = numpy.isfinite(a.adt.values).any(axis=(1, 2))
print(json.dumps({"first": str(a.time.values[0])[:10], "steps": (numpy.diff(a.time.values) / numpy.timedelta64(1, "D")).tolist(),
  "empty": [str(t)[:10] for t in a.time.values[~filled]], "units": a.adt.units, "rising": bool((numpy.diff(a.latitude) > 0).all()),
  "name": a.adt.standard_name, "land": int(numpy.isnan(a.adt.values[0]).sum())}))`);
    expect(seen.first).toBe("2031-03-03");
    expect(seen.steps).toEqual([3, 3, 3, 6, 3, 3, 3, 3, 3, 9, 3, 3, 3, 3, 3, 3]);
    expect(seen.empty).toEqual(["2031-03-24"]);
    expect(seen).toMatchObject({ units: "m", rising: true, name: "sea_surface_height_above_geoid" });
    expect(seen.land).toBeGreaterThan(20);
  });

  test("writes the second product as a classic file in centimetres, from north to south, on longitudes from 0 to 360", () => {
    const seen = python(`
import netCDF4
b = xarray.open_dataset("${place}/one/grid/halcyon-b.nc")
raw = netCDF4.Dataset("${place}/one/grid/halcyon-b.nc")
print(json.dumps({"model": raw.data_model, "fill": str(raw["ssh"].getncattr("_FillValue").dtype), "first": str(b.time.values[0])[:10],
  "land": int(numpy.isnan(b.ssh.values[0]).sum()), "units": b.ssh.units, "falling": bool((numpy.diff(b.lat) < 0).all()), "west": float(b.lon[0]),
  "size": float(b.ssh.std())}))`);
    expect(seen).toMatchObject({ units: "cm", falling: true, model: "NETCDF3_64BIT_OFFSET", fill: "int16" });
    expect(seen.first).toBe("2031-03-03");
    expect(seen.land).toBeGreaterThan(5);
    expect(seen.west).toBeGreaterThan(180);
    expect(seen.size).toBeGreaterThan(0.5);
  });

  test("gives the missions 2 cm of noise, and no more than that apart from the true sea", () => {
    const seen = python(`
t = xarray.open_dataset("${place}/one/truth/halcyon-truth.nc")
sizes, times = [], []
for number, name in enumerate(["plover", "dunlin"]):
    p = xarray.open_dataset(f"${place}/one/tracks/{name}.nc")
    here = t.mission.values == number
    index = t["index"].values[here].astype(int)
    sizes.append(float(numpy.nanstd(p.adt.values[index] - t.true_height.values[here])))
    times.append(float(abs((p.time.values[index] - t.point_time.values[here]) / numpy.timedelta64(1, "s")).max()))
print(json.dumps({"sizes": sizes, "times": times, "count": int(t.point.size)}))`);
    expect(seen.count).toBeGreaterThan(1000);
    for (const size of seen.sizes as unknown as number[]) {
      // About a thousand points a mission: one standard error is 2 %; 0.3 mm of rounding adds nothing to 2 cm.
      expect(Math.abs(size / 0.02 - 1)).toBeLessThan(0.09);
    }
    for (const apart of seen.times as unknown as number[]) expect(apart).toBeLessThan(0.01);
  });

  test("keeps a momentum budget that closes", () => {
    const seen = python(`
t = xarray.open_dataset("${place}/one/truth/halcyon-truth.nc")
rest = t.tendency - t.convergence - t.friction
print(json.dumps({"rest": float(abs(rest).max()), "tendency": float(abs(t.tendency).max())}))`);
    // Trapezoidal means over two-hour steps.
    expect(seen.rest / seen.tendency).toBeLessThan(0.01);
  });

  test("writes a study that its schema accepts", () => {
    const study = JSON.parse(readFileSync(join(place, "one", "halcyon.study.json"), "utf8"));
    expect(studySchema.parse(study).grids.map((grid) => grid.id)).toEqual(["A", "B"]);
  });
});

describe("the committed sample", () => {
  const sample = join(project, "sample-data");
  const truth = join(project, "test", "truth");

  test("says in every file that it is simulated", () => {
    const files = [...netcdfFiles(sample), ...netcdfFiles(truth)];
    expect(files.length).toBe(7);
    const seen = python(`
print(json.dumps({f: xarray.open_dataset(f, decode_times=False).title for f in ${JSON.stringify(files)}}))`);
    for (const title of Object.values(seen)) expect(String(title).toLowerCase()).toContain("simulated");
  });

  test("weighs less than 10 MB, the truth less than 3 MB", () => {
    const bytes = (folder: string) => netcdfFiles(folder).reduce((sum, file) => sum + statSync(file).size, 0);
    expect(bytes(truth)).toBeLessThan(3e6);
    expect(bytes(sample) + bytes(truth)).toBeLessThan(10e6);
  });

  test("holds zonal jets that outlast its 900 days", () => {
    const seen = python(`
t = xarray.open_dataset("${truth}/halcyon-truth.nc")
u = t.zonal_u.values
power = abs(numpy.fft.rfft(u.mean(axis=0))) ** 2
rest = t.tendency - t.convergence - t.friction
print(json.dumps({"size": float(u.std()), "waves": int(power[1:].argmax() + 1), "dates": len(u),
  "kept": float(numpy.corrcoef(u[:100].mean(axis=0), u[-100:].mean(axis=0))[0, 1]),
  "rest": float(abs(rest).max() / abs(t.tendency).max())}))`);
    expect(seen.dates).toBe(300);
    expect(seen.size).toBeGreaterThan(0.03);
    expect(seen.size).toBeLessThan(0.08);
    expect(seen.waves).toBeGreaterThanOrEqual(4);
    expect(seen.waves).toBeLessThanOrEqual(8);
    expect(seen.kept).toBeGreaterThan(0.7);
    expect(seen.rest).toBeLessThan(0.01);
  });
});
