import type { Theme } from "../colour/theme";
import { linePath, pathMark, rectanglePath, textMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import type { Tick } from "../ticks";
import { type TypeSizes, tickLabelDrop } from "./layout";

const tickLength = 4;
/** Lines of 0.75 pt and more survive print; the finest is used for frames. */
export const hairWidth = 1;
export const dataWidth = 1.4;

/** The panel's ground. Drawn first. */
export function groundMark(panel: PanelFrame, theme: Theme): Mark {
  const { x, y, width, height } = panel;
  return pathMark(`${panel.id}-ground`, rectanglePath(x, y, width, height), { fill: theme.panel });
}

/** The frame's line. Drawn last, over data that touches it. */
export function frameMark(panel: PanelFrame, theme: Theme): Mark {
  const { x, y, width, height } = panel;
  return pathMark(`${panel.id}-frame`, rectanglePath(x, y, width, height), {
    stroke: theme.rule,
    strokeWidth: hairWidth,
  });
}

/** Ticks and labels under a panel. Labels that would reach beyond `within` are left out, their ticks stay. */
export function bottomTickMarks(
  panel: PanelFrame,
  ticks: readonly Tick[],
  within: readonly [left: number, right: number],
  theme: Theme,
  sizes: TypeSizes,
): Mark[] {
  const bottom = panel.y + panel.height;
  const marks: Mark[] = [];
  let d = "";
  for (const [index, tick] of ticks.entries()) {
    const x = pixelX(panel, tick.value);
    d += linePath(x, bottom, x, bottom + tickLength);
    const half = textWidth(tick.label, sizes.small, 400) / 2;
    if (tick.label === "" || x - half < within[0] || x + half > within[1]) continue;
    marks.push(
      textMark(`${panel.id}-x-${index}`, x, bottom + tickLabelDrop(sizes), tick.label, {
        size: sizes.small,
        fill: theme.softInk,
        anchor: "middle",
      }),
    );
  }
  if (d !== "") marks.unshift(pathMark(`${panel.id}-x-ticks`, d, { stroke: theme.rule, strokeWidth: hairWidth }));
  return marks;
}

/** Ticks and labels left of a panel, centred on their values. */
export function leftTickMarks(panel: PanelFrame, ticks: readonly Tick[], theme: Theme, sizes: TypeSizes): Mark[] {
  const marks: Mark[] = [];
  let d = "";
  for (const [index, tick] of ticks.entries()) {
    const y = pixelY(panel, tick.value);
    d += linePath(panel.x - tickLength, y, panel.x, y);
    marks.push(
      textMark(`${panel.id}-y-${index}`, panel.x - tickLength - 4, y + 0.34 * sizes.small, tick.label, {
        size: sizes.small,
        fill: theme.softInk,
        anchor: "end",
      }),
    );
  }
  if (d !== "") marks.unshift(pathMark(`${panel.id}-y-ticks`, d, { stroke: theme.rule, strokeWidth: hairWidth }));
  return marks;
}

/** Whether the labels of `ticks`, centred under the panel, keep at least `gap` pixels apart. */
export function labelsKeepApart(panel: PanelFrame, ticks: readonly Tick[], size: number, gap: number): boolean {
  let lastRight = Number.NEGATIVE_INFINITY;
  for (const tick of ticks) {
    if (tick.label === "") continue;
    const half = textWidth(tick.label, size, 400) / 2;
    const x = pixelX(panel, tick.value);
    if (x - half < lastRight + gap) return false;
    lastRight = x + half;
  }
  return true;
}

/** More labels than this under one panel crowd it, however wide it is. Common practice, no source. */
export const mostLabels = 12;

/** The densest of the tick lists that `make` gives whose labels keep `gap` pixels apart. */
export function roomiestTicks(
  panel: PanelFrame,
  make: (most: number) => Tick[],
  sizes: TypeSizes,
  gap: number,
): Tick[] {
  for (let count = mostLabels; count >= 1; count--) {
    const ticks = make(count);
    if (labelsKeepApart(panel, ticks, sizes.small, gap)) return ticks;
  }
  return [];
}
