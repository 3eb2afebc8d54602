import type { ScalesResult } from "../../../core/model/scales-result";

type Column = readonly [header: string, values: (row: number) => number];

/** scales.csv: speeds, lengths, forcing and persistence, one row a latitude; empty where a number could not be had. */
export function scalesTable({ latitude, byLatitude, forcing, persistence }: ScalesResult): string {
  const { totalSpeed, eddySpeed, beta, deformationRadius, longWaveSpeed, rhines } = byLatitude;
  const names: Readonly<Record<string, string>> = {
    root: "sqrt(U/beta)",
    "root-width": "pi sqrt(U/beta)",
    "root-wavelength": "2 pi sqrt(U/beta)",
    "root-two": "sqrt(2U/beta)",
    "root-two-width": "pi sqrt(2U/beta)",
    "root-two-wavelength": "2 pi sqrt(2U/beta)",
  };
  const columns: readonly Column[] = [
    ["latitude [degrees_north]", (row) => latitude[row]],
    ["rms speed [m s-1]", (row) => totalSpeed[row]],
    ["rms eddy speed [m s-1]", (row) => eddySpeed[row]],
    ["beta [m-1 s-1]", (row) => beta[row]],
    ...Object.entries(rhines).flatMap(([convention, { total, eddy }]): Column[] => [
      [`${names[convention]} of the whole flow [m]`, (row) => total[row]],
      [`${names[convention]} of the eddies [m]`, (row) => eddy[row]],
    ]),
    ["deformation radius [m]", (row) => deformationRadius[row]],
    ["long Rossby wave speed [m s-1]", (row) => longWaveSpeed[row]],
    ["mean flow [m s-1]", (row) => forcing.meanFlow[row]],
    ["eddy momentum flux [m2 s-2]", (row) => forcing.flux[row]],
    ["eddy momentum convergence [m s-2]", (row) => forcing.convergence[row]],
    ["beta - U_yy [m-1 s-1]", (row) => forcing.gradient[row]],
    ["prevailing sign [1]", (row) => persistence.byLatitude.sign[row]],
    ["share of dates with it [1]", (row) => persistence.byLatitude.share[row]],
    ["longest run [days]", (row) => persistence.byLatitude.longestDays[row]],
  ];
  return csv(
    columns.map(([header]) => header),
    Array.from(latitude, (_, row) => columns.map(([, value]) => value(row))),
  );
}

/** Comma-separated lines; a number that is not finite is left empty. */
export function csv(header: readonly string[], rows: readonly (readonly (string | number)[])[]): string {
  const cell = (value: string | number) => (typeof value === "number" && !Number.isFinite(value) ? "" : String(value));
  return `${[header.join(","), ...rows.map((row) => row.map(cell).join(","))].join("\n")}\n`;
}
