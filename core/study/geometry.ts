import type { GridAxes } from "../model/axis";
import { type GridGeometry, gridGeometry } from "../ocean/grid-geometry";
import type { GeostrophySettings } from "./schema";

/** Geometry of a grid under a study's conventions. Errors: see gridGeometry. */
export function geometryOf(axes: GridAxes, settings: GeostrophySettings): GridGeometry {
  const { blendScaleDegrees, blendWidthDegrees, ...shared } = settings;
  return gridGeometry(
    axes,
    { ...shared, equatorBlend: { lengthScaleDegrees: blendScaleDegrees, widthDegrees: blendWidthDegrees } },
    "geostrophy",
  );
}
