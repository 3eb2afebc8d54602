import { metresPerUnit } from "./units";

const seconds = "s|sec|secs|second|seconds";
/** "m s-1", "m.s^-1", "cm s**-1"; "m/s", "metres per second". */
const spellings = [
  new RegExp(`^([a-z]+)[ .*]*(?:${seconds}) ?(?:\\^|\\*\\*)?-1$`, "i"),
  new RegExp(`^([a-z]+) ?(?:/| per ) ?(?:${seconds})$`, "i"),
];

/** How many m s-1 one unit of speed is; null for what is no length per second. */
export function metresPerSecond(units: string): number | null {
  for (const spelling of spellings) {
    const length = spelling.exec(units.trim())?.[1];
    if (length !== undefined) return metresPerUnit(length);
  }
  return null;
}
