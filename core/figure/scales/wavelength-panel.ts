import type { WavenumberCurve } from "../../model/scales-result";
import { formatNumber } from "../format";
import { bottomTickMarks, dataWidth, frameMark, groundMark, leftTickMarks } from "../latitudes/axis-marks";
import { linePath, pathMark, polylinePath, rectanglePath, textMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import { linearTicks } from "../ticks";
import { headingMark, type LegendEntry, legendMarks, missingPanel, type PanelMarks } from "./cell-marks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { missingReason } from "./missing";
import { rhinesTitle, rhinesWavelength } from "./rhines";
import { fitsUp, labelsUp, reachAcross } from "./spans";
import { logWavelengthTicks } from "./wavelength-ticks";

const heading = "Meridional wavelengths of u";
/** cm² s⁻² in m² s⁻². */
const scale = 1e4;
/** A curve whose top is below this share of the highest one would be lost on a common scale. */
const leastShare = 0.15;
const headroom = 1.06;
/** The curves end at this share of what the mapping resolves, or at what the grid does. */
const beyondResolved = 0.35;

interface Curve extends LegendEntry {
  readonly wavelengths: Float64Array;
  /** Wavenumber times density, m2 s-2. */
  readonly values: Float64Array;
}

/** Variance-preserving spectra of u along meridians by wavelength, with the lengths that they are held against. */
export function wavelengthPanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const curves = curvesOf(drawing);
  if (curves.length === 0) return missingPanel(cell, heading, missingReason(input.result, "space"), drawing);
  const [longest, shortest] = range(curves, drawing);
  const tops = curves.map(({ wavelengths, values }) =>
    values.reduce((most, value, i) => (wavelengths[i] >= shortest && value > most ? value : most), 0),
  );
  const common = Math.max(...tops);
  const ownScales = tops.some((top) => top < leastShare * common);
  const labels = lengthLabels(drawing);
  const labelRoom = (labels.length * 1.5 + 0.5) * sizes.small;
  const share = Math.max(0.35, 1 - labelRoom / cell.frame.height);
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "log", from: longest, to: shortest },
    vertical: { kind: "linear", from: (headroom * ((ownScales ? 1 : common) || 1)) / share, to: 0 },
  };
  const units = ownScales ? "each scaled to its peak" : "cm² s⁻²";
  const leastGap = (1.4 * textWidth("1000 km", sizes.small, 400) * Math.log(longest / shortest)) / panel.width;
  return {
    panels: [panel],
    marks: [
      headingMark(cell, [`${heading}, ${units}`, `Wavelengths of u, ${units}`, "Wavelengths of u"], drawing),
      ...legendMarks(cell, curves, drawing),
      groundMark(panel, theme),
      ...spreadMark(panel, drawing),
      ...curves.map(({ id, stroke, strokeWidth, dash, wavelengths, values }, index) =>
        pathMark(
          `wavelengths-${id}`,
          polylinePath(
            wavelengths.map((value) => pixelX(panel, value)),
            values.map((value) => pixelY(panel, ownScales ? value / tops[index] : value)),
          ),
          { stroke, strokeWidth, ...(dash ? { dash } : {}), clip: panel.id },
        ),
      ),
      ...labelMarks(panel, labels, drawing),
      frameMark(panel, theme),
      ...(ownScales ? [] : leftTickMarks(panel, varianceTicks(panel, cell, drawing), theme, sizes)),
      ...bottomTickMarks(panel, logWavelengthTicks(longest, shortest, leastGap), reachAcross(cell), theme, sizes),
    ],
  };
}

/** Ticks of a variance in cm² s⁻² on a vertical scale in m2 s-2. */
export function varianceTicks(panel: PanelFrame, cell: Cell, drawing: Drawing) {
  for (let most = Math.floor(labelsUp(cell, drawing)); most > 0; most--) {
    const ticks = linearTicks(0, panel.vertical.from * scale, most).map(({ value, label }) => ({
      value: value / scale,
      label,
    }));
    if (fitsUp(panel, cell, drawing)(ticks)) return ticks;
  }
  return [];
}

function curvesOf({ input, theme }: Drawing): Curve[] {
  const { eachMap, timeMean, inBand } = input.result.meridional;
  const entries: [WavenumberCurve | null, LegendEntry][] = [
    [eachMap, { id: "each-map", text: "each map", short: "maps", stroke: theme.hatch, strokeWidth: dataWidth + 0.4 }],
    [timeMean, { id: "time-mean", text: "time mean", short: "mean", stroke: theme.ink, strokeWidth: dataWidth }],
    [
      inBand,
      { id: "in-band", text: "in the band", short: "band", stroke: theme.ink, strokeWidth: dataWidth, dash: [4, 2.5] },
    ],
  ];
  return entries.flatMap(([curve, legend]) => {
    if (!curve) return [];
    const kept = [...curve.wavenumber.keys()].filter((k) => curve.wavenumber[k] > 0);
    return [
      {
        ...legend,
        wavelengths: Float64Array.from(kept, (k) => 1 / curve.wavenumber[k]),
        values: Float64Array.from(kept, (k) => curve.wavenumber[k] * curve.density[k]),
      },
    ];
  });
}

function range(curves: readonly Curve[], { input }: Drawing): [longest: number, shortest: number] {
  const all = curves.flatMap(({ wavelengths }) => [...wavelengths]);
  const { resolvedWavelength, gridWavelength } = input.result.lengths;
  const end = Math.max(beyondResolved * resolvedWavelength, gridWavelength || 0);
  const [longest, shortest] = [Math.max(...all), Math.max(Math.min(...all), end || 0)];
  return longest > shortest ? [longest, shortest] : [2 * longest, longest / 2];
}

interface LengthLabel {
  readonly id: string;
  readonly value: number;
  /** The longest first. */
  readonly texts: readonly string[];
  readonly fill: string;
  readonly dash: readonly number[];
}

/** Marked wavelengths from long to short. */
function lengthLabels({ input, theme }: Drawing): LengthLabel[] {
  const { lengths } = input.result;
  const spacing = lengths.meanSpacing > 0 ? lengths.meanSpacing : lengths.bandSpacing;
  const km = (value: number) => `${formatNumber(value / 1000, 0)} km`;
  const peak = lengths.peakWavelength.value;
  const rhines = rhinesWavelength(lengths);
  return [
    { id: "peak", value: peak, texts: [`peak ${km(peak)}`], fill: theme.softInk, dash: [2, 2] },
    {
      id: "spacing",
      value: spacing,
      texts: [`jet spacing ${km(spacing)}`, `spacing ${km(spacing)}`],
      fill: theme.ink,
      dash: [5, 3],
    },
    { id: "rhines", value: rhines, texts: [`${rhinesTitle} ${km(rhines)}`], fill: theme.amberInk, dash: [5, 3] },
  ]
    .filter(({ value }) => value > 0)
    .sort((a, b) => b.value - a.value);
}

/** 95 % limits of the peak. */
function spreadMark(panel: PanelFrame, { input, theme }: Drawing): Mark[] {
  const { low95, high95 } = input.result.lengths.peakWavelength;
  if (!(high95 > low95)) return [];
  const { from: longest, to: shortest } = panel.horizontal;
  const [left, right] = [Math.min(high95, longest), Math.max(low95, shortest)].map((value) => pixelX(panel, value));
  if (right <= left) return [];
  const box = rectanglePath(left, panel.y, right - left, panel.height);
  return [pathMark("wavelengths-peak-spread", box, { fill: theme.spread, clip: panel.id })];
}

/**
 * Dashed lines, each under its own label: the longest wavelength's label stands highest and to the right of its line, so that
 * no line runs through another one's words.
 */
function labelMarks(panel: PanelFrame, labels: readonly LengthLabel[], { sizes, theme }: Drawing): Mark[] {
  const { small } = sizes;
  const bottom = panel.y + panel.height;
  return labels.flatMap(({ id, value, texts, fill, dash }, index) => {
    const x = pixelX(panel, value);
    if (!(x > panel.x) || x > panel.x + panel.width) return [];
    const top = panel.y + 0.4 * small + 1.5 * index * small;
    const right = panel.x + panel.width - 4;
    const text = texts.find((each) => x + 5 + textWidth(each, small, 400) <= right) ?? texts[texts.length - 1];
    const width = textWidth(text, small, 400);
    const left = Math.max(panel.x + 3, Math.min(x + 5, right - width));
    return [
      pathMark(`wavelengths-${id}`, linePath(x, top, x, bottom), {
        stroke: id === "rhines" ? theme.amber : fill,
        strokeWidth: dataWidth,
        dash,
        clip: panel.id,
      }),
      pathMark(`wavelengths-${id}-ground`, rectanglePath(left - 2, top, width + 4, 1.25 * small), {
        fill: theme.panel,
      }),
      textMark(`wavelengths-${id}-label`, left, top + 0.95 * small, text, { size: small, fill }),
    ];
  });
}
