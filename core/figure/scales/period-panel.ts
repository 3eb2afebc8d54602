import type { PeriodSpectrum } from "../../model/scales-result";
import { formatNumber } from "../format";
import { bottomTickMarks, dataWidth, frameMark, groundMark, leftTickMarks } from "../latitudes/axis-marks";
import { pathMark, polylinePath, rectanglePath } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import { periodTicks } from "../ticks";
import { headingMark, missingPanel, type PanelMarks, subheadingMark } from "./cell-marks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { missingReason } from "./missing";
import { reachAcross } from "./spans";
import { varianceTicks } from "./wavelength-panel";

const heading = "Periods of u";
const headroom = 1.1;
/** Limits higher than this many times the curve's top are cut off, so that the curve stays readable. */
const mostReach = 1.3;

/** Variance-preserving spectrum of u by period, the 95 % limits of one cell's spectrum at its peak. */
export function periodPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const { period } = input.result;
  if (!period) return missingPanel(cell, heading, missingReason(input.result, "period"), drawing);
  const kept = [...period.frequency.keys()].filter((k) => period.frequency[k] > 0);
  const periods = Float64Array.from(kept, (k) => 1 / period.frequency[k]);
  const values = Float64Array.from(kept, (k) => period.frequency[k] * period.density[k]);
  const top = Math.max(0, ...values) * Math.min(mostReach, Math.max(1, period.highFactor || 1));
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "log", from: periods[0], to: periods[periods.length - 1] },
    vertical: { kind: "linear", from: headroom * top || 1, to: 0 },
  };
  const { from, to } = panel.horizontal;
  const xs = periods.map((value) => pixelX(panel, value));
  const ys = (factor: number) => values.map((value) => pixelY(panel, factor * value));
  const leastGap = (1.6 * textWidth("730 d", sizes.small, 400) * Math.log(from / to)) / panel.width;
  const factors = `95 %, ×${formatNumber(period.lowFactor, 1)} to ×${formatNumber(period.highFactor, 1)}`;
  const hasLimits = period.highFactor > period.lowFactor;
  return {
    panels: [panel],
    marks: [
      headingMark(cell, [`${heading}, cm² s⁻²`, heading], drawing),
      subheadingMark(
        cell,
        hasLimits ? [`variance preserving; grey: ${factors}`, `grey: ${factors}`, factors] : ["variance preserving"],
        drawing,
      ),
      groundMark(panel, theme),
      ...(hasLimits ? limitMarks(panel, period, xs, values, drawing) : []),
      pathMark("period-line", polylinePath(xs, ys(1)), {
        stroke: theme.ink,
        strokeWidth: dataWidth,
        clip: panel.id,
      }),
      frameMark(panel, theme),
      ...leftTickMarks(panel, varianceTicks(panel, cell, drawing), theme, sizes),
      ...bottomTickMarks(panel, periodTicks(from, to, leastGap), reachAcross(cell), theme, sizes),
    ],
  };
}

/** The 95 % limits of the highest value as one upright bar: for the others they are as far apart on a scale of factors. */
function limitMarks(
  panel: PanelFrame,
  { lowFactor, highFactor }: PeriodSpectrum,
  xs: Float64Array,
  values: Float64Array,
  { sizes, theme }: Drawing,
): Mark[] {
  const best = values.reduce((top, value, k) => (value > values[top] ? k : top), 0);
  const x = xs[best];
  const [bottom, top] = [lowFactor, highFactor].map((factor) => pixelY(panel, factor * values[best]));
  const half = 0.35 * sizes.small;
  return [
    pathMark("period-limits", rectanglePath(x - half, top, 2 * half, bottom - top), {
      fill: theme.spread,
      clip: panel.id,
    }),
  ];
}
