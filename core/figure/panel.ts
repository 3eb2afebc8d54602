import type { PanelFrame, PanelScale } from "./scene";

/** Where `value` lies along a scale: 0 at `from`, 1 at `to`, beyond them outside. NaN gives NaN. */
export function scalePosition(scale: PanelScale, value: number): number {
  if (scale.kind === "log") return Math.log(value / scale.from) / Math.log(scale.to / scale.from);
  return (value - scale.from) / (scale.to - scale.from);
}

/** Inverse of scalePosition. */
export function scaleValue(scale: PanelScale, position: number): number {
  if (scale.kind === "log") return scale.from * (scale.to / scale.from) ** position;
  return scale.from + (scale.to - scale.from) * position;
}

/** Pixel of a data value on the panel's horizontal scale. */
export function pixelX(panel: PanelFrame, value: number): number {
  return panel.x + panel.width * scalePosition(panel.horizontal, value);
}

/** Pixel of a data value on the panel's vertical scale. */
export function pixelY(panel: PanelFrame, value: number): number {
  return panel.y + panel.height * scalePosition(panel.vertical, value);
}

/** Data value under a pixel; inverse of pixelX. */
export function valueAtX(panel: PanelFrame, x: number): number {
  return scaleValue(panel.horizontal, (x - panel.x) / panel.width);
}

/** Data value under a pixel; inverse of pixelY. */
export function valueAtY(panel: PanelFrame, y: number): number {
  return scaleValue(panel.vertical, (y - panel.y) / panel.height);
}

/** The panel whose frame holds the pixel, its right and bottom edges included. */
export function panelAt(panels: readonly PanelFrame[], x: number, y: number): PanelFrame | undefined {
  return panels.find(
    (panel) => x >= panel.x && x <= panel.x + panel.width && y >= panel.y && y <= panel.y + panel.height,
  );
}
