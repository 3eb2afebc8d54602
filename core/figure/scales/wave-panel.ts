import type { FrequencyWavenumber } from "../../model/scales-result";
import { paint } from "../colour/paint";
import { formatLatitude, formatSignificant } from "../format";
import { bottomTickMarks, dataWidth, frameMark, leftTickMarks } from "../latitudes/axis-marks";
import { polylinePath, rasterMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import { gatherCells } from "../resample";
import type { Mark, PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import type { Tick } from "../ticks";
import {
  casedLine,
  chipMarks,
  colourKey,
  headingMark,
  type LegendEntry,
  legendMarks,
  missingPanel,
  type PanelMarks,
} from "./cell-marks";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { decades, logLimits, logValues } from "./log-colours";
import { missingReason } from "./missing";
import { fitsAcross, fitsUp, outerEdges, reachAcross, shownCells } from "./spans";
import { wavelengthTicks } from "./wavelength-ticks";

const heading = "Frequency and wavelength of v";
const shortHeading = "Waves in v";
const beyondResolved = 0.6;
/** Frequencies are shown up to this many times the fastest free wave's, and up to where this share of the variance is met. */
const curveRoom = 2.5;
const shownShare = 0.9;

/** Spectrum of v along one latitude by zonal wavenumber and frequency, with what free waves obey. */
export function wavePanel(cell: Cell, drawing: Drawing): PanelMarks {
  const { input, sizes, theme } = drawing;
  const { frequencyWavenumber: found, alongLatitude } = input.result;
  const place = formatLatitude(alongLatitude, 1);
  if (!found) return missingPanel(cell, heading, missingReason(input.result, "waves"), drawing);
  const panel = waveFrame(cell, drawing, found);
  const { horizontal, vertical } = panel;
  const columns = shownCells(found.wavenumber, horizontal.from, horizontal.to, panel.width);
  const rows = shownCells(found.frequency, vertical.from, vertical.to, panel.height);
  const logs = logValues(found.density.values);
  const shown = gatherCells(logs, found.density.columns, rows, columns);
  const pixels = paint(shown, logLimits(logs), theme.sequential, { missing: theme.panel });
  const titles = [`${heading}, ${place}`, `${shortHeading}, ${place}`, shortHeading];
  const key = colourKey(cell, theme.sequential.table, [decades, "1"], titles, drawing);
  const legend: LegendEntry[] = [
    { id: "at-rest", text: "free waves at rest", short: "at rest", stroke: theme.amber, strokeWidth: dataWidth + 0.4 },
    {
      id: "in-flow",
      text: "in the flow",
      short: "in flow",
      stroke: theme.amber,
      strokeWidth: dataWidth + 0.4,
      dash: [4, 3],
    },
  ];
  const curves = found.curves.flatMap(({ id, wavenumber, frequency, meridionalWavelength }, index) => {
    const style = legend.find((entry) => entry.id === id) ?? legend[0];
    const even = !Number.isFinite(meridionalWavelength);
    return casedLine(
      `waves-curve-${index}`,
      polylinePath(
        wavenumber.map((value) => pixelX(panel, value)),
        frequency.map((value) => pixelY(panel, value)),
      ),
      { ...style, strokeWidth: even ? style.strokeWidth : 0.9 * dataWidth },
      panel.id,
      theme,
    );
  });
  return {
    panels: [panel],
    marks: [
      headingMark(cell, key.headings, drawing, key.taken),
      ...key.marks,
      ...legendMarks(cell, found.curves.length > 0 ? legend : [], drawing),
      rasterMark("waves-raster", panel, columns.length, rows.length, pixels),
      ...curves,
      ...directionMarks(panel, drawing),
      frameMark(panel, theme),
      ...bottomTickMarks(
        panel,
        wavelengthTicks(horizontal.from, horizontal.to, " km", fitsAcross(panel, drawing)),
        reachAcross(cell),
        theme,
        sizes,
      ),
      ...leftTickMarks(panel, frequencyTicks(panel, cell, drawing), theme, sizes),
    ],
  };
}

/** Which side moves which way, both or neither. */
function directionMarks(panel: PanelFrame, drawing: Drawing): Mark[] {
  const { small } = drawing.sizes;
  const words = textWidth("westward", small, 400) + textWidth("eastward", small, 400);
  if (words + 4 * small > panel.width) return [];
  return [
    ...chipMarks("waves-west", panel, "top left", "westward", drawing),
    ...chipMarks("waves-east", panel, "top right", "eastward", drawing),
  ];
}

function waveFrame(
  cell: Cell,
  { input }: Drawing,
  { wavenumber, frequency, density, curves }: FrequencyWavenumber,
): PanelFrame {
  const { resolvedWavelength, gridWavelength } = input.result.lengths;
  const [west, east] = outerEdges(wavenumber);
  const wanted = 1 / Math.max(beyondResolved * resolvedWavelength, gridWavelength || 0);
  const highest = Math.min(Math.max(-west, east), wanted || Number.POSITIVE_INFINITY);
  const atRest = curves.filter(({ id }) => id === "at-rest").flatMap((curve) => [...curve.frequency]);
  const fastest = curveRoom * Math.max(0, ...atRest.filter(Number.isFinite));
  const nyquist = outerEdges(frequency)[1];
  const top = Math.min(nyquist, Math.max(fastest, frequencyOfShare(frequency, density))) || 1;
  return {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "linear", from: -highest, to: highest },
    vertical: { kind: "linear", from: top, to: 0 },
  };
}

/** The frequency under which the share of the variance lies. */
function frequencyOfShare(frequency: Float64Array, { columns, values }: FrequencyWavenumber["density"]): number {
  const sums = Float64Array.from(frequency, (_, row) =>
    values.subarray(row * columns, (row + 1) * columns).reduce((sum, value) => sum + (value || 0), 0),
  );
  const all = sums.reduce((sum, value) => sum + value, 0);
  let met = 0;
  for (const [row, sum] of sums.entries()) {
    met += sum;
    if (met >= shownShare * all) return frequency[row];
  }
  return frequency[frequency.length - 1];
}

/** Frequencies labelled with periods in days. */
function frequencyTicks(panel: PanelFrame, cell: Cell, drawing: Drawing): Tick[] {
  const fits = fitsUp(panel, cell, drawing);
  for (const days of [720, 360, 180, 90, 60, 30, 20, 10, 5, 2, 1]) {
    if (panel.vertical.from * days > 12) continue;
    const ticks: Tick[] = [];
    for (let index = 1; index <= panel.vertical.from * days; index++) {
      ticks.push({ value: index / days, label: `${formatSignificant(days / index, 3)} d` });
    }
    if (fits(ticks)) return ticks;
  }
  return [];
}
