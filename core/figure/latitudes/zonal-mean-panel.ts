import type { Theme } from "../colour/theme";
import { displayUnits } from "../display-units";
import { bandPath, linePath, pathMark, polylinePath } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import { fewestTicks, linearTicks, type Tick } from "../ticks";
import {
  bottomTickMarks,
  dataWidth,
  frameMark,
  groundMark,
  hairWidth,
  labelsKeepApart,
  roomiestTicks,
} from "./axis-marks";
import { errorsWithin95 } from "./doubtful-cells";
import type { LatitudesInput } from "./input";
import type { LatitudesLayout } from "./layout";
import { latitudeScale } from "./map-panel";

/** Room beside the widest excursion, as a share of it. */
const headroom = 1.08;

/** The horizontal scale is in SI units: symmetric about zero for a signed quantity, from zero for a magnitude. */
export function zonalMeanPanel(input: LatitudesInput, layout: LatitudesLayout): PanelFrame {
  const reach = headroom * widestExcursion(input) || 1;
  const lower = input.quantity.signed ? -reach : 0;
  return {
    id: "zonal-mean",
    ...layout.zonalMean,
    horizontal: { kind: "linear", from: lower, to: reach },
    vertical: latitudeScale(input),
  };
}

/** Intervals wider than this many times the lines' own reach run out of the frame, so that the lines keep their shape. */
const mostBandReach = 2.5;

function widestExcursion({ result }: LatitudesInput): number {
  const { mean, half95 } = result.profile;
  const widest = (values: (row: number) => number) =>
    mean.reduce((most, _, row) => (values(row) > most && Number.isFinite(values(row)) ? values(row) : most), 0);
  const lines = Math.max(
    widest((row) => Math.abs(mean[row])),
    widest((row) => Math.abs(result.onDate[row])),
  );
  const band = widest((row) => Math.abs(mean[row]) + half95[row]);
  return Math.max(lines, lines > 0 ? Math.min(band, mostBandReach * lines) : band);
}

/**
 * Mean over the period in ink with its 95 % band, the date's zonal mean in amber, within its own error where that is known.
 * Breaks where a value is NaN.
 */
export function zonalMeanMarks(
  input: LatitudesInput,
  layout: LatitudesLayout,
  panel: PanelFrame,
  theme: Theme,
): Mark[] {
  const { mean, half95 } = input.result.profile;
  const ys = input.record.latitude.values.map((latitude) => pixelY(panel, latitude));
  const xs = (value: (row: number) => number) => Float64Array.from(ys, (_, row) => pixelX(panel, value(row)));
  const meanXs = xs((row) => mean[row]);
  const band = bandPath(
    xs((row) => mean[row] - half95[row]),
    xs((row) => mean[row] + half95[row]),
    ys,
  );
  const { onDate, error } = input.result;
  const dateBand = error
    ? bandPath(
        xs((row) => onDate[row] - errorsWithin95 * error.onDate[row]),
        xs((row) => onDate[row] + errorsWithin95 * error.onDate[row]),
        ys,
      )
    : "";
  const zero = pixelX(panel, 0);
  const clip = panel.id;
  return [
    groundMark(panel, theme),
    pathMark("zonal-mean-band", band, { fill: theme.spread, clip }),
    ...(dateBand === "" ? [] : [pathMark("zonal-mean-date-band", dateBand, { fill: theme.amberTint, clip })]),
    pathMark("zonal-mean-zero", linePath(zero, panel.y, zero, panel.y + panel.height), {
      stroke: theme.rule,
      strokeWidth: hairWidth,
      clip,
    }),
    pathMark(
      "zonal-mean-date",
      polylinePath(
        xs((row) => onDate[row]),
        ys,
      ),
      {
        stroke: theme.amber,
        strokeWidth: dataWidth,
        clip,
      },
    ),
    pathMark("zonal-mean-line", polylinePath(meanXs, ys), { stroke: theme.ink, strokeWidth: dataWidth, clip }),
    frameMark(panel, theme),
    ...zonalTicks(input, layout, panel, theme),
  ];
}

function zonalTicks(input: LatitudesInput, layout: LatitudesLayout, panel: PanelFrame, theme: Theme): Mark[] {
  const { scale } = displayUnits(input.quantity.units);
  const { from, to } = panel.horizontal;
  const make = (most: number) =>
    linearTicks(from * scale, to * scale, most).map(({ value, label }) => ({ value: value / scale, label }));
  const { small } = layout.sizes;
  const within = [panel.x - 6, panel.x + panel.width + 6] as const;
  const isLabelled = ({ value, label }: Tick) => {
    const half = textWidth(label, small, 400) / 2;
    return pixelX(panel, value) - half >= within[0] && pixelX(panel, value) + half <= within[1];
  };
  // A narrow panel needs its few labels near each other, a wide one looks calmer with them apart.
  const roomiest = roomiestTicks(panel, make, layout.sizes, Math.max(0.6 * small, 0.1 * panel.width));
  const fewer = () =>
    fewestTicks(from * scale, to * scale)
      .map((list) => list.map(({ value, label }) => ({ value: value / scale, label })))
      .find((list) => list.every(isLabelled) && labelsKeepApart(panel, list, small, 0.4 * small));
  // A label lost at one side only would make the scale look lopsided.
  const ticks = roomiest.length > 1 && roomiest.every(isLabelled) ? roomiest : (fewer() ?? roomiest);
  return bottomTickMarks(panel, ticks, within, theme, layout.sizes);
}
