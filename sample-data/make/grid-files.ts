import { join } from "node:path";
import { type Netcdf4Spec, writeNetcdf4 } from "../../main/writers/netcdf4";
import { fieldPair } from "../model/half-plane";
import type { VorticityModel } from "../model/vorticity-model";
import { writeClassicNetcdf } from "./classic-netcdf";
import {
  centreLongitude,
  heightOfStream,
  isLand,
  north,
  seasonAndTrend,
  south,
  toSquare,
  widthDegrees,
} from "./geography";
import { periodicStencil, valueUnder } from "./interpolation";
import { mapNoise } from "./map-noise";
import type { SmoothMap } from "./map-smoothing";
import type { MapProduct, Scenario } from "./scenario";
import type { Simulation } from "./simulate";
import { daysSince1950, simulatedNotice } from "./wording";

/** Maps of height in metres, NaN on land; dates × latitudes × longitudes, latitudes ascending, longitudes from −180. */
export interface HeightMaps {
  readonly latitude: Float64Array;
  readonly longitude: Float64Array;
  readonly dates: readonly Float64Array[];
}

/** Lays smoothed streamfunction maps on cell centres and adds the mapping error, the yearly cycle and the rise. */
export function heightMaps(
  model: VorticityModel,
  product: MapProduct,
  maps: readonly SmoothMap[],
  seed: number,
): HeightMaps {
  const { plane, fourier } = model;
  const { size, lengthMetres } = plane;
  const latitude = centresWithin(south, north, product.stepDegrees);
  const half = widthDegrees(lengthMetres) / 2;
  const longitude = centresWithin(centreLongitude - half, centreLongitude + half, product.stepDegrees);
  const cells = latitude.length * longitude.length;
  const stencils = Array.from({ length: cells }, (_, cell) => {
    const place = longitude[cell % longitude.length];
    const [x, y] = toSquare(place, latitude[Math.floor(cell / longitude.length)], lengthMetres);
    return periodicStencil(x, y, size);
  });
  const land = Array.from({ length: cells }, (_, cell) =>
    isLand(longitude[cell % longitude.length], latitude[Math.floor(cell / longitude.length)]),
  );
  const noise = mapNoise(plane, product, seed);
  const stream = new Float64Array(size * size);
  const error = new Float64Array(size * size);
  const dates = maps.map((map, date) => {
    const errorMap = noise.next().value;
    fieldPair(plane, map, errorMap ?? map, stream, error);
    fourier.toPhysical(stream, error);
    return Float64Array.from({ length: cells }, (_, cell) => {
      if (land[cell]) return Number.NaN;
      const place = latitude[Math.floor(cell / longitude.length)];
      return (
        heightOfStream(valueUnder(stencils[cell], stream, size), place) +
        valueUnder(stencils[cell], error, size) +
        seasonAndTrend(place, date * product.everyDays)
      );
    });
  });
  return { latitude, longitude, dates };
}

/** Centres of the cells, counted from zero degrees, that lie wholly between `from` and `to`. */
function centresWithin(from: number, to: number, step: number): Float64Array {
  const centres: number[] = [];
  for (let i = Math.ceil(from / step); (i + 1) * step <= to; i++) centres.push((i + 0.5) * step);
  return Float64Array.from(centres);
}

const fill = -32767;

/** Product A: quarter degree, latitudes ascending, int16 of 0.1 mm, one file a year, some dates missing and one empty. */
export async function writeGridA(simulation: Simulation, folder: string): Promise<string[]> {
  const { scenario, model, mapsA } = simulation;
  const maps = heightMaps(model, scenario.gridA, mapsA, scenario.seed + 1);
  const byYear = new Map<number, number[]>();
  for (let date = 0; date < maps.dates.length; date++) {
    if (scenario.missingDates.includes(date)) continue;
    const moment = new Date(Date.parse(scenario.firstDate) + date * scenario.gridA.everyDays * 86400e3);
    const year = moment.getUTCFullYear();
    byYear.set(year, [...(byYear.get(year) ?? []), date]);
  }
  const files: string[] = [];
  for (const [year, dates] of byYear) {
    const path = join(folder, `halcyon-a-${year}.nc`);
    await writeNetcdf4(path, gridASpec(scenario, maps, dates));
    files.push(path);
  }
  return files;
}

function gridASpec(scenario: Scenario, maps: HeightMaps, dates: readonly number[]): Netcdf4Spec {
  const { latitude, longitude } = maps;
  const cells = latitude.length * longitude.length;
  const packed = new Int16Array(dates.length * cells);
  dates.forEach((date, slot) => {
    for (let cell = 0; cell < cells; cell++) {
      const height = date === scenario.emptyDate ? Number.NaN : maps.dates[date][cell];
      packed[slot * cells + cell] = Number.isNaN(height) ? fill : Math.round(height / 1e-4);
    }
  });
  const start = daysSince1950(scenario.firstDate);
  return {
    dimensions: { time: dates.length, latitude: latitude.length, longitude: longitude.length },
    attributes: {
      ...simulatedNotice("Simulated sea-surface height of the invented Halcyon Basin, mapped product A"),
      comment: productWords(scenario.gridA),
      time_coverage_resolution: `P${scenario.gridA.everyDays}D`,
    },
    variables: [
      timeVariable(Float64Array.from(dates, (date) => start + date * scenario.gridA.everyDays)),
      placeVariable("latitude", latitude),
      placeVariable("longitude", longitude),
      {
        name: "adt",
        type: "int16",
        dimensions: ["time", "latitude", "longitude"],
        values: packed,
        fillValue: fill,
        chunks: [Math.min(30, dates.length), latitude.length, longitude.length],
        gzipLevel: 9,
        attributes: {
          standard_name: "sea_surface_height_above_geoid",
          long_name: "simulated height of the sea surface above the geoid",
          units: "m",
          scale_factor: 1e-4,
          add_offset: 0,
          cell_methods: "time: mean area: mean",
          coordinates: "time latitude longitude",
        },
      },
    ],
  };
}

/** Product B: half degree, latitudes descending, longitudes 0 to 360, int16 of 0.1 mm kept in cm, one file of the classic format. */
export async function writeGridB(simulation: Simulation, folder: string): Promise<string[]> {
  const { scenario, model, mapsB } = simulation;
  const maps = heightMaps(model, scenario.gridB, mapsB, scenario.seed + 2);
  const rows = maps.latitude.length;
  const columns = maps.longitude.length;
  const packed = new Int16Array(maps.dates.length * rows * columns);
  maps.dates.forEach((heights, date) => {
    for (let row = 0; row < rows; row++) {
      for (let column = 0; column < columns; column++) {
        const centimetres = 100 * heights[(rows - 1 - row) * columns + column];
        packed[(date * rows + row) * columns + column] = Number.isNaN(centimetres)
          ? fill
          : Math.round(centimetres / 0.01);
      }
    }
  });
  const start = daysSince1950(scenario.firstDate);
  const path = join(folder, "halcyon-b.nc");
  await writeClassicNetcdf(path, {
    dimensions: { time: maps.dates.length, lat: rows, lon: columns },
    attributes: {
      ...simulatedNotice("Simulated sea-surface height of the invented Halcyon Basin, mapped product B"),
      comment: productWords(scenario.gridB),
      time_coverage_resolution: `P${scenario.gridB.everyDays}D`,
    },
    variables: [
      timeVariable(Float64Array.from(maps.dates, (_, date) => start + date * scenario.gridB.everyDays)),
      placeVariable("lat", maps.latitude.slice().reverse()),
      placeVariable(
        "lon",
        maps.longitude.map((value) => value + 360),
      ),
      {
        name: "ssh",
        type: "int16",
        dimensions: ["time", "lat", "lon"],
        values: packed,
        fillValue: fill,
        attributes: {
          standard_name: "sea_surface_height_above_geoid",
          long_name: "simulated height of the sea surface above the geoid",
          units: "cm",
          scale_factor: 0.01,
          add_offset: 0,
          cell_methods: "time: mean area: mean",
        },
      },
    ],
  });
  return [path];
}

function timeVariable(values: Float64Array): Netcdf4Spec["variables"][number] {
  return {
    name: "time",
    type: "float64",
    dimensions: ["time"],
    values,
    attributes: {
      standard_name: "time",
      long_name: "time",
      axis: "T",
      units: "days since 1950-01-01 00:00:00",
      calendar: "standard",
    },
  };
}

function placeVariable(name: string, values: Float64Array): Netcdf4Spec["variables"][number] {
  const isLatitude = name.startsWith("lat");
  return {
    name,
    type: "float64",
    dimensions: [name],
    values,
    attributes: {
      standard_name: isLatitude ? "latitude" : "longitude",
      long_name: isLatitude ? "latitude" : "longitude",
      axis: isLatitude ? "Y" : "X",
      units: isLatitude ? "degrees_north" : "degrees_east",
    },
  };
}

function productWords(product: MapProduct): string {
  return [
    `Smoothed by a Gaussian of ${product.smoothingMetres / 1e3} km standard deviation in space`,
    `and ${product.smoothingDays} days in time;`,
    `mapping error added: ${product.noiseMetres * 1e3} mm rms, covariance exp(-r2/2L2) with L = ${product.noiseLengthMetres / 1e3} km,`,
    `e-folding time ${product.noiseDays} days.`,
  ].join(" ");
}
