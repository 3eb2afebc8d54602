import { ascentShare, descentShare } from "../marks";
import { textWidth } from "../text-width";
import type { FigureSize } from "./input";
import { jetLabelRoom } from "./jet-label-room";

export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Type sizes in pixels. */
export interface TypeSizes {
  readonly heading: number;
  readonly small: number;
}

/** Where everything of the latitude row lies. Whole pixels, so that frames and rasters stay crisp on a screen. */
export interface LatitudesLayout {
  readonly sizes: TypeSizes;
  readonly margin: number;
  readonly panelGap: number;
  /** Base lines above the row. */
  readonly headingBase: number;
  readonly subheadingBase: number;
  /** The bars of the colour keys of map and latitude-time picture; their numbers stand above them. */
  readonly mapKey: Box;
  readonly pictureKey: Box;
  /** The keys stand right of the headings, not under them. */
  readonly keysAreBeside: boolean;
  readonly map: Box;
  readonly zonalMean: Box;
  readonly latitudeTime: Box;
  readonly lower?: {
    readonly headingBase: number;
    readonly bandLabelBase: number;
    readonly spectrum: Box;
    readonly days: Box;
  };
}

/** What the layout must leave room for. */
export interface LayoutNeeds {
  /** Widest label left of the frames. */
  readonly leftLabels: readonly string[];
  /** Labels of jets right of the picture; none where no jets are drawn. */
  readonly rightLabels?: readonly string[];
  readonly mapHeading: string;
  readonly mapSubheading: string;
  readonly pictureHeading: string;
  /** Width over height of the map in true proportion at its middle latitude. */
  readonly mapShape: number;
}

const tickLength = 4;
/** Distance from a frame to the base line of the labels under it. */
export function tickLabelDrop(sizes: TypeSizes): number {
  return tickLength + 2 + 0.95 * sizes.small;
}

/** Type sizes for a figure: 12 px at 640 px of width to 16 px at 2200 and beyond, unless the size names one. */
export function typeSizes(size: FigureSize): TypeSizes {
  const byWidth = Math.min(16, Math.max(12, Math.round(2 * (10.2 + size.width / 420)) / 2));
  const heading = size.textSize ?? byWidth;
  return { heading, small: 0.9 * heading };
}

function clamp(value: number, least: number, most: number): number {
  return Math.min(most, Math.max(least, value));
}

/** Lays out the row of three panels, which share top and height, and what lies under them. */
export function latitudesLayout(size: FigureSize, needs: LayoutNeeds): LatitudesLayout {
  const sizes = typeSizes(size);
  const { heading, small } = sizes;
  const margin = Math.round(heading);
  const panelGap = Math.round(1.7 * heading);
  const labelWidth = Math.max(...needs.leftLabels.map((label) => textWidth(label, small, 400)));
  const left = Math.ceil(margin + labelWidth + tickLength + 4);
  const jetWidths = (needs.rightLabels ?? []).map((label) => jetLabelRoom(small).text + textWidth(label, small, 700));
  // At least what half of a date's label takes that stands under the picture's right end.
  const right = Math.ceil(Math.max(2 * heading, ...jetWidths.map((width) => width + 0.8 * heading)));
  const columns = size.width - left - 2 * panelGap - right;
  const zonalWidth = Math.round(clamp(0.125 * columns, 6 * heading, 13 * heading));

  const headingBase = margin + ascentShare * heading;
  const subheadingBase = headingBase + 1.4 * small;
  const isFull = size.arrangement !== "row";
  const dropBelow = tickLabelDrop(sizes) + descentShare * small;
  const lowerFrame = Math.round(clamp(0.17 * size.height, 4.5 * heading, 15 * heading));
  const lowerHead = Math.ceil(ascentShare * heading + 1.75 * small + 0.5 * small);
  const lowerHeight = isFull ? Math.ceil(1.1 * heading + lowerHead + lowerFrame + dropBelow) : 0;

  const rowWidths = (frameHeight: number) => {
    const shared = columns - zonalWidth;
    const mapWidth = Math.round(clamp(needs.mapShape * frameHeight, 0.44 * shared, 0.56 * shared));
    return { mapWidth, timeWidth: shared - mapWidth };
  };
  const frameHeightFrom = (top: number) =>
    Math.max(1, Math.floor(size.height - top - dropBelow - lowerHeight - 0.7 * margin));

  const topBeside = Math.round(subheadingBase + descentShare * small + 0.65 * small);
  const besides = rowWidths(frameHeightFrom(topBeside));
  const narrower = Math.min(besides.mapWidth, besides.timeWidth);
  const keyWidth = Math.round(clamp(0.34 * narrower, 7.5 * heading, 15 * heading));
  const mapText = Math.max(textWidth(needs.mapHeading, heading, 700), textWidth(needs.mapSubheading, small, 400));
  const room = 2 * heading + keyWidth;
  const isBeside =
    mapText + room <= besides.mapWidth && textWidth(needs.pictureHeading, heading, 700) + room <= besides.timeWidth;
  const keyHeight = Math.round(0.75 * small);
  const keyDrop = Math.ceil(1.25 * small + keyHeight + 0.5 * small);
  const top = isBeside ? topBeside : topBeside + keyDrop;
  const height = frameHeightFrom(top);
  const { mapWidth, timeWidth } = isBeside ? besides : rowWidths(height);

  const map = { x: left, y: top, width: mapWidth, height };
  const zonalMean = { x: map.x + mapWidth + panelGap, y: top, width: zonalWidth, height };
  const latitudeTime = { x: zonalMean.x + zonalWidth + panelGap, y: top, width: timeWidth, height };
  const keyOver = (panel: Box): Box => ({
    x: panel.x + panel.width - keyWidth,
    y: top - Math.round((isBeside ? 0.65 : 0.5) * small) - keyHeight,
    width: keyWidth,
    height: keyHeight,
  });
  const shared = {
    sizes,
    margin,
    panelGap,
    headingBase,
    subheadingBase,
    mapKey: keyOver(map),
    pictureKey: keyOver(latitudeTime),
    keysAreBeside: isBeside,
    map,
    zonalMean,
    latitudeTime,
  };
  if (!isFull) return shared;

  const lowerTop = Math.round(top + height + dropBelow + 1.1 * heading);
  const frameTop = lowerTop + lowerHead;
  const spectrum = { x: left, y: frameTop, width: mapWidth + panelGap + zonalWidth, height: lowerFrame };
  const days = { x: latitudeTime.x, y: frameTop, width: timeWidth, height: Math.round(1.6 * small) };
  const lowerBase = lowerTop + ascentShare * heading;
  return {
    ...shared,
    lower: { headingBase: lowerBase, bandLabelBase: frameTop - 0.5 * small, spectrum, days },
  };
}
