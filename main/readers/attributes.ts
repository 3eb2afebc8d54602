import type { Attributes } from "./container";

/** A text attribute, trimmed; several texts joined by a space; "" where it is missing or a number. */
export function textAttribute(attributes: Attributes, name: string): string {
  const value = Object.hasOwn(attributes, name) ? attributes[name] : undefined;
  if (typeof value === "string") return value.trim();
  return Array.isArray(value) ? value.join(" ").trim() : "";
}

/** The values of a numeric attribute; null where it is missing or text. 64-bit integers stay exact. */
export function numbersAttribute(attributes: Attributes, name: string): ArrayLike<number | bigint> | null {
  const value = Object.hasOwn(attributes, name) ? attributes[name] : undefined;
  return ArrayBuffer.isView(value) ? (value as ArrayLike<number | bigint>) : null;
}
