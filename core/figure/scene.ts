/**
 * A drawn figure as data: what screen, SVG, PDF and PNG all draw. Lengths are CSS pixels (1 px = 1/96 in); the origin is
 * top left. Colours are CSS hex strings.
 */
export interface Scene {
  readonly width: number;
  readonly height: number;
  readonly background: string;
  readonly title: string;
  /** What a person who cannot see it needs to know. */
  readonly description: string;
  readonly marks: readonly Mark[];
  /** Where the panels lie, for cursors, hit tests and handles. */
  readonly panels: readonly PanelFrame[];
}

export type Mark = RasterMark | PathMark | TextMark;

export interface RasterMark {
  readonly kind: "raster";
  readonly id: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly columns: number;
  readonly rows: number;
  /** RGBA, rows from the top, fully opaque. */
  readonly pixels: Uint8ClampedArray;
}

export interface PathMark {
  readonly kind: "path";
  readonly id: string;
  /** SVG path data. */
  readonly d: string;
  readonly stroke: string;
  readonly strokeWidth: number;
  readonly fill: string;
  readonly dash?: readonly number[];
  /** Panel whose frame clips it. */
  readonly clip?: string;
}

export interface TextMark {
  readonly kind: "text";
  readonly id: string;
  readonly x: number;
  readonly y: number;
  readonly text: string;
  readonly size: number;
  readonly weight: 400 | 700;
  readonly anchor: "start" | "middle" | "end";
  readonly fill: string;
  /** Degrees clockwise about (x, y). */
  readonly rotate?: number;
}

/** A panel's frame and the two scales that map data to its pixels. */
export interface PanelFrame {
  readonly id: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly horizontal: PanelScale;
  readonly vertical: PanelScale;
}

/** `from` and `to` are the data values at the frame's left and right (or top and bottom). */
export interface PanelScale {
  readonly kind: "longitude" | "latitude" | "time" | "linear" | "log";
  readonly from: number;
  readonly to: number;
}
