import { readFileSync } from "node:fs";
import { join } from "node:path";
import { pythonJson } from "../setup/python";

/** Variables of a netCDF file as netCDF4-python reads them, flattened; NaN for what is masked. */
export function readBack(path: string, names: readonly string[]): Record<string, Float64Array> {
  const read = pythonJson<Record<string, (number | null)[]>>(`
import json, netCDF4, numpy
d = netCDF4.Dataset("${path}")
flat = lambda name: numpy.ma.filled(d[name][:].astype("f8"), numpy.nan).ravel()
print(json.dumps({n: [None if numpy.isnan(x) else x for x in flat(n).tolist()] for n in ${JSON.stringify(names)}}))`);
  return Object.fromEntries(
    Object.entries(read).map(([name, values]) => [name, Float64Array.from(values, (value) => value ?? Number.NaN)]),
  );
}

/** What a run wrote down about itself. */
export function readRun(folder: string) {
  const text = (name: string) => readFileSync(join(folder, name), "utf8");
  const history = pythonJson<string>(
    `import json, netCDF4; print(json.dumps(netCDF4.Dataset("${folder}/fields.nc").history))`,
  );
  return { summary: JSON.parse(text("summary.json")), methods: text("methods.md"), history };
}
