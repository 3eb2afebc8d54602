import type { OpenStudy } from "../../core/contract/engine";
import { readStudy } from "../../core/study/read";
import { type AttributeValue, type NetcdfVariable, type StoredNumber, writeNetcdf4 } from "../../main/writers/netcdf4";

type HeightAt = (day: number, latitude: number, longitude: number) => number;

/** A small gridded file whose heights are a formula. Dates are days since 1970; NaN is written as such. */
export interface MadeGrid {
  readonly latitudes: readonly number[];
  readonly longitudes: readonly number[];
  readonly days: readonly number[];
  /** In the unit of `units`. */
  readonly height: HeightAt;
  readonly units?: string;
  readonly type?: StoredNumber;
  readonly attributes?: Readonly<Record<string, AttributeValue>>;
  /** Further variables over time, latitude, longitude. */
  readonly beside?: readonly {
    readonly name: string;
    readonly attributes: Readonly<Record<string, AttributeValue>>;
    readonly value: HeightAt;
  }[];
}

/** from, from + step … `count` of them. */
export function line(from: number, step: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) => from + i * step);
}

const dimensions = ["time", "latitude", "longitude"] as const;

/** Writes a netCDF-4 file of the grid, heights as float64 unless said otherwise. */
export async function writeMadeGrid(path: string, made: MadeGrid): Promise<string> {
  const { latitudes, longitudes, days, beside = [] } = made;
  const coordinate = (name: string, units: string, values: readonly number[]): NetcdfVariable => ({
    name,
    type: "float64",
    dimensions: [name],
    values: Float64Array.from(values),
    attributes: { standard_name: name, units },
  });
  const cube = (value: HeightAt) =>
    Float64Array.from({ length: days.length * latitudes.length * longitudes.length }, (_, i) => {
      const column = i % longitudes.length;
      const row = Math.floor(i / longitudes.length) % latitudes.length;
      return value(days[Math.floor(i / longitudes.length / latitudes.length)], latitudes[row], longitudes[column]);
    });
  await writeNetcdf4(path, {
    dimensions: { time: days.length, latitude: latitudes.length, longitude: longitudes.length },
    variables: [
      coordinate("time", "days since 1970-01-01", days),
      coordinate("latitude", "degrees_north", latitudes),
      coordinate("longitude", "degrees_east", longitudes),
      {
        name: "adt",
        type: made.type ?? "float64",
        dimensions,
        values: cube(made.height),
        attributes: {
          standard_name: "sea_surface_height_above_geoid",
          units: made.units ?? "m",
          ...made.attributes,
        },
      },
      ...beside.map(
        ({ name, attributes, value }): NetcdfVariable => ({
          name,
          type: "float64",
          dimensions,
          values: cube(value),
          attributes,
        }),
      ),
    ],
    attributes: { title: "made for a test" },
  });
  return path;
}

/** A study of such files, without background, band or random oceans unless `changes` brings them. */
export function studyOf(files: readonly string[], changes: object = {}): OpenStudy {
  const study = readStudy(
    {
      strake: 1,
      grids: [{ id: "A", files }],
      background: { mean: false, trend: false, annual: false, semiannual: false },
      band: { filter: "none" },
      eddyTest: { oceans: 0 },
      outputs: { fields: "all", figures: [] },
      ...changes,
    },
    "made",
  );
  return { study, folder: "/", path: "" };
}
