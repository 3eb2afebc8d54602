import { formatLatitude } from "../format";
import {
  bottomTickMarks,
  dataWidth,
  frameMark,
  groundMark,
  hairWidth,
  leftTickMarks,
  roomiestTicks,
} from "../latitudes/axis-marks";
import { linePath, pathMark, polylinePath, rectanglePath, textMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { fittingText } from "../text-width";
import { latitudeTicks, linearTicks } from "../ticks";
import { headingMark, type PanelMarks, subheadingMark } from "./cell-marks";
import { heldMarks } from "./held-latitude";
import type { Drawing } from "./input";
import type { Cell } from "./layout";
import { labelsUp, outerEdges } from "./spans";

const headroom = 1.08;

interface Profile {
  readonly values: Float64Array;
  /** Shown = stored × scale. */
  readonly scale: number;
  readonly headings: readonly string[];
  readonly remarks: readonly string[];
  /** A flow is rust eastward and teal westward about zero in the middle; a gradient warns below zero; a duration starts at zero. */
  readonly kind: "flow" | "gradient" | "duration";
  /** Whether the latitude axis is labelled here. */
  readonly labelled: boolean;
}

/** Time mean of the zonal-mean flow. */
export function meanFlowPanel(cell: Cell, drawing: Drawing): PanelMarks {
  return profilePanel(cell, drawing, {
    values: drawing.input.result.forcing.meanFlow,
    scale: 100,
    headings: ["Mean flow"],
    remarks: ["cm s⁻¹, eastward right", "cm s⁻¹"],
    kind: "flow",
    labelled: true,
  });
}

/** Convergence of the eddies' momentum flux. */
export function pushPanel(cell: Cell, drawing: Drawing): PanelMarks {
  return profilePanel(cell, drawing, {
    values: drawing.input.result.forcing.convergence,
    // In thousandths, so that three short labels fit under a narrow panel.
    scale: 1000 * 100 * 86_400,
    headings: ["Push by the eddies", "Eddy push"],
    remarks: ["−∂(u’v’)/∂y, 10⁻³ cm s⁻¹ per day", "10⁻³ cm s⁻¹ per day", "10⁻³ cm s⁻¹ d⁻¹"],
    kind: "flow",
    labelled: false,
  });
}

/** Gradient of absolute vorticity, with the latitudes at which it changes sign. */
export function gradientPanel(cell: Cell, drawing: Drawing): PanelMarks {
  return profilePanel(cell, drawing, {
    values: drawing.input.result.forcing.gradient,
    scale: 1e11,
    headings: ["β − ∂²U/∂y²"],
    remarks: ["10⁻¹¹ m⁻¹ s⁻¹; below 0 may be unstable", "10⁻¹¹ m⁻¹ s⁻¹, unstable below 0", "10⁻¹¹ m⁻¹ s⁻¹"],
    kind: "gradient",
    labelled: false,
  });
}

/** Longest run of one sign of the zonal-mean flow. */
export function longestRunPanel(cell: Cell, drawing: Drawing): PanelMarks {
  return profilePanel(cell, drawing, {
    values: drawing.input.result.persistence.byLatitude.longestDays.map((days) => (days > 0 ? days : Number.NaN)),
    scale: 1,
    headings: ["Longest run of one sign", "Longest run"],
    remarks: ["days, zonal mean of u", "days, zonal mean", "days"],
    kind: "duration",
    labelled: false,
  });
}

function profilePanel(cell: Cell, drawing: Drawing, profile: Profile): PanelMarks {
  const { sizes, theme } = drawing;
  const { latitude } = drawing.input.result;
  const { values, scale, kind, labelled } = profile;
  const [south, north] = outerEdges(latitude);
  const panel: PanelFrame = {
    id: cell.id,
    ...cell.frame,
    horizontal: { kind: "linear", ...horizontalRange(values, kind) },
    vertical: { kind: "latitude", from: north, to: south },
  };
  const zero = pixelX(panel, 0);
  const { from, to } = panel.horizontal;
  const ticks = roomiestTicks(
    panel,
    (most) => linearTicks(from * scale, to * scale, most).map((tick) => ({ ...tick, value: tick.value / scale })),
    sizes,
    Math.max(0.8 * sizes.small, 0.08 * panel.width),
  );
  const latitudes = latitudeTicks(south, north, labelsUp(cell, drawing));
  return {
    panels: [panel],
    marks: [
      headingMark(cell, profile.headings, drawing),
      subheadingMark(cell, profile.remarks, drawing),
      groundMark(panel, theme),
      ...(kind === "gradient" ? belowZero(panel, zero, drawing) : []),
      pathMark(`${cell.id}-zero`, linePath(zero, panel.y, zero, panel.y + panel.height), {
        stroke: theme.rule,
        strokeWidth: hairWidth,
        clip: panel.id,
      }),
      ...lineMarks(panel, profile, drawing),
      ...heldMarks(panel, drawing),
      ...(kind === "gradient" ? changeMarks(panel, zero, drawing) : []),
      frameMark(panel, theme),
      ...leftTickMarks(panel, labelled ? latitudes : [], theme, sizes),
      ...bottomTickMarks(panel, ticks, [panel.x - 6, panel.x + panel.width + 6], theme, sizes),
      ...emptyMark(panel, values, drawing),
    ],
  };
}

/** Symmetric about zero for a flow; from below zero for a gradient and from zero for a duration to the greatest value. */
function horizontalRange(values: Float64Array, kind: Profile["kind"]): { from: number; to: number } {
  const finite = values.filter(Number.isFinite);
  const [least, most] = [Math.min(0, ...finite), Math.max(0, ...finite)];
  if (kind === "flow") {
    const reach = headroom * Math.max(-least, most) || 1;
    return { from: -reach, to: reach };
  }
  const span = most - least || 1;
  return { from: kind === "duration" ? 0 : least - 0.12 * span, to: most + (headroom - 1) * span };
}

function lineMarks(panel: PanelFrame, { values, kind }: Profile, { input, theme }: Drawing): Mark[] {
  const ys = input.result.latitude.map((value) => pixelY(panel, value));
  const line = (id: string, kept: Float64Array, places: Float64Array, stroke: string) =>
    pathMark(
      `${panel.id}-${id}`,
      polylinePath(
        kept.map((value) => pixelX(panel, value)),
        places,
      ),
      { stroke, strokeWidth: dataWidth, clip: panel.id },
    );
  if (kind !== "flow") return [line("line", values, ys, theme.ink)];
  const split = withZeros(values, ys);
  const side = (sign: 1 | -1) => split.values.map((value) => (sign * value >= 0 ? value : Number.NaN));
  return [line("eastward", side(1), split.places, theme.rust), line("westward", side(-1), split.places, theme.teal)];
}

/** The profile with a point put in wherever it crosses zero, so that both signs' lines meet there. */
function withZeros(values: Float64Array, ys: Float64Array): { values: Float64Array; places: Float64Array } {
  const [all, places] = [[values[0]], [ys[0]]];
  for (let row = 1; row < values.length; row++) {
    const [before, after] = [values[row - 1], values[row]];
    if (before * after < 0) {
      all.push(0);
      places.push(ys[row - 1] + ((ys[row] - ys[row - 1]) * before) / (before - after));
    }
    all.push(after);
    places.push(ys[row]);
  }
  return { values: Float64Array.from(all), places: Float64Array.from(places) };
}

function belowZero(panel: PanelFrame, zero: number, { theme }: Drawing): Mark[] {
  const width = zero - panel.x;
  if (!(width > 0)) return [];
  const box = rectanglePath(panel.x, panel.y, width, panel.height);
  return [pathMark(`${panel.id}-unstable`, box, { fill: theme.spread, clip: panel.id })];
}

/** A short bar on the zero line at each change of sign. */
function changeMarks(panel: PanelFrame, zero: number, { input, sizes, theme }: Drawing): Mark[] {
  const half = 0.45 * sizes.small;
  const d = input.result.forcing.signChanges
    .map((latitude) => pixelY(panel, latitude))
    .map((y) => linePath(zero - half, y, zero + half, y))
    .join("");
  if (d === "") return [];
  return [pathMark(`${panel.id}-changes`, d, { stroke: theme.gap, strokeWidth: dataWidth + 0.8, clip: panel.id })];
}

function emptyMark(panel: PanelFrame, values: Float64Array, { sizes, theme }: Drawing): Mark[] {
  if (values.some(Number.isFinite)) return [];
  const { small } = sizes;
  const text = fittingText(["No latitude has enough values.", "Too few values"], panel.width - small, small);
  const style = { size: small, fill: theme.softInk, anchor: "middle" } as const;
  return [textMark(`${panel.id}-empty`, panel.x + panel.width / 2, panel.y + panel.height / 2, text, style)];
}

/** "none at this resolution"; "at 24.1° N and 28.3° N"; "6, from 22.1° N to 38.9° N". */
export function signChangesText(latitudes: readonly number[]): string {
  const texts = latitudes.map((value) => formatLatitude(value, 1));
  if (texts.length === 0) return "none at this resolution";
  if (texts.length < 3) return `at ${texts.join(" and ")}`;
  return `${texts.length}, from ${texts[0]} to ${texts[texts.length - 1]}`;
}
