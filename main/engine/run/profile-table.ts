import { meanAndDeviation } from "../../../core/numeric/serial-correlation";
import type { Analysis } from "./analysis";

/** profile.csv: the zonal mean of u over latitude with its 95 % half-width; one row a latitude; empty where too few data. */
export function profileTable(analysis: Analysis): string {
  const { record } = analysis.stages;
  const { rows, dates } = record.cube;
  const { profile } = analysis.asItStands;
  const { band } = analysis;
  const header = [
    "latitude [degrees_north]",
    "u mean [m s-1]",
    "u half width of 95 % confidence [m s-1]",
    "u effective sample size [1]",
    "dates [1]",
    ...(band ? ["u_band root mean square [m s-1]", "u_band effective sample size [1]"] : []),
  ];
  const lines = Array.from({ length: rows }, (_, row) => {
    const own = band?.zonal.series.subarray(row * dates, (row + 1) * dates);
    const values = [
      record.axes.latitude.values[row],
      profile.mean[row],
      profile.half95[row],
      profile.effectiveSize[row],
      profile.dates[row],
      ...(band && own ? [rootMeanSquare(own), band.zonal.profile.effectiveSize[row]] : []),
    ];
    return values.map((value) => (Number.isFinite(value) ? String(value) : "")).join(",");
  });
  return `${[header.join(","), ...lines].join("\n")}\n`;
}

function rootMeanSquare(series: Float64Array): number {
  return Math.sqrt(meanAndDeviation(series.map((value) => value * value)).mean);
}
