import type { BandEdge } from "./band-edges";

/** What a key does on the bench. */
export type KeyAction =
  | { readonly kind: "latitude"; readonly steps: number }
  | { readonly kind: "date"; readonly steps: number }
  | { readonly kind: "edge"; readonly edge: BandEdge; readonly direction: 1 | -1 }
  | { readonly kind: "play" }
  | { readonly kind: "keys" }
  | { readonly kind: "undo" }
  | { readonly kind: "redo" };

export interface KeyPress {
  readonly key: string;
  readonly shift: boolean;
  /** Control, or Command on a Mac. */
  readonly command: boolean;
  readonly alt: boolean;
  /** What holds the focus: keys that a control uses itself are left to it. */
  readonly focus: "text" | "choice" | "button" | "slider" | "other";
}

const plain: Readonly<Record<string, KeyAction>> = {
  ArrowUp: { kind: "latitude", steps: 1 },
  ArrowDown: { kind: "latitude", steps: -1 },
  PageUp: { kind: "latitude", steps: 10 },
  PageDown: { kind: "latitude", steps: -10 },
  ArrowLeft: { kind: "date", steps: -1 },
  ArrowRight: { kind: "date", steps: 1 },
  "[": { kind: "edge", edge: "shortestDays", direction: -1 },
  "]": { kind: "edge", edge: "shortestDays", direction: 1 },
  "{": { kind: "edge", edge: "longestDays", direction: -1 },
  "}": { kind: "edge", edge: "longestDays", direction: 1 },
  " ": { kind: "play" },
  "?": { kind: "keys" },
};

/** What a key press means, or null where it belongs to the focused control or to nobody. */
export function keyAction(press: KeyPress): KeyAction | null {
  if (press.focus === "text" || press.alt) return null;
  if (press.command) {
    const key = press.key.toLowerCase();
    if (key === "z") return { kind: press.shift ? "redo" : "undo" };
    return key === "y" ? { kind: "redo" } : null;
  }
  const action = Object.hasOwn(plain, press.key) ? plain[press.key] : null;
  if (!action) return null;
  const moves = action.kind === "latitude" || action.kind === "date";
  if (moves && (press.focus === "choice" || press.focus === "slider")) return null;
  if (action.kind === "play" && press.focus !== "other" && press.focus !== "slider") return null;
  if (moves && press.shift && Math.abs(action.steps) === 1) return { ...action, steps: action.steps * 10 };
  return action;
}

/** The list that "?" shows. */
export const keyHelp: readonly { readonly keys: readonly string[]; readonly does: string }[] = [
  { keys: ["↑", "↓"], does: "cursor one row north or south" },
  { keys: ["←", "→"], does: "one date back or on" },
  { keys: ["Shift"], does: "with an arrow: ten at once" },
  { keys: ["[", "]"], does: "short end of the band shorter or longer" },
  { keys: ["{", "}"], does: "long end of the band shorter or longer" },
  { keys: ["Space"], does: "play or pause" },
  { keys: ["Ctrl Z", "Ctrl Y"], does: "undo, redo" },
  { keys: ["?"], does: "this list" },
];
