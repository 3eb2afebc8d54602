import type { EnergyPlane } from "../../model/scales-result";
import { paint } from "../colour/paint";
import { formatNumber, formatSignificant } from "../format";
import { bottomTickMarks, dataWidth, frameMark, leftTickMarks } from "../latitudes/axis-marks";
import { polylinePath, rasterMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import { gatherCells } from "../resample";
import type { PanelFrame } from "../scene";
import {
  casedLine,
  chipMarks,
  colourKey,
  headingMark,
  missingPanel,
  type PanelMarks,
  subheadingMark,
} from "./cell-marks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { decades, logLimits, logValues } from "./log-colours";
import { missingReason } from "./missing";
import { fitsAcross, fitsUp, reachAcross, shownCells } from "./spans";
import { wavelengthTicks } from "./wavelength-ticks";

const heading = "Kinetic energy by wavenumber";
const headings = [heading, "Energy by wavenumber", "Kinetic energy"];
/** The picture reaches this far below what the mapping resolves. */
const beyondResolved = 0.6;
/** What must be seen keeps at least this much room. */
const room = 1.15;
/** Cells within this many decades of the greatest must be seen. */
const heldDecades = 2.5;

/** Kinetic energy over zonal and meridional wavenumber, one scale for both, with the boundary of waves and turbulence. */
export function energyPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const { plane } = input.result;
  if (!plane) return missingPanel(cell, heading, missingReason(input.result, "plane"), drawing);
  const logs = logValues(plane.density.values);
  const limits = logLimits(logs);
  const panel = energyFrame(cell, drawing, plane, energeticReach(plane, logs, limits[1] - heldDecades));
  const { horizontal, vertical } = panel;
  const columns = shownCells(plane.zonal, horizontal.from, horizontal.to, panel.width);
  const rows = shownCells(plane.meridional, vertical.from, vertical.to, panel.height);
  const shown = gatherCells(logs, plane.density.columns, rows, columns);
  const pixels = paint(shown, limits, theme.sequential, { missing: theme.panel });
  const key = colourKey(cell, theme.sequential.table, [decades, "1"], headings, drawing);
  const line = { stroke: theme.amber, strokeWidth: dataWidth + 0.4 };
  const side = (sign: 1 | -1) =>
    polylinePath(
      plane.boundary.zonal.map((value) => pixelX(panel, sign * value)),
      plane.boundary.meridional.map((value) => pixelY(panel, value)),
    );
  const across = wavelengthTicks(horizontal.from, horizontal.to, " km", fitsAcross(panel, drawing));
  const up = wavelengthTicks(vertical.from, vertical.to, "", fitsUp(panel, cell, drawing));
  const share = `${formatNumber(100 * plane.shareInside, 0)} % inside`;
  const speed = `U ${formatSignificant(100 * plane.speed, 2)} cm s⁻¹`;
  return {
    panels: [panel],
    marks: [
      headingMark(cell, key.headings, drawing, key.taken),
      ...key.marks,
      subheadingMark(
        cell,
        [
          `${share} the line K² = (β/U) cos θ, ${speed}`,
          `${share} K² = (β/U) cos θ, ${speed}`,
          `${share} K² = (β/U) cos θ`,
          `${share} the line`,
        ],
        drawing,
      ),
      rasterMark("energy-raster", panel, columns.length, rows.length, pixels),
      ...casedLine("energy-boundary", side(1) + side(-1), line, panel.id, theme),
      ...chipMarks("energy-words", panel, "bottom left", "waves inside, turbulence outside", drawing),
      frameMark(panel, theme),
      ...bottomTickMarks(panel, across, reachAcross(cell), theme, sizes),
      ...leftTickMarks(panel, up, theme, sizes),
    ],
  };
}

/** Frame with the same cycles a metre in a pixel both ways; it holds the boundary and all energy that counts. */
function energyFrame(cell: Cell, { input }: Drawing, plane: EnergyPlane, energetic: number): PanelFrame {
  const { resolvedWavelength, gridWavelength } = input.result.lengths;
  const { meridional, boundary } = plane;
  const finest = 1 / Math.max(beyondResolved * resolvedWavelength, gridWavelength || 0);
  const curve = [...boundary.zonal, ...boundary.meridional].map(Math.abs).filter(Number.isFinite);
  const nyquist = meridional[meridional.length - 1];
  const highest = room * Math.max(0, ...curve, Math.min(energetic, finest || energetic)) || nyquist || 1;
  const { width, height } = cell.frame;
  const perPixel = (2 * highest) / Math.min(width, height);
  const [x, y] = [(perPixel * width) / 2, (perPixel * height) / 2];
  return {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "linear", from: -x, to: x },
    vertical: { kind: "linear", from: y, to: -y },
  };
}

/** Greatest wavenumber along either axis at which the logarithm of density is above `least`. */
function energeticReach({ zonal, meridional, density }: EnergyPlane, logs: Float32Array, least: number): number {
  let reach = 0;
  for (let row = 0; row < density.rows; row++) {
    for (let column = 0; column < density.columns; column++) {
      if (!(logs[row * density.columns + column] > least)) continue;
      reach = Math.max(reach, Math.abs(zonal[column]), Math.abs(meridional[row]));
    }
  }
  return reach;
}
