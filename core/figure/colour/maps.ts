import { srgbBytesFromLch } from "./oklab";

/** A colour map as a table: 256 RGBA entries, opaque, from the lower limit to the upper. */
export interface ColourMap {
  readonly id: string;
  readonly kind: "diverging" | "sequential";
  readonly table: Uint8ClampedArray;
}

/** One arm of a map: what it ends in. Lightness runs evenly from the start; chroma and hue follow. */
interface Arm {
  readonly startLightness: number;
  readonly endLightness: number;
  /** Chroma in the arm's fullest part. */
  readonly chroma: number;
  /** Share of the chroma that remains at the end. */
  readonly endShare: number;
  readonly startHue: number;
  readonly endHue: number;
}

const entries = 256;

/** Colour of an arm at `position` 0 (start) to 1 (end). Chroma rises like a sine so that faint values stay near neutral. */
function armColour(arm: Arm, position: number) {
  const lightness = arm.startLightness + (arm.endLightness - arm.startLightness) * position;
  const rise = Math.sin((Math.PI / 2) * Math.min(1, position / 0.62)) ** 1.15;
  const fall = position > 0.62 ? 1 - (1 - arm.endShare) * ((position - 0.62) / 0.38) ** 2 : 1;
  const hue = arm.startHue + (arm.endHue - arm.startHue) * position;
  return srgbBytesFromLch(lightness, arm.chroma * rise * fall, hue);
}

function fillEntry(table: Uint8ClampedArray, entry: number, arm: Arm, position: number): void {
  table.set([...armColour(arm, position), 255], 4 * entry);
}

/** Two arms from a shared middle. Entries 127 and 128 lie half an entry on either side of it. */
function diverging(id: string, negative: Arm, positive: Arm): ColourMap {
  const table = new Uint8ClampedArray(4 * entries);
  const half = entries / 2;
  for (let entry = 0; entry < half; entry++) {
    const position = (entry + 0.5) / (half - 0.5);
    fillEntry(table, half - 1 - entry, negative, Math.min(1, position));
    fillEntry(table, half + entry, positive, Math.min(1, position));
  }
  return { id, kind: "diverging", table };
}

function sequential(id: string, arm: Arm): ColourMap {
  const table = new Uint8ClampedArray(4 * entries);
  for (let entry = 0; entry < entries; entry++) fillEntry(table, entry, arm, entry / (entries - 1));
  return { id, kind: "sequential", table };
}

/** Rust for eastward and positive, teal for westward and negative, for a light ground: the middle is the lightest. */
export const rustTealPaper = diverging(
  "rust-teal-paper",
  { startLightness: 0.972, endLightness: 0.4, chroma: 0.112, endShare: 0.76, startHue: 222, endHue: 238 },
  { startLightness: 0.972, endLightness: 0.4, chroma: 0.125, endShare: 0.84, startHue: 58, endHue: 44 },
);

/** The same hues for a dark ground: the middle is the darkest. */
export const rustTealNight = diverging(
  "rust-teal-night",
  { startLightness: 0.245, endLightness: 0.82, chroma: 0.11, endShare: 0.78, startHue: 240, endHue: 216 },
  { startLightness: 0.245, endLightness: 0.82, chroma: 0.135, endShare: 0.72, startHue: 40, endHue: 62 },
);

/** Ink-like, for magnitudes on a light ground: paper to deep blue-black. */
export const inkPaper = sequential("ink-paper", {
  startLightness: 0.972,
  endLightness: 0.24,
  chroma: 0.075,
  endShare: 0.6,
  startHue: 205,
  endHue: 258,
});

/** The same for a dark ground: near-ground to pale. */
export const inkNight = sequential("ink-night", {
  startLightness: 0.235,
  endLightness: 0.95,
  chroma: 0.085,
  endShare: 0.35,
  startHue: 258,
  endHue: 200,
});
