import { dataWidth } from "../latitudes/axis-marks";
import { linePath, pathMark } from "../marks";
import { pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import type { Drawing } from "./input";

/** The latitude that the person holds, as an amber line through a panel with a latitude axis; nothing without one. */
export function heldMarks(panel: PanelFrame, { input, theme }: Drawing): Mark[] {
  const { heldLatitude } = input;
  if (heldLatitude === undefined) return [];
  const y = pixelY(panel, heldLatitude);
  if (!(y >= panel.y && y <= panel.y + panel.height)) return [];
  return [
    pathMark(`${panel.id}-held`, linePath(panel.x, y, panel.x + panel.width, y), {
      stroke: theme.amber,
      strokeWidth: dataWidth,
      clip: panel.id,
    }),
  ];
}
