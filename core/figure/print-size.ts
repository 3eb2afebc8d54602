import type { FigureSize } from "./latitudes/input";

const pixelsPerMillimetre = 96 / 25.4;
/** Heading size on paper; ticks and notes at nine tenths of it stay above 8 pt (AGU's least, [from memory]). */
const headingPixels = 12;
/** Below this width the panels do not hold their labels: the figure is drawn this wide and made smaller. */
const leastWidth = 640;
/** Larger type would not fit into that width. */
const mostHeadingPixels = 16;

/**
 * Size in CSS pixels of a figure that will be `widthMm` wide on paper, in the proportion of height to width given. From
 * 170 mm on, one scene pixel is 1/96 in on paper. Down to 127 mm the type grows as the scene is made smaller, so that it
 * keeps its size on paper; narrower figures shrink with their type.
 */
export function printSize(widthMm: number, heightShare = 0.72): FigureSize {
  const wanted = widthMm * pixelsPerMillimetre;
  const width = Math.max(leastWidth, Math.round(wanted));
  const textSize = Math.min(mostHeadingPixels, (headingPixels * width) / Math.min(width, wanted));
  return { width, height: Math.round(heightShare * width), textSize };
}
