import type { Theme } from "../colour/theme";
import { linePath, pathMark, rectanglePath } from "../marks";
import { pixelX } from "../panel";
import { usualSpacing } from "../resample";
import type { Mark, PanelFrame } from "../scene";
import { dataWidth, frameMark, groundMark } from "./axis-marks";
import { bridgedGaps } from "./bridged-gaps";
import { isFiltered, type LatitudesInput } from "./input";
import { timeScale } from "./latitude-time-panel";
import type { Box } from "./layout";

/** A lone missing day in thirty years must still be seen. */
const leastGapPixels = 2;

/** Shares the time scale of the picture above it; vertical: share of the ocean with values, 0 to 1. */
export function daysPanel(input: LatitudesInput, box: Box): PanelFrame {
  return {
    id: "days",
    ...box,
    horizontal: timeScale(input),
    vertical: { kind: "linear", from: 1, to: 0 },
  };
}

/** Gaps that the filter bridges take up this share of the strip, at its foot. */
const bridgedShare = 0.4;

/** 1 on dates in gaps that the filter bridges; none where the values shown went through no filter. */
export function bridgedDates(input: LatitudesInput): Uint8Array {
  const { hasData, time } = input.record;
  return bridgedGaps(hasData, Math.abs(time.step), isFiltered(input) ? (input.band.bridgeDays ?? 0) : 0);
}

/**
 * Coverage by date as a grey area; filter ends shaded; dates without data and holes between dates in red-brown, low where the gap is bridged; the
 * map's date in amber.
 */
export function daysMarks(input: LatitudesInput, panel: PanelFrame, theme: Theme): Mark[] {
  const { hasData, coverage, time } = input.record;
  const { filterEnd, dateIndex } = input.result;
  const { y, height } = panel;
  const bridged = bridgedDates(input);
  const rectangles = (test: (date: number) => boolean, least: number, share = 1) =>
    dateRuns(panel, input, test)
      .map(([left, right]) => {
        const width = Math.max(least, right - left);
        const x = Math.min(left, panel.x + panel.width - width);
        return rectanglePath(x, y + (1 - share) * height, width, share * height);
      })
      .join("");
  const holes = timeHoles(time.values)
    .map(([start, end]) => {
      const [left, right] = [pixelX(panel, start), pixelX(panel, end)].sort((a, b) => a - b);
      const width = Math.max(leastGapPixels, right - left);
      return rectanglePath(Math.min(left, panel.x + panel.width - width), y, width, height);
    })
    .join("");
  const x = pixelX(panel, time.values[dateIndex]);
  return [
    groundMark(panel, theme),
    pathMark(
      "days-data",
      time.even ? coveragePath(panel, coverage) : unevenCoveragePath(panel, time.values, coverage),
      { fill: theme.data, clip: panel.id },
    ),
    pathMark(
      "days-weakened",
      rectangles((date) => filterEnd[date] === 1, 0),
      { fill: theme.weakened, clip: panel.id },
    ),
    pathMark(
      "days-gaps",
      rectangles((date) => hasData[date] === 0 && bridged[date] === 0, leastGapPixels),
      { fill: theme.gap, clip: panel.id },
    ),
    ...(holes === "" ? [] : [pathMark("days-holes", holes, { fill: theme.gap, clip: panel.id })]),
    pathMark(
      "days-bridged",
      rectangles((date) => bridged[date] === 1, leastGapPixels, bridgedShare),
      { fill: theme.gap, clip: panel.id },
    ),
    frameMark(panel, theme),
    pathMark("days-date", linePath(x, y - 4, x, y + height + 4), { stroke: theme.amber, strokeWidth: dataWidth + 0.4 }),
  ];
}

/** A longer way between two dates is a hole, as in the picture above. */
const mostSteps = 1.5;

/** Stretches without a date, half a usual step from the dates beside them; in the axis's own units and order. */
function timeHoles(times: Float64Array): [start: number, end: number][] {
  const usual = usualSpacing(times);
  const half = (Math.sign(times[times.length - 1] - times[0]) * usual) / 2;
  const holes: [number, number][] = [];
  for (let date = 1; date < times.length; date++) {
    if (Math.abs(times[date] - times[date - 1]) <= mostSteps * usual) continue;
    holes.push([times[date - 1] + half, times[date] - half]);
  }
  return holes;
}

/** Left and right pixels of every unbroken run of dates that pass the test. */
function dateRuns(panel: PanelFrame, input: LatitudesInput, test: (date: number) => boolean): [number, number][] {
  const times = input.record.time.values;
  const count = times.length;
  const edge = (date: number) => {
    if (date === 0) return panel.x;
    return date === count ? panel.x + panel.width : pixelX(panel, (times[date - 1] + times[date]) / 2);
  };
  const runs: [number, number][] = [];
  let start = -1;
  for (let date = 0; date <= count; date++) {
    const passes = date < count && test(date);
    if (passes && start < 0) start = date;
    if (!passes && start >= 0) {
      runs.push([edge(start), edge(date)]);
      start = -1;
    }
  }
  return runs;
}

/** Stepped area under the coverage of dates at uneven distances: each reaches half way to its neighbours. */
function unevenCoveragePath(panel: PanelFrame, times: Float64Array, coverage: Float64Array): string {
  const bottom = panel.y + panel.height;
  const hundredth = (pixel: number) => Math.round(100 * pixel) / 100;
  let d = `M${panel.x} ${bottom}`;
  for (const [date, share] of coverage.entries()) {
    const isLast = date === times.length - 1;
    const right = isLast ? panel.x + panel.width : pixelX(panel, (times[date] + times[date + 1]) / 2);
    d += `V${hundredth(bottom - panel.height * (share || 0))}H${hundredth(right)}`;
  }
  return `${d}V${bottom}Z`;
}

/** Stepped area under the coverage: a step a date, or a step a pixel (the mean of its dates) where dates are finer. */
function coveragePath(panel: PanelFrame, coverage: Float64Array): string {
  const steps = Math.min(coverage.length, Math.round(panel.width));
  const bottom = panel.y + panel.height;
  let d = `M${panel.x} ${bottom}`;
  for (let step = 0; step < steps; step++) {
    const first = Math.floor((step * coverage.length) / steps);
    const end = Math.max(first + 1, Math.floor(((step + 1) * coverage.length) / steps));
    let sum = 0;
    for (let date = first; date < end; date++) sum += coverage[date] || 0;
    const top = Math.round(100 * (bottom - (panel.height * sum) / (end - first))) / 100;
    const right = Math.round(100 * (panel.x + (panel.width * (step + 1)) / steps)) / 100;
    d += `V${top}H${right}`;
  }
  return `${d}V${bottom}Z`;
}
