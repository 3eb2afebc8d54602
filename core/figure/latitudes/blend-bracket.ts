import type { Theme } from "../colour/theme";
import { linePath, pathMark } from "../marks";
import { pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { dataWidth } from "./axis-marks";
import type { RecordAxes } from "./input";

/** Left of the frame, inside the ticks' length. */
const bracketDrop = 3;

/** Whether any row's velocities come from the blend across the equator. */
export function hasBlend({ blendedRows }: RecordAxes): boolean {
  return blendedRows?.includes(1) ?? false;
}

/** A bracket on the map's left axis over each run of blended rows; nothing without them. */
export function blendMarks(record: RecordAxes, panel: PanelFrame, theme: Theme): Mark[] {
  const { blendedRows } = record;
  if (!blendedRows || !hasBlend(record)) return [];
  const centres = record.latitude.values;
  const edge = (row: number) => {
    if (row === 0) return panel.vertical.to;
    return row === centres.length ? panel.vertical.from : (centres[row - 1] + centres[row]) / 2;
  };
  let d = "";
  let start = -1;
  for (let row = 0; row <= centres.length; row++) {
    const isBlended = row < centres.length && blendedRows[row] === 1;
    if (isBlended && start < 0) start = row;
    if (isBlended || start < 0) continue;
    const [south, north] = [pixelY(panel, edge(start)), pixelY(panel, edge(row))];
    const x = panel.x - bracketDrop;
    d += linePath(x, south, x, north) + linePath(x, south, panel.x, south) + linePath(x, north, panel.x, north);
    start = -1;
  }
  return [pathMark("map-blended", d, { stroke: theme.ink, strokeWidth: dataWidth })];
}
