import { readFileSync } from "node:fs";

/** Reference values that a Python script in test/reference wrote; null stands for NaN. */
export function referenceJson<T>(name: string): T {
  return JSON.parse(readFileSync(new URL(`./reference/${name}.json`, import.meta.url), "utf8")) as T;
}

/** A list with nulls as float64 with NaN. */
export function withNaN(values: readonly (number | null)[]): Float64Array {
  return Float64Array.from(values, (value) => value ?? Number.NaN);
}
