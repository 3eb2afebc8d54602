import { type ColourMap, inkNight, inkPaper, rustTealNight, rustTealPaper } from "./maps";

/** Colours of one ground, as "#rrggbb". Text is drawn in ink, softInk, amberInk, rust or teal only. */
export interface Theme {
  readonly id: "paper" | "night";
  /** Behind everything. */
  readonly ground: string;
  /** Inside a frame. */
  readonly panel: string;
  readonly ink: string;
  readonly softInk: string;
  /** Frames and hair lines. */
  readonly rule: string;
  /** What the person holds: lines and handles. */
  readonly amber: string;
  /** The same, dark or light enough to be read as text. */
  readonly amberInk: string;
  /** The pass band's ground. */
  readonly amberTint: string;
  /** Eastward, positive. */
  readonly rust: string;
  /** Westward, negative. */
  readonly teal: string;
  /** Dates without data. */
  readonly gap: string;
  /** Ground of a confidence band. */
  readonly spread: string;
  /** Days with data, and days that the filter's ends weaken. */
  readonly data: string;
  readonly weakened: string;
  /** No value on this date. */
  readonly missing: string;
  /** Fine lines over values that lie within their error. */
  readonly hatch: string;
  /** Never a value. */
  readonly land: string;
  readonly diverging: ColourMap;
  readonly sequential: ColourMap;
}

export const paper: Theme = {
  id: "paper",
  ground: "#f5f3ed",
  panel: "#fffdf8",
  ink: "#16242d",
  softInk: "#56636b",
  rule: "#cfcbc1",
  amber: "#b98100",
  amberInk: "#7f5700",
  amberTint: "#f4e7c8",
  rust: "#a23c10",
  teal: "#0b5a73",
  gap: "#a8261b",
  spread: "#dcdcd6",
  data: "#cdd5d3",
  weakened: "#a9b2b3",
  missing: "#dfdcd4",
  hatch: "#8f979a",
  land: "#bdb8ac",
  diverging: rustTealPaper,
  sequential: inkPaper,
};

export const night: Theme = {
  id: "night",
  ground: "#11171b",
  panel: "#191f24",
  ink: "#eceae3",
  softInk: "#a4aeb3",
  rule: "#3a444b",
  amber: "#e0a62c",
  amberInk: "#ecb84a",
  amberTint: "#3a311c",
  rust: "#ee9364",
  teal: "#63b8d2",
  gap: "#e0503f",
  spread: "#3a4248",
  data: "#3f4c52",
  weakened: "#67757b",
  missing: "#3b4046",
  hatch: "#6b7881",
  land: "#5a5e61",
  diverging: rustTealNight,
  sequential: inkNight,
};

export const themes = { paper, night } as const;
