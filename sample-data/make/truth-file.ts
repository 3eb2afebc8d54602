import { type NetcdfVariable, writeNetcdf4 } from "../../main/writers/netcdf4";
import { fieldPair } from "../model/half-plane";
import type { TrackSamples } from "./along-track";
import { heightOfStream, north, south, stretch } from "./geography";
import type { BudgetWindow } from "./momentum-budget";
import type { Simulation } from "./simulate";
import { daysSince1950, simulatedNotice } from "./wording";

/** Tracks in the truth keep every so many-th point. */
const thinning = 10;
/** Mean map in the truth keeps every so many-th row and column of the model. */
const coarsening = 4;

/** What is known of the invented sea and hidden in the products; for tests only. */
export async function writeTruth(simulation: Simulation, path: string): Promise<string> {
  const { scenario, model, budget, tracks } = simulation;
  const { size, lengthMetres } = model.plane;
  const start = daysSince1950(scenario.firstDate);
  const rowLatitude = Float64Array.from({ length: size }, (_, row) => south + ((north - south) * row) / size);
  const kept = tracks.map((samples) => thinned(samples));
  const points = kept.reduce((total, indices) => total + indices.length, 0);
  const perRow = (name: string, longName: string, units: string, pick: (window: BudgetWindow) => Float64Array) =>
    rowsVariable(name, longName, units, budget, size, pick);
  const meanHeight = meanMap(simulation);
  const side = size / coarsening;

  await writeNetcdf4(path, {
    dimensions: { time: budget.length, row: size, coarse_row: side, coarse_column: side, point: points },
    attributes: {
      ...simulatedNotice("What is true of the invented Halcyon Basin (simulated)"),
      comment:
        "Zonal means are over the model's whole periodic width, in the model's own metres, averaged over windows of one sampling interval centred on each date. Currents read off heights on the sphere are u times stretch_u and v times stretch_v.",
      drag_per_second: scenario.model.dragPerSecond,
      beta: scenario.model.beta,
    },
    variables: [
      {
        name: "time",
        type: "float64",
        dimensions: ["time"],
        values: Float64Array.from(budget, (_, date) => start + date * scenario.gridA.everyDays),
        attributes: { standard_name: "time", units: "days since 1950-01-01 00:00:00", calendar: "standard" },
      },
      {
        name: "row",
        type: "float64",
        dimensions: ["row"],
        values: rowLatitude,
        attributes: { standard_name: "latitude", units: "degrees_north" },
      },
      plain(
        "stretch_u",
        "row",
        rowLatitude.map((latitude) => stretch(latitude, lengthMetres).u),
        "1",
      ),
      plain(
        "stretch_v",
        "row",
        rowLatitude.map((latitude) => stretch(latitude, lengthMetres).v),
        "1",
      ),
      plain("mean_u", "row", meanFlow(budget, size), "m s-1"),
      perRow("zonal_u", "zonal-mean eastward flow", "m s-1", (window) => window.flow),
      perRow("tendency", "rate of change of the zonal-mean flow", "m s-2", (window) => window.tendency),
      perRow(
        "convergence",
        "minus d<u'v'>/dy, the forcing of the flow by eddies",
        "m s-2",
        (window) => window.convergence,
      ),
      perRow("friction", "drag and hyperviscosity on the zonal-mean flow", "m s-2", (window) => window.friction),
      {
        name: "mean_height",
        type: "float32",
        dimensions: ["coarse_row", "coarse_column"],
        values: meanHeight,
        chunks: [side, side],
        gzipLevel: 9,
        attributes: {
          long_name: "time-mean height of product A's smoothed sea, without season, rise and mapping error",
          units: "m",
        },
      },
      ...trackVariables(tracks, kept, start),
    ],
  });
  return path;
}

function thinned({ points, mappedCross }: TrackSamples): number[] {
  const indices: number[] = [];
  for (let i = 0; i < points.count; i += thinning) if (!Number.isNaN(mappedCross[i])) indices.push(i);
  return indices;
}

function trackVariables(
  tracks: readonly TrackSamples[],
  kept: readonly (readonly number[])[],
  start: number,
): NetcdfVariable[] {
  const gather = (pick: (samples: TrackSamples, index: number, mission: number) => number): Float64Array =>
    Float64Array.from(
      tracks.flatMap((samples, mission) => kept[mission].map((index) => pick(samples, index, mission))),
    );
  return [
    plain(
      "mission",
      "point",
      gather((_, __, mission) => mission),
      "1",
      "int8",
    ),
    plain(
      "index",
      "point",
      gather((_, index) => index),
      "1",
      "int32",
    ),
    plain(
      "point_time",
      "point",
      gather((samples, index) => start + samples.points.days[index]),
      "days since 1950-01-01 00:00:00",
      "float64",
    ),
    plain(
      "latitude",
      "point",
      gather((samples, index) => samples.points.latitude[index]),
      "degrees_north",
    ),
    plain(
      "longitude",
      "point",
      gather((samples, index) => samples.points.longitude[index]),
      "degrees_east",
    ),
    plain(
      "true_height",
      "point",
      gather((samples, index) => samples.trueHeight[index]),
      "m",
    ),
    plain(
      "true_cross",
      "point",
      gather((samples, index) => samples.trueCross[index]),
      "m s-1",
    ),
    plain(
      "mapped_cross",
      "point",
      gather((samples, index) => samples.mappedCross[index]),
      "m s-1",
    ),
  ];
}

function plain(
  name: string,
  dimension: string,
  values: Float64Array,
  units: string,
  type: NetcdfVariable["type"] = "float32",
): NetcdfVariable {
  return {
    name,
    type,
    dimensions: [dimension],
    values,
    chunks: [Math.min(values.length, 16384)],
    gzipLevel: 9,
    attributes: { units },
  };
}

function rowsVariable(
  name: string,
  longName: string,
  units: string,
  budget: readonly BudgetWindow[],
  size: number,
  pick: (window: BudgetWindow) => Float64Array,
): NetcdfVariable {
  const values = new Float32Array(budget.length * size);
  budget.forEach((window, date) => {
    values.set(pick(window), date * size);
  });
  return {
    name,
    type: "float32",
    dimensions: ["time", "row"],
    values,
    chunks: [Math.min(budget.length, 50), size],
    gzipLevel: 9,
    attributes: { long_name: longName, units },
  };
}

function meanFlow(budget: readonly BudgetWindow[], size: number): Float64Array {
  const mean = new Float64Array(size);
  for (const window of budget) for (let row = 0; row < size; row++) mean[row] += window.flow[row] / budget.length;
  return mean;
}

function meanMap({ model, mapsA }: Simulation): Float32Array {
  const { plane, fourier } = model;
  const { size } = plane;
  const mean = { re: new Float64Array(plane.count), im: new Float64Array(plane.count) };
  for (const map of mapsA) {
    for (let k = 0; k < plane.count; k++) {
      mean.re[k] += map.re[k] / mapsA.length;
      mean.im[k] += map.im[k] / mapsA.length;
    }
  }
  const stream = new Float64Array(size * size);
  const unused = new Float64Array(size * size);
  const nothing = { re: new Float64Array(plane.count), im: new Float64Array(plane.count) };
  fieldPair(plane, mean, nothing, stream, unused);
  fourier.toPhysical(stream, unused);
  const side = size / coarsening;
  return Float32Array.from({ length: side * side }, (_, cell) => {
    const row = coarsening * Math.floor(cell / side);
    const column = coarsening * (cell % side);
    return heightOfStream(stream[row * size + column], south + ((north - south) * row) / size);
  });
}
