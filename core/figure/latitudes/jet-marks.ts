import type { Theme } from "../colour/theme";
import { ascentShare, descentShare, linePath, pathMark, polylinePath, rectanglePath, textMark } from "../marks";
import { pixelX, pixelY } from "../panel";
import type { Mark, PanelFrame } from "../scene";
import { textWidth } from "../text-width";
import { dataWidth, hairWidth } from "./axis-marks";
import type { LatitudesInput } from "./input";
import { jetLabelRoom } from "./jet-label-room";
import { type JetLine, jetLatitudeText, jetPlaceOn } from "./jet-line";
import type { LatitudesLayout } from "./layout";
import { latitudeScale } from "./map-panel";
import { mostLabelsBetween, spreadLabels } from "./spread-labels";

const litWidth = 2.4;
const backWidth = 6.5;
const westwardDash = [5, 3];
const notFoundDash = [1, 4];

/** Texts that may stand right of the picture: what the layout must leave room for; none where no jets are wanted. */
export function jetLabelTexts(input: LatitudesInput): string[] {
  if (!input.jets) return [];
  // Room for any latitude, so that nothing moves when jets are found anew.
  const { from, to } = latitudeScale(input);
  return [from, to].map((latitude) =>
    labelText(input, latitude < 0 ? Math.min(latitude, -10) : Math.max(latitude, 10)),
  );
}

function labelText(input: LatitudesInput, latitude: number): string {
  const { from: north, to: south } = latitudeScale(input);
  return jetLatitudeText(latitude, 1, north > 0 && south < 0);
}

/** Jets over the latitude-time picture, solid eastward and dashed westward, the lit one last and backed with amber. */
export function jetLineMarks(
  { jets = [], selectedJet, record }: LatitudesInput,
  panel: PanelFrame,
  theme: Theme,
): Mark[] {
  const others = jets.filter(({ id }) => id !== selectedJet);
  const lit = jets.filter(({ id }) => id === selectedJet);
  return [...others, ...lit].flatMap((jet) => {
    const isLit = jet.id === selectedJet;
    const d = jetPath(jet, record.time.values, panel);
    const style = { stroke: theme.ink, strokeWidth: isLit ? litWidth : dataWidth, clip: panel.id };
    const line = pathMark(`jet-${jet.id}`, d, jet.sign === 1 ? style : { ...style, dash: westwardDash });
    const back = pathMark(`jet-${jet.id}-lit`, d, { stroke: theme.amber, strokeWidth: backWidth, clip: panel.id });
    return isLit ? [back, line] : [line];
  });
}

/** The line broken over dates on which the jet was not found; dates closer than half a pixel are passed over. */
function jetPath({ dates, latitudes }: JetLine, days: Float64Array, panel: PanelFrame): string {
  const xs: number[] = [];
  const ys: number[] = [];
  let last = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < dates.length; i++) {
    const startsAnew = i > 0 && dates[i] - dates[i - 1] > 1;
    const endsHere = i === dates.length - 1 || dates[i + 1] - dates[i] > 1;
    const x = pixelX(panel, days[dates[i]]);
    if (startsAnew) {
      xs.push(Number.NaN);
      ys.push(Number.NaN);
    } else if (x - last < 0.5 && !endsHere) continue;
    xs.push(x);
    ys.push(pixelY(panel, latitudes[i]));
    last = x;
  }
  return polylinePath(xs, ys);
}

/** The lit jet as a line across map or zonal mean at its latitude on the date; dotted where it was not found on it. */
export function litJetMarks({ jets, selectedJet, result }: LatitudesInput, panel: PanelFrame, theme: Theme): Mark[] {
  const jet = jets?.find(({ id }) => id === selectedJet);
  if (!jet) return [];
  const { latitude, found } = jetPlaceOn(jet, result.dateIndex);
  const y = pixelY(panel, latitude);
  const d = linePath(panel.x, y, panel.x + panel.width, y);
  const ink = { stroke: theme.ink, strokeWidth: dataWidth, clip: panel.id };
  const dash = found ? (jet.sign === 1 ? undefined : westwardDash) : notFoundDash;
  return [
    pathMark(`${panel.id}-jet-lit`, d, { stroke: theme.amber, strokeWidth: backWidth - 2, clip: panel.id }),
    pathMark(`${panel.id}-jet`, d, dash ? { ...ink, dash } : ink),
  ];
}

/**
 * Each jet's latitude right of the picture with a triangle that points where it flows, spread so that none overlap. Where
 * there is no room for all, the lit jet and the longest-lived keep theirs.
 */
export function jetLabelMarks(input: LatitudesInput, layout: LatitudesLayout, panel: PanelFrame, theme: Theme): Mark[] {
  const { small } = layout.sizes;
  const gap = Math.ceil(1.25 * small);
  const [low, high] = [panel.y + gap / 2, panel.y + panel.height - gap / 2];
  const shown = labelled(input, mostLabelsBetween(gap, low, high));
  const wanted = shown.map(({ meanLatitude }) => pixelY(panel, meanLatitude));
  const places = spreadLabels(wanted, gap, low, high);
  const room = jetLabelRoom(small);
  const edge = panel.x + panel.width;
  return shown.flatMap((jet, index) => {
    const y = places[index];
    const colour = jet.sign === 1 ? theme.rust : theme.teal;
    const left = edge + 3 + room.leader;
    const text = labelText(input, jet.meanLatitude);
    const x = edge + room.text;
    const marks: Mark[] = [
      pathMark(`jet-sign-${jet.id}`, trianglePath(left, y, room.triangle, jet.sign), { fill: colour }),
      textMark(`jet-label-${jet.id}`, x, y + 0.34 * small, text, { size: small, weight: 700, fill: colour }),
    ];
    if (Math.abs(y - wanted[index]) > 1.5) {
      const d = linePath(edge + 2, wanted[index], left - 3, y);
      marks.unshift(pathMark(`jet-leader-${jet.id}`, d, { stroke: theme.softInk, strokeWidth: hairWidth }));
    }
    if (jet.id === input.selectedJet) {
      const width = x + textWidth(text, small, 700) - left + 6;
      const box = rectanglePath(left - 3, y - 0.62 * small, width, (ascentShare + descentShare + 0.26) * small);
      marks.unshift(pathMark(`jet-label-${jet.id}-lit`, box, { fill: theme.amberTint }));
    }
    return marks;
  });
}

function labelled({ jets = [], selectedJet }: LatitudesInput, most: number): readonly JetLine[] {
  if (jets.length <= most) return jets;
  const weight = (jet: JetLine) => (jet.id === selectedJet ? Number.POSITIVE_INFINITY : jet.dates.length);
  const kept = new Set([...jets].sort((a, b) => weight(b) - weight(a)).slice(0, most));
  return jets.filter((jet) => kept.has(jet));
}

function trianglePath(left: number, y: number, size: number, sign: 1 | -1): string {
  const [base, tip] = sign === 1 ? [left, left + size] : [left + size, left];
  const round = (value: number) => Math.round(100 * value) / 100;
  return `M${round(base)} ${round(y - size / 2)}L${round(tip)} ${round(y)}L${round(base)} ${round(y + size / 2)}Z`;
}

/** The jets in words, for those who cannot see their lines; empty without any. */
export function jetsSentence(input: LatitudesInput): string {
  const named = (sign: 1 | -1) =>
    (input.jets ?? []).filter((jet) => jet.sign === sign).map(({ meanLatitude }) => labelText(input, meanLatitude));
  const parts = (
    [
      [1, "eastward"],
      [-1, "westward"],
    ] as const
  ).flatMap(([sign, word]) => {
    const latitudes = named(sign);
    return latitudes.length === 0 ? [] : [`${word} at ${latitudes.join(", ")}`];
  });
  return parts.length === 0 ? "" : `Jets ${parts.join("; ")}. `;
}
