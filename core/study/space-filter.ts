import type { GridAxes } from "../model/axis";
import { Fault } from "../model/errors";
import { loessSurface, removeLargeScale } from "../numeric/filters/loess-surface";
import { filterMeridional } from "../numeric/filters/meridional";
import { FilterRefusal } from "../numeric/filters/refusal";
import type { PlaneGeometry, WavelengthBand } from "../numeric/filters/spatial";
import { filterZonal } from "../numeric/filters/zonal";
import { removeZonalMean } from "../numeric/filters/zonal-mean";
import type { GridGeometry } from "../ocean/grid-geometry";
import type { SpaceSettings } from "./schema";

/**
 * The study's filters in space as one step over a height plane: large-scale surface off, zonal mean off, then the bands along
 * parallels and meridians. Every part is linear in height, so it changes places with filtering in time and differencing.
 * NaN cells stay NaN. Errors: Fault "band" where a wavelength does not fit the grid, thrown at the first plane.
 */
export function spaceFilter(
  settings: SpaceSettings,
  axes: GridAxes,
  geometry: GridGeometry,
): (plane: Float64Array) => Float64Array {
  const { meridional, zonal, removeSurface } = settings;
  const where = planeGeometry(axes, geometry);
  const steps: ((plane: Float64Array) => Float64Array)[] = [];
  if (removeSurface) {
    const spans = { eastKilometres: removeSurface.zonalKm, northKilometres: removeSurface.meridionalKm };
    steps.push((plane) => removeLargeScale(plane, loessSurface(plane, where, spans)));
  }
  if (settings.removeZonalMean) steps.push((plane) => removeZonalMean(plane, where.rows, where.columns, null, 0));
  if (zonal) steps.push((plane) => filterZonal(plane, where, bandOf(zonal)).values);
  if (meridional) steps.push((plane) => filterMeridional(plane, where, bandOf(meridional)).values);
  return (plane) => {
    try {
      const filtered = steps.reduce((current, step) => step(current), plane);
      // A filter could answer for a land cell from its neighbours; no cell without a height gets one.
      return steps.length === 0
        ? plane
        : filtered.map((value, cell) => (Number.isNaN(plane[cell]) ? Number.NaN : value));
    } catch (error) {
      if (!(error instanceof FilterRefusal)) throw error;
      throw new Fault({ ...error.parts, where: `space: ${error.parts.where}` }, { cause: error });
    }
  };
}

/** Whether a study filters heights in space at all. */
export function filtersInSpace({
  meridional,
  zonal,
  removeSurface,
  removeZonalMean: lessMean,
}: SpaceSettings): boolean {
  return meridional !== null || zonal !== null || removeSurface !== null || lessMean;
}

function bandOf(band: { readonly shortestKm: number | null; readonly longestKm: number | null }): WavelengthBand {
  return { shortestKilometres: band.shortestKm, longestKilometres: band.longestKm };
}

function planeGeometry({ latitude, longitude }: GridAxes, { rows, columns, north, east }: GridGeometry): PlaneGeometry {
  const degree = Math.PI / 180;
  const northMetres = new Float64Array(rows);
  for (let row = 1; row < rows; row++) {
    const step = (latitude.values[row] - latitude.values[row - 1]) * degree;
    northMetres[row] = northMetres[row - 1] + (step * (north[row] + north[row - 1])) / 2;
  }
  return {
    rows,
    columns,
    northMetres,
    eastSpacingMetres: east.map((metresPerRadian) => metresPerRadian * Math.abs(longitude.step) * degree),
    periodic: longitude.periodic,
  };
}
