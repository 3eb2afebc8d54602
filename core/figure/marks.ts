import type { PathMark, RasterMark, TextMark } from "./scene";
import { plainLine } from "./xml-text";

/** Where glyphs of a line reach above and below its base line, in type sizes (the bundled font's figures and descenders). */
export const ascentShare = 0.74;
export const descentShare = 0.24;

interface TextStyle {
  readonly size: number;
  readonly fill: string;
  readonly weight?: 400 | 700;
  readonly anchor?: "start" | "middle" | "end";
}

/** One line of text on its base line; control and bidirectional characters are dropped. */
export function textMark(id: string, x: number, y: number, text: string, style: TextStyle): TextMark {
  return { kind: "text", id, x, y, text: plainLine(text), weight: 400, anchor: "start", ...style };
}

interface PathStyle {
  readonly stroke?: string;
  readonly strokeWidth?: number;
  readonly fill?: string;
  readonly dash?: readonly number[];
  readonly clip?: string;
}

export function pathMark(id: string, d: string, style: PathStyle): PathMark {
  return { kind: "path", id, d, stroke: "none", strokeWidth: 0, fill: "none", ...style };
}

export function rasterMark(
  id: string,
  box: { readonly x: number; readonly y: number; readonly width: number; readonly height: number },
  columns: number,
  rows: number,
  pixels: Uint8ClampedArray,
): RasterMark {
  const { x, y, width, height } = box;
  return { kind: "raster", id, x, y, width, height, columns, rows, pixels };
}

/** Hundredths of a pixel, so that path data stays short and equal on every machine. */
function round(value: number): number {
  return Math.round(value * 100) / 100;
}

export function rectanglePath(x: number, y: number, width: number, height: number): string {
  return `M${round(x)} ${round(y)}H${round(x + width)}V${round(y + height)}H${round(x)}Z`;
}

export function linePath(x1: number, y1: number, x2: number, y2: number): string {
  return `M${round(x1)} ${round(y1)}L${round(x2)} ${round(y2)}`;
}

/** A line through the points in pixels; a point that is not finite breaks it. A lone point leaves no trace. */
export function polylinePath(xs: ArrayLike<number>, ys: ArrayLike<number>): string {
  return finiteRuns(xs, ys)
    .filter(([start, end]) => end - start > 1)
    .map(([start, end]) => `M${points(xs, ys, start, end).join("L")}`)
    .join("");
}

/** The area between two lines that share their ys (a band about a profile); a point that is not finite breaks it. */
export function bandPath(lower: ArrayLike<number>, upper: ArrayLike<number>, ys: ArrayLike<number>): string {
  const sums = Float64Array.from({ length: ys.length }, (_, index) => lower[index] + upper[index]);
  return finiteRuns(sums, ys)
    .filter(([start, end]) => end - start > 1)
    .map(([start, end]) => {
      const back = points(upper, ys, start, end).reverse();
      return `M${[...points(lower, ys, start, end), ...back].join("L")}Z`;
    })
    .join("");
}

function points(xs: ArrayLike<number>, ys: ArrayLike<number>, start: number, end: number): string[] {
  const found: string[] = [];
  for (let i = start; i < end; i++) found.push(`${round(xs[i])} ${round(ys[i])}`);
  return found;
}

/** Half-open index ranges in which both coordinates are finite. */
function finiteRuns(xs: ArrayLike<number>, ys: ArrayLike<number>): [start: number, end: number][] {
  const runs: [number, number][] = [];
  let start = -1;
  for (let i = 0; i <= xs.length; i++) {
    const isDrawn = i < xs.length && Number.isFinite(xs[i]) && Number.isFinite(ys[i]);
    if (isDrawn && start < 0) start = i;
    if (!isDrawn && start >= 0) {
      runs.push([start, i]);
      start = -1;
    }
  }
  return runs;
}
