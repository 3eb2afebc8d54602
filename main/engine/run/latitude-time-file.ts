import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { bridgedDates } from "../../../core/study/band";
import { bandWords } from "../../../core/study/band-words";
import { type NetcdfVariable, writeNetcdf4 } from "../../writers/netcdf4";
import type { Analysis } from "./analysis";
import { globalAttributes, latitudeAttributes, timeAttributes, variableAttributes } from "./cf-attributes";

/** Writes latitude-time.nc: zonal means of u on every date, as they stand and in the band, and what they rest on. */
export async function writeLatitudeTime(path: string, analysis: Analysis): Promise<void> {
  const { record, filter } = analysis.stages;
  const { rows, dates } = record.cube;
  const u = quantityById("u");
  const { reference } = analysis.loaded.index.height;
  const zonal = (name: string, series: Float64Array, longName: string, isWhole: boolean): NetcdfVariable => {
    const { standard_name: standardName, ...rest } = variableAttributes(u, reference, {
      cell_methods: "longitude: mean",
    });
    return {
      name,
      type: "float64",
      dimensions: ["time", "latitude"],
      values: transposed(series, rows, dates),
      attributes: { ...rest, ...(isWhole && standardName ? { standard_name: standardName } : {}), long_name: longName },
      fillValue: Number.NaN,
    };
  };
  const along = (name: string, values: Float64Array, longName: string): NetcdfVariable => ({
    name,
    type: "float64",
    dimensions: ["time"],
    values,
    attributes: { long_name: longName, units: "1" },
    fillValue: Number.NaN,
  });
  await writeNetcdf4(path, {
    dimensions: { time: dates, latitude: rows },
    variables: [
      {
        name: "time",
        type: "float64",
        dimensions: ["time"],
        values: record.time.values,
        attributes: timeAttributes(analysis),
      },
      {
        name: "latitude",
        type: "float64",
        dimensions: ["latitude"],
        values: record.axes.latitude.values,
        attributes: latitudeAttributes,
      },
      zonal("u", analysis.asItStands.series, "zonal mean of eastward velocity", true),
      ...(analysis.band
        ? [
            zonal(
              "u_band",
              analysis.band.zonal.series,
              `zonal mean of eastward velocity, ${bandWords(analysis.open.study.band)}`,
              false,
            ),
          ]
        : []),
      along("coverage", analysis.loaded.coverage, "share of ocean cells with a height"),
      ...(filter
        ? [
            along(
              "filter_weight",
              filter.share(record.hasData),
              "share of the filter's weight that lies on dates with data",
            ),
            along(
              "filter_end",
              Float64Array.from(filter.ends(record.hasData)),
              "1 where the value in the band rests on too little of the filter's weight, or on padding",
            ),
            along(
              "bridged",
              Float64Array.from(bridgedDates(analysis.open.study.band, record)),
              "1 where a date without data is bridged by the filter",
            ),
          ]
        : []),
    ],
    attributes: globalAttributes(analysis, "Zonal means through time"),
  });
}

/** `series[row * dates + t]` as time-major. */
function transposed(series: Float64Array, rows: number, dates: number): Float64Array {
  return Float64Array.from(series, (_, i) => series[(i % rows) * dates + Math.floor(i / rows)]);
}
