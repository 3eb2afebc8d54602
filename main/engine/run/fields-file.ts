import { bandWords } from "../../../core/study/band-words";
import { type NetcdfVariable, writeNetcdf4 } from "../../writers/netcdf4";
import type { Job } from "../job";
import { fieldArguments } from "../latitudes";
import { requireMemory } from "../memory";
import type { WorkerPool } from "../pool";
import type { Moments } from "../tasks/moments";
import { type Analysis, mappedQuantities } from "./analysis";
import {
  globalAttributes,
  latitudeAttributes,
  longitudeAttributes,
  timeAttributes,
  variableAttributes,
} from "./cf-attributes";

const dimensions = ["time", "latitude", "longitude"] as const;
const gzipLevel = 4;
const datesInTask = 16;

/**
 * Writes fields.nc. "all": every date's height, u, v, vorticity, as they stand and in the band. "mean": their time mean and,
 * for the band, whose mean is nothing, their root mean square over the dates with data.
 */
export async function writeFields(path: string, analysis: Analysis, pool: WorkerPool, job: Job): Promise<void> {
  const isAll = analysis.open.study.outputs.fields === "all";
  const { record } = analysis.stages;
  const { latitude, longitude } = record.axes;
  const { values: days } = record.time;
  const variables = isAll ? await everyDate(analysis, pool, job) : overTime(analysis);
  const middle = (days[0] + days[days.length - 1]) / 2;
  await writeNetcdf4(path, {
    dimensions: {
      time: isAll ? days.length : 1,
      latitude: latitude.values.length,
      longitude: longitude.values.length,
      ...(isAll ? {} : { bounds: 2 }),
    },
    variables: [
      coordinate("time", isAll ? days : Float64Array.of(middle), {
        ...timeAttributes(analysis),
        ...(isAll ? {} : { bounds: "time_bounds" }),
      }),
      ...(isAll ? [] : [timeBounds(days)]),
      coordinate("latitude", latitude.values, latitudeAttributes),
      coordinate("longitude", longitude.values, longitudeAttributes),
      ...variables,
      ...errorVariables(analysis),
      ...persistenceVariables(analysis),
    ],
    attributes: globalAttributes(analysis, "Geostrophic fields"),
  });
}

function coordinate(name: string, values: Float64Array, attributes: NetcdfVariable["attributes"]): NetcdfVariable {
  return { name, type: "float64", dimensions: [name], values, attributes };
}

function timeBounds(days: Float64Array): NetcdfVariable {
  const values = Float64Array.of(days[0], days[days.length - 1]);
  return { name: "time_bounds", type: "float64", dimensions: ["time", "bounds"], values };
}

function field(
  analysis: Analysis,
  q: number,
  inBand: boolean,
  values: Float32Array,
  cellMethods: string | null,
): NetcdfVariable {
  const quantity = mappedQuantities[q];
  const { rows, columns } = analysis.stages.record.cube;
  const { band } = analysis.open.study;
  const bandText = `${quantity.title.toLowerCase()}, ${bandWords(band)}`;
  const { reference } = analysis.loaded.index.height;
  const described = variableAttributes(quantity, reference, cellMethods ? { cell_methods: cellMethods } : {});
  const { standard_name: _, ...withoutName } = described;
  return {
    name: inBand ? `${quantity.variable}_band` : quantity.variable,
    type: "float32",
    dimensions,
    values,
    // CF's names stand for the whole quantity, not for a band of its periods.
    attributes: inBand ? { ...withoutName, long_name: bandText } : described,
    fillValue: Number.NaN,
    chunks: [1, rows, columns],
    gzipLevel,
  };
}

/** Standard errors of single maps as they stand, the same for every date. */
function errorVariables({ errors, stages, loaded, open }: Analysis): NetcdfVariable[] {
  if (!errors) return [];
  const { rows, columns } = stages.record.cube;
  const { heightMetres, correlationKm } = open.study.errors;
  return mappedQuantities.map((quantity) => {
    const { standard_name: name, ...described } = variableAttributes(quantity, loaded.index.height.reference, {
      comment: `from a height error of ${heightMetres === "file" ? "the files' own" : `${heightMetres} m`}, correlated over ${correlationKm} km; what the mapping smoothed away is no part of it`,
    });
    return {
      name: `${quantity.variable}_error`,
      type: "float32",
      dimensions: ["latitude", "longitude"],
      values: Float32Array.from(errors[quantity.id as keyof typeof errors]),
      attributes: {
        ...described,
        ...(name ? { standard_name: `${name} standard_error` } : {}),
        long_name: `standard error of ${quantity.title.toLowerCase()}`,
      },
      fillValue: Number.NaN,
      chunks: [rows, columns],
      gzipLevel,
    };
  });
}

/** How lastingly u keeps its sign: share of dates with the prevailing one, longest run of either. */
function persistenceVariables({ scales, stages }: Analysis): NetcdfVariable[] {
  const { rows, columns } = stages.record.cube;
  const { share, longestDays, inBand, stepDays } = scales.persistence;
  const of = `of eastward velocity ${inBand ? "in the band" : "as it stands"}, maps ${stepDays} days apart`;
  const variable = (name: string, values: Float32Array, units: string, long: string): NetcdfVariable => ({
    name,
    type: "float32",
    dimensions: ["latitude", "longitude"],
    values,
    attributes: { long_name: long, units },
    fillValue: Number.NaN,
    chunks: [rows, columns],
    gzipLevel,
  });
  return [
    variable("persistence_share", share.values, "1", `share of dates with the prevailing sign ${of}`),
    variable("persistence_longest", longestDays.values, "day", `longest unbroken run of one sign ${of}`),
  ];
}

function overTime(analysis: Analysis): NetcdfVariable[] {
  const mean = ({ sum, count }: Moments, q: number) => ratio(sum[q], count[q], (value) => value);
  const rms = ({ squares, count }: Moments, q: number) => ratio(squares[q], count[q], Math.sqrt);
  const { moments, band } = analysis;
  return mappedQuantities.flatMap((_, q) => [
    field(analysis, q, false, mean(moments, q), "time: mean"),
    ...(band ? [field(analysis, q, true, rms(band.moments, q), "time: root_mean_square")] : []),
  ]);
}

function ratio(total: Float64Array, count: Int32Array, finish: (value: number) => number): Float32Array {
  return Float32Array.from(total, (value, cell) => (count[cell] > 0 ? finish(value / count[cell]) : Number.NaN));
}

async function everyDate(analysis: Analysis, pool: WorkerPool, job: Job): Promise<NetcdfVariable[]> {
  const { record } = analysis.stages;
  const { dates, rows, columns } = record.cube;
  const modes = analysis.band ? [false, true] : [false];
  requireMemory(dates * rows * columns * 4 * mappedQuantities.length * modes.length, 'outputs.fields "all"');
  const ids = mappedQuantities.map(({ id }) => id);
  const variables: NetcdfVariable[] = [];
  for (const inBand of modes) {
    const whole = ids.map(() => new Float32Array(dates * rows * columns));
    const shared = { ...fieldArguments(analysis.stages, analysis.open.study, inBand), quantities: ids };
    await job.step(inBand ? "Filtering every map" : "Differencing every map", dates, async () => {
      const blocks = await pool.share(
        "fieldPlanes",
        dates,
        (range) => ({ ...shared, dates: range }),
        job,
        Math.ceil(dates / datesInTask),
      );
      let start = 0;
      for (const block of blocks) {
        for (const [q, planes] of block.entries()) whole[q].set(planes, start);
        start += block[0].length;
      }
    });
    variables.push(...whole.map((values, q) => field(analysis, q, inBand, values, null)));
  }
  return variables;
}
