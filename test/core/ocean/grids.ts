import type { GridAxes } from "../../../core/model/axis";
import { planDifferences } from "../../../core/numeric/differences";
import type { StencilPoints } from "../../../core/numeric/stencils";
import type { GeometrySettings, GridGeometry } from "../../../core/ocean/grid-geometry";

export const sphere: GeometrySettings = {
  stencil: 7,
  earth: "sphere",
  radius: 6371000,
  gravity: 9.81,
  omega: 7.292115e-5,
  equatorDegrees: 5,
};

/** An even latitude–longitude grid, cells at west + i · step and south + j · step. */
export function evenAxes(box: { west: number; south: number; step: number; columns: number; rows: number }): GridAxes {
  const line = (from: number, count: number) => Float64Array.from({ length: count }, (_, i) => from + i * box.step);
  return {
    latitude: { kind: "latitude", values: line(box.south, box.rows), step: box.step, even: true, periodic: false },
    longitude: {
      kind: "longitude",
      values: line(box.west, box.columns),
      step: box.step,
      even: true,
      periodic: Math.abs(box.columns * box.step - 360) < 1e-9,
    },
  };
}

/** A plane with constant Coriolis parameter, gravity and metric: where textbook eddies live. Centred on (0, 0). */
export function fPlane(options: {
  points: StencilPoints;
  cells: number;
  spacingMetres: number;
  coriolis: number;
  gravity: number;
}): GridGeometry & { x: Float64Array } {
  const { cells, spacingMetres, coriolis, gravity } = options;
  const x = Float64Array.from({ length: cells }, (_, i) => (i - (cells - 1) / 2) * spacingMetres);
  const plan = planDifferences({ coordinates: x, even: true, periodic: false, turn: Number.NaN }, options.points);
  const every = (value: number) => new Float64Array(cells).fill(value);
  return {
    x,
    rows: cells,
    columns: cells,
    latitude: every(45),
    alongRow: plan,
    alongColumn: plan,
    east: every(1),
    north: every(1),
    convergence: every(0),
    coriolis: every(coriolis),
    beta: every(0),
    gravity: every(gravity),
    blanked: new Uint8Array(cells),
    equatorBlend: null,
    equatorNote: "",
  };
}

/** A plane from a function of longitude and latitude in degrees. */
export function planeFrom(axes: GridAxes, value: (longitude: number, latitude: number) => number): Float64Array {
  const columns = axes.longitude.values.length;
  return Float64Array.from({ length: columns * axes.latitude.values.length }, (_, i) =>
    value(axes.longitude.values[i % columns], axes.latitude.values[Math.floor(i / columns)]),
  );
}
