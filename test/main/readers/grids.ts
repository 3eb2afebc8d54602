import type { WrittenAttribute, WrittenFile, WrittenVariable } from "./write-classic";
import { writeClassic } from "./write-classic";

export interface GridRecipe {
  readonly latitudes?: readonly number[];
  readonly longitudes?: readonly number[];
  readonly times?: readonly number[];
  readonly timeUnits?: string;
  readonly calendar?: string;
  readonly scale?: number;
  readonly offset?: number;
  readonly height?: string;
  readonly heightAttributes?: Readonly<Record<string, WrittenAttribute>>;
  /** Order of the height's dimensions; default time, latitude, longitude. "depth" adds one of length one. */
  readonly order?: readonly string[];
  /** Metres; NaN is written as the fill value. Default `knownHeight`. */
  readonly value?: (day: number, latitude: number, longitude: number) => number;
  readonly more?: readonly WrittenVariable[];
}

/** A height that tells where and when it belongs; a longitude and the same one a turn on agree. */
export function knownHeight(day: number, latitude: number, longitude: number): number {
  return Math.round(100 * (latitude / 90 + Math.cos((longitude * Math.PI) / 180) + (day % 50) / 50)) / 100;
}

/** A small packed grid as a classic file, for tests. Scale 0.001 and offset 0 unless said otherwise. */
export function gridFile(recipe: GridRecipe = {}): WrittenFile {
  const { latitudes = [20, 21, 22], longitudes = [210, 211, 212, 213], times = [29700, 29701] } = recipe;
  const { scale = 0.001, offset = 0, height = "adt", value = knownHeight } = recipe;
  const order = recipe.order ?? ["time", "latitude", "longitude"];
  const lengths: Record<string, number> = {
    time: times.length,
    latitude: latitudes.length,
    longitude: longitudes.length,
    depth: 1,
  };
  const packed = new Int16Array(order.reduce((product, name) => product * lengths[name], 1));
  packed.forEach((_, flat) => {
    const at: Record<string, number> = {};
    let rest = flat;
    for (const name of order.toReversed()) {
      at[name] = rest % lengths[name];
      rest = Math.floor(rest / lengths[name]);
    }
    const metres = value(times[at.time ?? 0], latitudes[at.latitude], longitudes[at.longitude]);
    packed[flat] = Number.isNaN(metres) ? -32767 : Math.round((metres - offset) / scale);
  });
  const coordinate = (name: string, units: string, values: readonly number[]): WrittenVariable => ({
    name,
    dimensions: [name],
    attributes: {
      units,
      standard_name: name,
      ...(name === "time" && recipe.calendar ? { calendar: recipe.calendar } : {}),
    },
    values: Float64Array.from(values),
  });
  const attributes = {
    standard_name: "sea_surface_height_above_geoid",
    units: "m",
    _FillValue: Int16Array.of(-32767),
    scale_factor: Float64Array.of(scale),
    add_offset: Float64Array.of(offset),
    ...recipe.heightAttributes,
  };
  return {
    dimensions: Object.fromEntries(
      [...new Set(["time", "latitude", "longitude", ...order])].map((name) => [name, lengths[name]]),
    ),
    attributes: { title: "made for a test" },
    variables: [
      coordinate("time", recipe.timeUnits ?? "days since 1950-01-01", times),
      coordinate("latitude", "degrees_north", latitudes),
      coordinate("longitude", "degrees_east", longitudes),
      { name: height, dimensions: order, attributes, values: packed },
      ...(recipe.more ?? []),
    ],
  };
}

export function writeGrid(path: string, recipe: GridRecipe = {}): string {
  writeClassic(path, gridFile(recipe));
  return path;
}
