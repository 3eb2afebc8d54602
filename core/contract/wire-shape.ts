import type { EngineMethod } from "./engine";
import { requestShapes, type Shape } from "./wire-methods";

/** Longest text taken, in UTF-16 units: a path of the longest kind a system allows. */
export const longestText = 4096;
/** Most entries in one list of texts. */
export const mostTexts = 10_000;
const largestCount = 2 ** 31 - 1;

export type Fields = Readonly<Record<string, unknown>>;

/** A plain object, as JSON or structured clone makes it: no array, typed array, map, date or instance of a class. */
export function isFields(value: unknown): value is Fields {
  if (typeof value !== "object" || value === null) return false;
  const prototype: unknown = Object.getPrototypeOf(value);
  // An object from another realm has that realm's Object.prototype, which is the one whose own prototype is null.
  return prototype === null || Object.getPrototypeOf(prototype) === null;
}

export function isText(value: unknown): value is string {
  return typeof value === "string" && value.length <= longestText;
}

export function isTexts(value: unknown): value is readonly string[] {
  return Array.isArray(value) && value.length <= mostTexts && value.every(isText);
}

/** A whole number from 0 to 2^31 - 1. */
export function isCount(value: unknown): value is number {
  return Number.isInteger(value) && Number(value) >= 0 && Number(value) <= largestCount;
}

/** True where `value` has exactly the keys named and no other. */
export function hasExactly(value: Fields, keys: readonly string[]): boolean {
  return Object.keys(value).length === keys.length && keys.every((key) => Object.hasOwn(value, key));
}

const fits: Readonly<Record<Shape, (value: unknown) => boolean>> = {
  text: isText,
  texts: isTexts,
  flag: (value) => typeof value === "boolean",
  count: isCount,
  number: (value) => typeof value === "number" && Number.isFinite(value),
  study: (value) =>
    isFields(value) &&
    hasExactly(value, ["study", "folder", "path"]) &&
    isFields(value.study) &&
    isText(value.folder) &&
    isText(value.path),
  choice: (value) =>
    isFields(value) &&
    hasExactly(value, ["quantity", "inBand"]) &&
    isText(value.quantity) &&
    typeof value.inBand === "boolean",
  record: isFields,
  anything: () => true,
};

/** True where `args` has every entry the method asks for, each of its shape, and no entry it does not know. */
export function fitsMethod(method: EngineMethod, args: unknown): boolean {
  if (!isFields(args)) return false;
  const shapes: Readonly<Record<string, string>> = requestShapes[method];
  if (!Object.keys(args).every((key) => Object.hasOwn(shapes, key))) return false;
  return Object.entries(shapes).every(([key, shape]) => {
    const mayLack = shape.endsWith("?");
    if (mayLack && args[key] === undefined) return true;
    if (!Object.hasOwn(args, key)) return false;
    return fits[(mayLack ? shape.slice(0, -1) : shape) as Shape](args[key]);
  });
}
