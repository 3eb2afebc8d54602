import { execFileSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { type Netcdf4Spec, writeNetcdf4 } from "../../../main/writers/netcdf4";

let place: string;
beforeAll(() => {
  place = mkdtempSync(join(tmpdir(), "strake-netcdf4-"));
});
afterAll(() => {
  rmSync(place, { recursive: true, force: true });
});

/** Runs a script in Debian's Python with netCDF4 and xarray, and reads the JSON it prints. */
function python(script: string): unknown {
  const text = execFileSync("/usr/bin/python3", ["-c", `import json, netCDF4, numpy, xarray\n${script}`]);
  return JSON.parse(text.toString());
}

const times = Float64Array.from([29646, 29649, 29652, 29655, 29658]);
const packed = Int16Array.from({ length: 5 * 3 * 4 }, (_, i) => (i % 7 === 3 ? -32767 : 1234 - 40 * i));

const spec: Netcdf4Spec = {
  dimensions: { time: 5, latitude: 3, longitude: 4, obs: 6 },
  attributes: { Conventions: "CF-1.11", title: "Höhe in µm – test", numbers: [1.5, 2.5] },
  variables: [
    {
      name: "time",
      type: "float64",
      dimensions: ["time"],
      values: times,
      attributes: { standard_name: "time", units: "days since 1950-01-01 00:00:00", calendar: "standard" },
    },
    {
      name: "latitude",
      type: "float64",
      dimensions: ["latitude"],
      values: Float64Array.from([20.125, 20.375, 20.625]),
      attributes: { units: "degrees_north" },
    },
    {
      name: "longitude",
      type: "float32",
      dimensions: ["longitude"],
      values: Float32Array.from([-150, -149.75, -149.5, -149.25]),
      attributes: { units: "degrees_east" },
    },
    {
      name: "height",
      type: "int16",
      dimensions: ["time", "latitude", "longitude"],
      values: packed,
      fillValue: -32767,
      chunks: [2, 3, 4],
      gzipLevel: 6,
      attributes: { units: "m", scale_factor: 1e-4, add_offset: 0.5, valid_range: [-30000, 30000] },
    },
    {
      name: "slabs",
      type: "float32",
      dimensions: ["time", "latitude", "longitude"],
      values: (from, to) => Float32Array.from({ length: (to - from) * 12 }, (_, i) => Math.sqrt(from * 12 + i)),
      fillValue: Number.NaN,
      chunks: [2, 3, 4],
      gzipLevel: 4,
    },
    { name: "bytes", type: "int8", dimensions: ["obs"], values: Int8Array.from([-128, -1, 0, 1, 2, 127]) },
    { name: "flags", type: "uint8", dimensions: ["obs"], values: Uint8Array.from([0, 1, 2, 3, 254, 255]) },
    { name: "counts", type: "int32", dimensions: ["obs"], values: Int32Array.from([-2e9, -1, 0, 1, 2, 2e9]) },
    { name: "crs", type: "int32", dimensions: [], values: Int32Array.from([0]) },
  ],
};

describe("a netCDF-4 file as Python's netCDF4 and xarray read it", () => {
  beforeAll(async () => {
    await writeNetcdf4(join(place, "a.nc"), spec);
  });

  test("is netCDF-4 with the dimensions, the order and the types of the spec", () => {
    const seen = python(`
d = netCDF4.Dataset("${place}/a.nc")
print(json.dumps({"model": d.data_model, "dimensions": {k: [len(v), v.isunlimited()] for k, v in d.dimensions.items()},
  "variables": [[k, str(v.dtype), list(v.dimensions)] for k, v in d.variables.items()], "title": d.title,
  "numbers": list(d.numbers)}))`);
    expect(seen).toEqual({
      model: "NETCDF4",
      dimensions: { time: [5, false], latitude: [3, false], longitude: [4, false], obs: [6, false] },
      variables: spec.variables.map(({ name, type, dimensions }) => [name, type, dimensions]),
      title: "Höhe in µm – test",
      numbers: [1.5, 2.5],
    });
  });

  test("carries attributes in the types that CF asks for, and no fill value on coordinates", () => {
    const seen = python(`
d = netCDF4.Dataset("${place}/a.nc")
h = d["height"]
print(json.dumps({"scale": str(h.getncattr("scale_factor").dtype), "fill": str(h.getncattr("_FillValue").dtype),
  "range": str(h.getncattr("valid_range").dtype), "text": type(h.units).__name__, "chunks": h.chunking(),
  "zlib": h.filters()["zlib"], "filled": [k for k, v in d.variables.items() if "_FillValue" in v.ncattrs()]}))`);
    expect(seen).toEqual({
      scale: "float64",
      fill: "int16",
      range: "int16",
      text: "str",
      chunks: [2, 3, 4],
      zlib: true,
      filled: ["height", "slabs"],
    });
  });

  test("gives back every value: packed ones unpacked, fills masked, slabs joined", () => {
    const seen = python(`
d = netCDF4.Dataset("${place}/a.nc")
h = d["height"][:]
d["height"].set_auto_maskandscale(False)
print(json.dumps({"masked": numpy.ma.getmaskarray(h).ravel().nonzero()[0].tolist(), "first": float(h[0, 0, 0]),
  "raw": d["height"][:].ravel().tolist(), "slabs": d["slabs"][:].ravel().tolist(), "bytes": d["bytes"][:].tolist(),
  "flags": d["flags"][:].tolist(), "counts": d["counts"][:].tolist(), "crs": int(d["crs"][...])}))`) as Record<
      string,
      number[]
    >;
    expect(seen.raw).toEqual([...packed]);
    expect(seen.masked).toEqual([...packed.keys()].filter((i) => packed[i] === -32767));
    expect(seen.first).toBe(1234 * 1e-4 + 0.5);
    expect(seen.slabs).toEqual(Array.from({ length: 60 }, (_, i) => Math.fround(Math.sqrt(i))));
    expect(seen.bytes).toEqual([-128, -1, 0, 1, 2, 127]);
    expect(seen.flags).toEqual([0, 1, 2, 3, 254, 255]);
    expect(seen.counts).toEqual([-2e9, -1, 0, 1, 2, 2e9]);
    expect(seen.crs).toBe(0);
  });

  test("opens in xarray with coordinates and decoded dates", () => {
    const seen = python(`
d = xarray.open_dataset("${place}/a.nc").load()
print(json.dumps({"coords": sorted(d.height.coords), "dates": [str(t)[:10] for t in d.time.values],
  "fill": bool(numpy.isnan(d.height.sel(time="2031-03-06", latitude=20.375, longitude=-149.75))),
  "near": bool(abs(d.height.sel(time="2031-03-03", latitude=20.125, longitude=-150) - 0.6234) < 1e-6)}))`);
    expect(seen).toEqual({
      coords: ["latitude", "longitude", "time"],
      dates: ["2031-03-03", "2031-03-06", "2031-03-09", "2031-03-12", "2031-03-15"],
      fill: true,
      near: true,
    });
  });
});

describe("writing", () => {
  test("the same spec twice, seconds apart, gives the same bytes", async () => {
    await writeNetcdf4(join(place, "first.nc"), spec);
    // HDF5 counts object times in whole seconds.
    await new Promise((resolve) => setTimeout(resolve, 1100));
    await writeNetcdf4(join(place, "second.nc"), spec);
    expect(readFileSync(join(place, "first.nc")).equals(readFileSync(join(place, "second.nc")))).toBe(true);
  });

  test("leaves no file behind when a slab callback fails", async () => {
    const folder = mkdtempSync(join(place, "fails-"));
    const failing: Netcdf4Spec = {
      dimensions: { time: 4 },
      variables: [
        {
          name: "x",
          type: "float32",
          dimensions: ["time"],
          chunks: [2],
          values: (from) => {
            if (from > 0) throw new Error("the source broke off");
            return new Float32Array(2);
          },
        },
      ],
    };
    await expect(writeNetcdf4(join(folder, "x.nc"), failing)).rejects.toThrow("the source broke off");
    expect(readdirSync(folder)).toEqual([]);
  });

  test.each([
    [
      "a fill value on a coordinate",
      { name: "time", type: "float64", dimensions: ["time"], values: new Float64Array(2), fillValue: 0 },
    ],
    ["too few values", { name: "x", type: "float32", dimensions: ["time"], values: new Float32Array(1) }],
    ["an unknown dimension", { name: "x", type: "float32", dimensions: ["depth"], values: new Float32Array(2) }],
    [
      "chunks beyond the shape",
      { name: "x", type: "float32", dimensions: ["time"], values: new Float32Array(2), chunks: [3] },
    ],
  ] as const)("refuses %s", async (_, variable) => {
    const attempt = writeNetcdf4(join(place, "bad.nc"), { dimensions: { time: 2 }, variables: [variable] });
    await expect(attempt).rejects.toMatchObject({ tag: "internal" });
  });
});
