import { paper, type Theme } from "./colour/theme";
import { displayUnits } from "./display-units";
import type { FigureDefinition } from "./figure-definition";
import { colourKeyMarks, limitLabels } from "./latitudes/colour-key";
import { bridgedDates, daysMarks, daysPanel } from "./latitudes/days-panel";
import {
  inlineHeadingMarks,
  mapHeading,
  mapSubheading,
  periodsText,
  pictureHeading,
  rowHeadingMarks,
} from "./latitudes/headings";
import { type FigureSize, isFiltered, type LatitudesInput } from "./latitudes/input";
import { jetLabelMarks, jetLabelTexts, jetLineMarks, jetsSentence, litJetMarks } from "./latitudes/jet-marks";
import { latitudeTimeMarks, latitudeTimePanel } from "./latitudes/latitude-time-panel";
import { type LatitudesLayout, latitudesLayout } from "./latitudes/layout";
import { latitudeScale, mapMarks, mapPanel } from "./latitudes/map-panel";
import { noteMarks, remarkTexts } from "./latitudes/notes";
import { spectrumMarks, spectrumPanel, varianceTicks } from "./latitudes/spectrum-panel";
import { zonalMeanMarks, zonalMeanPanel } from "./latitudes/zonal-mean-panel";
import type { Mark, PanelFrame, Scene } from "./scene";
import { latitudeTicks } from "./ticks";
import { formatDate } from "./time-ticks";

export type { FigureSize, LatitudesInput } from "./latitudes/input";

/**
 * Map, zonal mean and latitude-time picture on one latitude axis, with the period spectrum and the days with data under
 * them. A pure function: the same input, size and theme give the same scene. Panels: "map", "zonal-mean", "latitude-time",
 * and in the full arrangement "spectrum" and "days". Meant for 640 × 480 and more.
 */
export function latitudesScene(input: LatitudesInput, size: FigureSize, theme: Theme = paper): Scene {
  const vertical = latitudeScale(input);
  // One label needs about 40 pixels of height to stay calm.
  const ticks = latitudeTicks(vertical.to, vertical.from, Math.max(2, Math.min(12, size.height / 70)));
  const unplaced = spectrumPanel(input, { x: 0, y: 0, width: 1, height: 1 });
  const layout = latitudesLayout(size, {
    leftLabels: [...ticks, ...varianceTicks(unplaced, input)].map((tick) => tick.label),
    rightLabels: jetLabelTexts(input),
    mapHeading: mapHeading(input),
    mapSubheading: mapSubheading(input),
    pictureHeading,
    mapShape: mapShape(input),
  });
  const map = mapPanel(input, layout);
  const zonalMean = zonalMeanPanel(input, layout);
  const latitudeTime = latitudeTimePanel(input, layout);
  const lower = layout.lower ? lowerMarks(input, size, layout, layout.lower, theme) : { marks: [], panels: [] };
  return {
    width: size.width,
    height: size.height,
    background: theme.ground,
    title: mapHeading(input),
    description: description(input),
    marks: [
      ...rowHeadingMarks(input, layout, theme),
      ...colourKeyMarks("map-key", input, input.result.limits, layout.mapKey, layout.sizes, theme),
      ...colourKeyMarks("picture-key", input, input.result.pictureLimits, layout.pictureKey, layout.sizes, theme),
      ...mapMarks(input, layout, map, ticks, theme),
      ...litJetMarks(input, map, theme),
      ...zonalMeanMarks(input, layout, zonalMean, theme),
      ...litJetMarks(input, zonalMean, theme),
      ...latitudeTimeMarks(input, layout, latitudeTime, theme),
      ...jetLineMarks(input, latitudeTime, theme),
      ...jetLabelMarks(input, layout, latitudeTime, theme),
      ...lower.marks,
    ],
    panels: [map, zonalMean, latitudeTime, ...lower.panels],
  };
}

/** Width over height of the region in kilometres at its middle latitude. */
function mapShape(input: LatitudesInput): number {
  const { from: north, to: south } = latitudeScale(input);
  const longitudes = input.record.longitude.values;
  const span = Math.abs(longitudes[longitudes.length - 1] - longitudes[0]);
  return (span * Math.cos((((north + south) / 2) * Math.PI) / 180)) / (north - south);
}

function lowerMarks(
  input: LatitudesInput,
  size: FigureSize,
  layout: LatitudesLayout,
  lower: NonNullable<LatitudesLayout["lower"]>,
  theme: Theme,
): { marks: Mark[]; panels: PanelFrame[] } {
  const { sizes } = layout;
  const spectrum = spectrumPanel(input, lower.spectrum);
  const days = daysPanel(input, lower.days);
  const { squared } = displayUnits(input.quantity.units);
  const unit = squared === "" ? "" : `, ${squared}`;
  const place = (panel: PanelFrame) => ({ x: panel.x, base: lower.headingBase, width: panel.width });
  return {
    panels: [spectrum, days],
    marks: [
      ...inlineHeadingMarks(
        "spectrum",
        place(spectrum),
        "Which periods to keep",
        [
          ...(input.band.filter === "none"
            ? []
            : [`variance per unit of log period${unit}; dotted, what the filter keeps`]),
          `variance per unit of log period${unit}`,
          squared,
        ],
        theme,
        sizes,
      ),
      ...spectrumMarks(input, layout, spectrum, lower.bandLabelBase, theme),
      ...inlineHeadingMarks("days", place(days), "Days with data", daysRemarks(input), theme, sizes),
      ...daysMarks(input, days, theme),
      ...noteMarks(input, days, size.height - 0.6 * layout.margin, theme, sizes),
    ],
  };
}

/** What the colours in the strip of days mean, the longest first. */
function daysRemarks(input: LatitudesInput): string[] {
  const least = "gaps in red";
  if (!isFiltered(input)) return [least];
  if (bridgedDates(input).includes(1)) {
    return [`${least}, low where the filter bridges them, its ends shaded`, `${least}, low if bridged`, least];
  }
  return [`${least}, shaded ends lose the long periods`, `${least}, filter ends shaded`, least];
}

/** For people who cannot see the figure, and for the file's desc element. */
function description(input: LatitudesInput): string {
  const { units } = displayUnits(input.quantity.units);
  const [lower, upper] = limitLabels(input, input.result.limits);
  const [pictureLower, pictureUpper] = limitLabels(input, input.result.pictureLimits);
  const unitText = units === "" ? "" : ` ${units}`;
  const { calendar, values } = input.record.time;
  const first = formatDate(calendar, values[0]);
  const last = formatDate(calendar, values[values.length - 1]);
  return (
    `${mapHeading(input)}, ${input.region}: a map, the zonal mean over ${first} to ${last} with its 95 % band, ` +
    `and the zonal mean through time on one latitude axis; ${periodsText(input)}. ` +
    `Colours run from ${lower} to ${upper}${unitText} on the map, from ${pictureLower} to ${pictureUpper}${unitText} through time. ` +
    jetsSentence(input) +
    [...remarkTexts(input), input.grid].map((remark) => `${capital(remark)}.`).join(" ")
  );
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

export const latitudesFigure: FigureDefinition<"latitudes", LatitudesInput, FigureSize> = {
  id: "latitudes",
  title: "Latitudes",
  summary: "Map, zonal mean and latitude-time picture on one latitude axis",
  scene: latitudesScene,
};
