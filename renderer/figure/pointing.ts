import { valueAtX, valueAtY } from "../../core/figure/panel";
import type { PanelFrame } from "../../core/figure/scene";

/** What a place in a panel stands for; null where the panel has no such axis. Days count from 1970-01-01. */
export interface Pointed {
  readonly panel: string;
  readonly latitude: number | null;
  readonly longitude: number | null;
  readonly day: number | null;
}

/** What the pixel (x, y) of a panel points at; pixels outside the frame count as the nearest one on its edge. */
export function pointAt(panel: PanelFrame, x: number, y: number): Pointed {
  const insideX = Math.min(panel.x + panel.width, Math.max(panel.x, x));
  const insideY = Math.min(panel.y + panel.height, Math.max(panel.y, y));
  const across = valueAtX(panel, insideX);
  return {
    panel: panel.id,
    latitude: panel.vertical.kind === "latitude" ? valueAtY(panel, insideY) : null,
    longitude: panel.horizontal.kind === "longitude" ? across : null,
    day: panel.horizontal.kind === "time" ? across : null,
  };
}
