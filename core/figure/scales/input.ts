import type { Calendar } from "../../model/calendar";
import type { ScalesResult } from "../../model/scales-result";
import type { Theme } from "../colour/theme";
import type { TypeSizes } from "../latitudes/layout";

/** What the figure of scales is drawn from. SI units throughout. */
export interface ScalesInput {
  readonly result: ScalesResult;
  /** Of the columns of the result's maps: centres, degrees, rising. */
  readonly longitude: Float64Array;
  /** 1 where a cell of those maps ever has a value, else 0; latitude × longitude. */
  readonly ocean: Uint8Array;
  readonly calendar: Calendar;
  /** "20–41° N, 150–125° W". */
  readonly region: string;
  /** "Grid A · 0.125° · 3 d". */
  readonly grid: string;
  /** The band in words, "periods 90–540 days"; empty without a band. */
  readonly band: string;
  /** A latitude that the person holds, drawn through every panel with a latitude axis. */
  readonly heldLatitude?: number;
}

/** Which panels a scene shows: all of them, or one page's. */
export const scalesParts = ["all", "lengths", "waves", "forcing"] as const;
export type ScalesPart = (typeof scalesParts)[number];

/** Room for the figure in CSS pixels. */
export interface ScalesSize {
  readonly width: number;
  readonly height: number;
  /** Size of headings; ticks and notes are nine tenths of it. Left out: by the width. */
  readonly textSize?: number;
  /** Left out: all. */
  readonly part?: ScalesPart;
}

/** What every panel's marks are made with. */
export interface Drawing {
  readonly input: ScalesInput;
  readonly sizes: TypeSizes;
  readonly theme: Theme;
}
