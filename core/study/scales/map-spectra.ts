import type { GridAxes } from "../../model/axis";
import { planeSpectrum } from "../../numeric/spectra/plane";
import {
  meridionalSpectrum,
  type WavenumberSettings,
  type WavenumberSpectrum,
  zonalSpectrum,
} from "../../numeric/spectra/wavenumber";
import type { GridGeometry } from "../../ocean/grid-geometry";

/** Hann taper, trend off, gaps of two cells bridged, half of a line (or plane) needed. Common practice, no source. */
export const mapSpectrumSettings: WavenumberSettings = {
  taper: { kind: "hann" },
  detrend: "linear",
  bridgedCells: 2,
  leastShare: 0.5,
};

/** Spacing of a grid of even steps, in metres. */
export interface GridSpacing {
  /** Eastward, one a row. */
  readonly east: Float64Array;
  readonly eastAtMiddle: number;
  readonly north: number;
}

/** Spacing of the grid's cells; null where an axis is uneven, so that no transform is to be had. */
export function gridSpacing({ latitude, longitude }: GridAxes, geometry: GridGeometry): GridSpacing | null {
  if (!latitude.even || !longitude.even) return null;
  const degree = Math.PI / 180;
  const east = geometry.east.map((metres) => metres * Math.abs(longitude.step) * degree);
  const middle = geometry.rows >> 1;
  return { east, eastAtMiddle: east[middle], north: geometry.north[middle] * Math.abs(latitude.step) * degree };
}

/** Spectra of one map. */
export interface MapSpectra {
  /** Of u, in cycles a metre. */
  readonly zonal: WavenumberSpectrum;
  readonly meridional: WavenumberSpectrum;
  /** Density of (u² + v²) / 2 on the plane, meridional × zonal, m2 s-2 m2; null where under half the map has values. */
  readonly energy: Float64Array | null;
}

/** Wavenumber spectra of u along both directions and of kinetic energy on the plane, rows weighted by their length. */
export function mapSpectra(u: Float64Array, v: Float64Array, spacing: GridSpacing): MapSpectra {
  const rows = spacing.east.length;
  const columns = u.length / rows;
  const step = { rows, columns, rowStep: spacing.north, columnStep: spacing.eastAtMiddle };
  const [ofU, ofV] = [u, v].map((values) => planeSpectrum({ values, ...step }, mapSpectrumSettings).density);
  const energy = ofU.map((density, i) => (density + ofV[i]) / 2);
  return {
    zonal: zonalSpectrum(u, { columns, spacingMetres: spacing.east, weights: spacing.east }, mapSpectrumSettings),
    meridional: meridionalSpectrum(u, { rows, spacingMetres: spacing.north }, mapSpectrumSettings),
    energy: energy.some(Number.isNaN) ? null : energy,
  };
}
