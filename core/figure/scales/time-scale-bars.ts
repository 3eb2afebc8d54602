import { counted, formatNumber, formatSignificant } from "../format";
import { pathMark, rectanglePath, textMark } from "../marks";
import type { Mark } from "../scene";
import { fittingText } from "../text-width";
import { headingMark, missingPanel, type PanelMarks, subheadingMark } from "./cell-marks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { missingReason } from "./missing";

const heading = "Kinetic energy by time scale";

/** Shares of the kinetic energy in weeks, in months and beyond as three bars under their words. */
export function timeScaleBars(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, theme, sizes } = drawing;
  const { energy } = input.result;
  if (!energy) return missingPanel(cell, heading, missingReason(input.result, "period"), drawing);
  const [weeks, months] = [energy.weeksDays, energy.monthsDays].map((days) => formatSignificant(days, 4));
  const rows = [
    { id: "weeks", share: energy.weeksShare, texts: [`under ${counted(weeks, "day")}`] },
    { id: "months", share: energy.monthsShare, texts: [`${weeks} to ${counted(months, "day")}`] },
    {
      id: "longer",
      share: energy.longerShare,
      texts: [`over ${counted(months, "day")} and the mean`, `over ${counted(months, "day")}`],
    },
  ];
  const { small } = sizes;
  const { x, y, width, height } = cell.frame;
  const pitch = Math.min(height / rows.length, 5 * small);
  const bar = Math.max(5, Math.min(0.9 * small, pitch - 1.9 * small));
  const total = `${formatSignificant(energy.total * 1e4, 3)} cm² s⁻² in all`;
  const marks: Mark[] = rows.flatMap(({ id, share, texts }, index) => {
    const top = y + index * pitch;
    const value = `${formatNumber(100 * share, 0)} %`;
    const filled = Math.max(0, Math.min(1, share || 0)) * width;
    return [
      textMark(`time-scales-${id}`, x, top + small, fittingText(texts, width - 4 * small, small), {
        size: small,
        fill: theme.softInk,
      }),
      textMark(`time-scales-${id}-value`, x + width, top + small, value, {
        size: small,
        weight: 700,
        fill: theme.ink,
        anchor: "end",
      }),
      pathMark(`time-scales-${id}-track`, rectanglePath(x, top + 1.45 * small, width, bar), { fill: theme.panel }),
      pathMark(`time-scales-${id}-bar`, rectanglePath(x, top + 1.45 * small, filled, bar), { fill: theme.weakened }),
    ];
  });
  return {
    panels: [],
    marks: [
      headingMark(cell, [heading, "Energy by time scale"], drawing),
      subheadingMark(cell, [total], drawing),
      ...marks,
    ],
  };
}
