import { energyShareInside, waveBoundary } from "../../jets/scales/wave-boundary";
import type { EnergyPlane } from "../../model/scales-result";
import { centredAxis } from "../../numeric/spectra/density";
import type { GridSpacing } from "./map-spectra";

const boundaryPoints = 91;
/** Most wavenumbers a side that are handed on; a display has no more pixels for them. */
const mostEachSide = 120;

/**
 * The plane of kinetic energy with the boundary of waves and turbulence for a speed in m s-1 and beta in m-1 s-1. The share
 * inside is of all wavenumbers; the picture keeps the longest 120 waves a side. `energy` is meridional × zonal.
 */
export function energyPlane(energy: Float64Array, spacing: GridSpacing, speed: number, beta: number): EnergyPlane {
  const rows = spacing.east.length;
  const columns = energy.length / rows;
  const zonal = centredAxis(columns, spacing.eastAtMiddle);
  const meridional = centredAxis(rows, spacing.north);
  const radians = (axis: Float64Array) => axis.map((cycles) => 2 * Math.PI * cycles);
  const curve = waveBoundary(speed, beta, boundaryPoints);
  const cycles = (axis: Float64Array) => axis.map((each) => each / (2 * Math.PI));
  const across = kept(columns);
  const up = kept(rows);
  const values = Float32Array.from({ length: up.count * across.count }, (_, i) => {
    const row = up.from + Math.floor(i / across.count);
    return energy[row * columns + across.from + (i % across.count)];
  });
  return {
    zonal: zonal.slice(across.from, across.from + across.count),
    meridional: meridional.slice(up.from, up.from + up.count),
    density: { rows: up.count, columns: across.count, values },
    boundary: { zonal: cycles(curve.k), meridional: cycles(curve.l) },
    speed,
    shareInside: energyShareInside(turned(energy, rows, columns), radians(zonal), radians(meridional), speed, beta),
  };
}

/** Indices about the zero wavenumber at floor(length / 2). */
function kept(length: number): { from: number; count: number } {
  const zero = Math.floor(length / 2);
  const from = Math.max(0, zero - mostEachSide);
  return { from, count: Math.min(length, zero + mostEachSide + 1) - from };
}

function turned(plane: Float64Array, rows: number, columns: number): Float64Array {
  return Float64Array.from(plane, (_, i) => plane[(i % rows) * columns + Math.floor(i / rows)]);
}
