import type { DirectionSpectra, ScalesResult } from "../../../core/model/scales-result";
import { csv } from "./scales-table";

const header = [
  "spectrum",
  "frequency [day-1]",
  "wavenumber [m-1]",
  "density [m2 s-2 day]",
  "density low 95 % [m2 s-2 day]",
  "density high 95 % [m2 s-2 day]",
  "density [m2 s-2 m]",
];

/** spectra.csv: the one-dimensional spectra of u, one row an estimate; which columns apply depends on the spectrum. */
export function spectraTable({ period, zonal, meridional }: ScalesResult): string {
  const byPeriod = period
    ? Array.from(period.frequency, (frequency, k) => {
        const density = period.density[k];
        return ["period", frequency, "", density, density * period.lowFactor, density * period.highFactor, ""];
      })
    : [];
  return csv(header, [...byPeriod, ...rowsOf("zonal", zonal), ...rowsOf("meridional", meridional)]);
}

function rowsOf(direction: string, { eachMap, timeMean, inBand }: DirectionSpectra): (string | number)[][] {
  const curves = { "of each map": eachMap, "of the time mean": timeMean, "in the band": inBand };
  return Object.entries(curves).flatMap(([name, curve]) =>
    curve
      ? Array.from(curve.wavenumber, (wavenumber, k) => [
          `${direction} ${name}`,
          "",
          wavenumber,
          "",
          "",
          "",
          curve.density[k],
        ])
      : [],
  );
}
