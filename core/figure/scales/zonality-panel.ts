import { bottomTickMarks, dataWidth, frameMark, groundMark, hairWidth, leftTickMarks } from "../latitudes/axis-marks";
import { linePath, pathMark, polylinePath, rectanglePath } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import { linearTicks, niceStep, type Tick } from "../ticks";
import { headingMark, missingPanel, type PanelMarks, subheadingMark } from "./cell-marks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { labelsUp, reachAcross } from "./spans";

const heading = "Zonality against averaging time";
const dot = 5;

/** Share by which eastward variance exceeds northward, against the length of the averages it is taken of. */
export function zonalityPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const { days, zonality } = input.result.zonality;
  const finite = zonality.filter(Number.isFinite);
  if (finite.length === 0) return missingPanel(cell, heading, "The record is too short for averages.", drawing);
  const [lowest, highest] = [Math.min(0, ...finite), Math.max(0, ...finite)];
  const step = niceStep((highest - lowest) * 1.1 || 1, 5);
  const room = days[days.length - 1] > days[0] ? 1.25 : 2;
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "log", from: days[0] / room, to: days[days.length - 1] * room },
    vertical: {
      kind: "linear",
      from: Math.min(1.05, step * Math.ceil((highest + 0.1 * (highest - lowest)) / step)) || 1,
      to: lowest < 0 ? Math.max(-1.05, -step * Math.ceil(-lowest / step)) : 0,
    },
  };
  const xs = days.map((value) => pixelX(panel, value));
  const ys = zonality.map((value) => pixelY(panel, value));
  const zero = pixelY(panel, 0);
  return {
    panels: [panel],
    marks: [
      headingMark(cell, [heading, "Zonality"], drawing),
      subheadingMark(
        cell,
        [
          "(u² − v²) / (u² + v²) of averages over so many days",
          "(u² − v²) / (u² + v²) of averages",
          "(u² − v²) / (u² + v²)",
        ],
        drawing,
      ),
      groundMark(panel, theme),
      pathMark("zonality-zero", linePath(panel.x, zero, panel.x + panel.width, zero), {
        stroke: theme.rule,
        strokeWidth: hairWidth,
        clip: panel.id,
      }),
      pathMark("zonality-line", polylinePath(xs, ys), { stroke: theme.ink, strokeWidth: dataWidth, clip: panel.id }),
      pathMark("zonality-dots", dots(xs, ys), { fill: theme.ink }),
      frameMark(panel, theme),
      ...leftTickMarks(
        panel,
        linearTicks(panel.vertical.to, panel.vertical.from, Math.min(5, labelsUp(cell, drawing))),
        theme,
        sizes,
      ),
      ...bottomTickMarks(panel, dayTicks(days, panel, sizes.small), reachAcross(cell), theme, sizes),
    ],
  };
}

function dots(xs: Float64Array, ys: Float64Array): string {
  return [...xs.keys()]
    .filter((i) => Number.isFinite(ys[i]))
    .map((i) => rectanglePath(xs[i] - dot / 2, ys[i] - dot / 2, dot, dot))
    .join("");
}

/** A mark for each averaging time; labels from the longest down where they keep apart. */
function dayTicks(days: Float64Array, panel: PanelFrame, size: number): Tick[] {
  let next = Number.POSITIVE_INFINITY;
  return [...days]
    .reverse()
    .map((value) => {
      const label = `${value < 10 ? Math.round(10 * value) / 10 : Math.round(value)} d`;
      const half = textWidth(label, size, 400) / 2;
      const x = pixelX(panel, value);
      if (x + half + 0.8 * size > next) return { value, label: "" };
      next = x - half;
      return { value, label };
    })
    .reverse();
}
