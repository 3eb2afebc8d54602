import type { Theme } from "../colour/theme";
import { displayUnits } from "../display-units";
import { formatSignificant } from "../format";
import { linePath, pathMark, polylinePath, rectanglePath, textMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { fittingText, textWidth } from "../text-width";
import { linearTicks, periodTicks, type Tick } from "../ticks";
import { bottomTickMarks, dataWidth, frameMark, groundMark, leftTickMarks } from "./axis-marks";
import { type LatitudesInput, shownBand } from "./input";
import type { Box, LatitudesLayout, TypeSizes } from "./layout";

const headroom = 1.14;
/** A band edge keeps at least this factor of period from the frame's side. */
const edgeRoom = 1.2;

/**
 * Horizontal: period in days, long to short, logarithmic. Vertical: frequency times density, SI units squared, so that equal
 * areas are equal variances.
 */
export function spectrumPanel(input: LatitudesInput, box: Box): PanelFrame {
  const [longest, shortest] = periodRange(input);
  const top = headroom * Math.max(...variances(input).filter(Number.isFinite), 0) || 1;
  return {
    id: "spectrum",
    ...box,
    horizontal: { kind: "log", from: longest, to: shortest },
    vertical: { kind: "linear", from: top, to: 0 },
  };
}

/** Frequency times density at each frequency; empty without a spectrum. */
function variances({ spectrum }: LatitudesInput): number[] {
  return spectrum ? Array.from(spectrum.frequency, (frequency, index) => frequency * spectrum.density[index]) : [];
}

/** Periods that the spectrum resolves (or the record, without one), widened to show both band edges. */
function periodRange(input: LatitudesInput): [longest: number, shortest: number] {
  const { spectrum, record } = input;
  const band = shownBand(input);
  const frequencies = spectrum?.frequency.filter((frequency) => frequency > 0) ?? new Float64Array(0);
  const times = record.time.values;
  const step = Math.abs(record.time.step) || 1;
  const span = Math.abs(times[times.length - 1] - times[0]) || 100 * step;
  const longest = frequencies.length > 0 ? 1 / frequencies[0] : span;
  const shortest = frequencies.length > 0 ? 1 / frequencies[frequencies.length - 1] : 2 * step;
  if (band.filter === "none") return [longest, shortest];
  return [
    Math.max(longest, (band.longestDays ?? 0) * edgeRoom),
    Math.min(shortest, (band.shortestDays ?? shortest * edgeRoom) / edgeRoom),
  ];
}

/** Labels of the vertical scale in display units; asked for before the layout, which leaves room for them. */
export function varianceTicks(panel: PanelFrame, input: LatitudesInput): Tick[] {
  if (!input.spectrum) return [];
  const { scale } = displayUnits(input.quantity.units);
  const unit = scale * scale;
  return linearTicks(0, panel.vertical.from * unit, 3).map(({ value }) => ({
    value: value / unit,
    label: formatSignificant(value, 3),
  }));
}

/** Variance by period in ink; the held pass band tinted, its edges in amber, as is the response of the result's filter. */
export function spectrumMarks(
  input: LatitudesInput,
  layout: LatitudesLayout,
  panel: PanelFrame,
  bandLabelBase: number,
  theme: Theme,
): Mark[] {
  const { from, to } = panel.horizontal;
  const leastGap = (6.2 * layout.sizes.small * Math.log(from / to)) / panel.width;
  const within = [0, panel.x + panel.width + layout.panelGap / 2] as const;
  const hasBand = shownBand(input).filter !== "none";
  const note = input.spectrum ? "" : (input.spectrumNote ?? "");
  const { frequency = new Float64Array(0) } = input.spectrum ?? {};
  const curve = polylinePath(
    Array.from(frequency, (value) => (value > 0 ? pixelX(panel, 1 / value) : Number.NaN)),
    variances(input).map((value) => pixelY(panel, value)),
  );
  return [
    groundMark(panel, theme),
    ...(hasBand ? [bandMark(input, panel, theme)] : []),
    ...(input.band.filter === "none" ? [] : [responseMark(input, panel, theme)]),
    pathMark("spectrum-line", curve, { stroke: theme.ink, strokeWidth: dataWidth, clip: panel.id }),
    ...(note === "" ? [] : [noteMark(note, input, panel, theme, layout.sizes)]),
    frameMark(panel, theme),
    ...(hasBand ? edgeMarks(input, panel, bandLabelBase, theme, layout.sizes) : []),
    ...leftTickMarks(panel, varianceTicks(panel, input), theme, layout.sizes),
    ...bottomTickMarks(panel, periodTicks(from, to, leastGap), within, theme, layout.sizes),
  ];
}

/** Why the curve is missing, where it would be: in the widest stretch that the band's edges leave free. */
function noteMark(note: string, input: LatitudesInput, panel: PanelFrame, theme: Theme, { small }: TypeSizes): Mark {
  const edges = shownBand(input).filter === "none" ? [] : edgePlaces(input, panel);
  const places = [panel.x, ...edges, panel.x + panel.width];
  const stretches = places.slice(1).map((right, index) => ({ left: places[index], width: right - places[index] }));
  const { left, width } = stretches.reduce((widest, each) => (each.width > widest.width ? each : widest));
  const text = fittingText([note, "No spectrum"], width - 2 * small, small);
  const [x, y] = [left + width / 2, panel.y + panel.height / 2 + 0.34 * small];
  return textMark("spectrum-note", x, y, text, { size: small, fill: theme.softInk, anchor: "middle" });
}

/** Pixels of the band's edges; an open side lies on the frame. */
function edgePlaces(input: LatitudesInput, panel: PanelFrame): [left: number, right: number] {
  const { from, to } = panel.horizontal;
  const band = shownBand(input);
  return [pixelX(panel, band.longestDays ?? from), pixelX(panel, band.shortestDays ?? to)];
}

function bandMark(input: LatitudesInput, panel: PanelFrame, theme: Theme): Mark {
  const [left, right] = edgePlaces(input, panel);
  return pathMark("spectrum-band", rectanglePath(left, panel.y, right - left, panel.height), {
    fill: theme.amberTint,
    clip: panel.id,
  });
}

function responseMark(input: LatitudesInput, panel: PanelFrame, theme: Theme): Mark {
  const { frequency, amplitude } = input.result.response;
  const passed = panel.vertical.from / headroom;
  const response = polylinePath(
    Array.from(frequency, (value) => (value > 0 ? pixelX(panel, 1 / value) : Number.NaN)),
    Array.from(amplitude, (value) => pixelY(panel, value * passed)),
  );
  return pathMark("spectrum-response", response, {
    stroke: theme.amber,
    strokeWidth: dataWidth,
    dash: [1.5, 3],
    clip: panel.id,
  });
}

/** Lines at both edges of the band and their periods above the frame, outside the band; joined where they would meet. */
function edgeMarks(input: LatitudesInput, panel: PanelFrame, base: number, theme: Theme, sizes: TypeSizes): Mark[] {
  const { longestDays, shortestDays } = shownBand(input);
  const [left, right] = edgePlaces(input, panel);
  const bottom = panel.y + panel.height;
  const lines = linePath(left, panel.y - 4, left, bottom) + linePath(right, panel.y - 4, right, bottom);
  const style = { size: sizes.small, weight: 700, fill: theme.amberInk } as const;
  const longText = longestDays === null ? "open" : `${formatSignificant(longestDays, 4)} d`;
  const shortText = shortestDays === null ? "open" : `${formatSignificant(shortestDays, 4)} d`;
  const leftEnd = Math.max(left - 5, 4 + textWidth(longText, sizes.small, 700));
  const rightStart = Math.min(right + 5, panel.x + panel.width - textWidth(shortText, sizes.small, 700));
  const edges = pathMark("spectrum-edges", lines, { stroke: theme.amber, strokeWidth: dataWidth + 0.4 });
  if (leftEnd + 4 > rightStart) {
    const text = `${shortText.replace(" d", "")}–${longText}`;
    const half = textWidth(text, sizes.small, 700) / 2;
    const middle = Math.min(panel.x + panel.width - half, Math.max(panel.x + half, (left + right) / 2));
    return [edges, textMark("spectrum-periods", middle, base, text, { ...style, anchor: "middle" })];
  }
  return [
    edges,
    textMark("spectrum-longest", leftEnd, base, longText, { ...style, anchor: "end" }),
    textMark("spectrum-shortest", rightStart, base, shortText, style),
  ];
}
