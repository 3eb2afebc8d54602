import type { z } from "zod";
import { Fault } from "../model/errors";
import { type Study, studySchema } from "./schema";

/**
 * Checks a parsed study file and writes out every default. Error: Fault "study" naming the key, what was expected, what was
 * got and, for an unknown key, the nearest known one.
 */
export function readStudy(value: unknown, where: string): Study {
  const version = versionOf(value);
  if (typeof version === "number" && version > 1) {
    throw new Fault({
      tag: "study",
      where: `${where}: strake`,
      expected: "version 1",
      got: `version ${version}, from a newer Strake`,
      advice: "open it with that version",
    });
  }
  const result = studySchema.safeParse(value);
  if (!result.success) throw studyFault(result.error.issues[0], value, where);
  const study = result.data;
  requireUniqueIds(study, where);
  requireOrder(study, where);
  return study;
}

/** Reads a study from JSON text. Error: Fault "study" that names the line of a syntax error. */
export function parseStudy(text: string, where: string): Study {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (cause) {
    const got = cause instanceof Error ? cause.message : "text that is not JSON";
    throw new Fault(
      { tag: "study", where, expected: "JSON", got, advice: "mend the file in a text editor" },
      { cause },
    );
  }
  return readStudy(value, where);
}

function versionOf(value: unknown): unknown {
  return typeof value === "object" && value !== null ? (value as Record<string, unknown>).strake : undefined;
}

function studyFault(issue: z.core.$ZodIssue, value: unknown, where: string): Fault {
  const path = issue.path.map(String);
  if (issue.code === "unrecognized_keys") {
    const key = issue.keys[0];
    const known = knownKeys(path);
    return new Fault({
      tag: "study",
      where: `${where}: ${[...path, key].join(".")}`,
      expected: `one of the keys ${known.join(", ")}`,
      got: `the unknown key "${key}"`,
      advice: `did you mean "${nearestWord(key, known)}"?`,
    });
  }
  const got = valueAt(value, issue.path);
  return new Fault({
    tag: "study",
    where: path.length > 0 ? `${where}: ${path.join(".")}` : where,
    expected:
      issue.message
        .replace(/^Invalid (input|option|string)?:? ?(expected )?/i, "")
        .replace(/, received .*$/, "")
        .trim() || "a valid value",
    got: got === undefined ? "nothing" : JSON.stringify(got).slice(0, 80),
    advice: "correct this key in the study",
  });
}

/** Keys allowed at a path of the study, read off the schema. */
function knownKeys(path: readonly string[]): string[] {
  let schema: unknown = studySchema;
  for (const key of path) schema = stepInto(unwrapped(schema), key);
  const shape = (unwrapped(schema) as { shape?: Record<string, unknown> }).shape;
  return shape ? Object.keys(shape) : [];
}

function stepInto(schema: unknown, key: string): unknown {
  const holder = schema as { shape?: Record<string, unknown>; element?: unknown };
  return holder.shape ? holder.shape[key] : holder.element;
}

function unwrapped(schema: unknown): unknown {
  let inner = schema as { def?: { innerType?: unknown }; shape?: unknown };
  while (inner?.def?.innerType && !inner.shape) inner = inner.def.innerType as typeof inner;
  return inner;
}

function valueAt(value: unknown, path: readonly PropertyKey[]): unknown {
  let here = value;
  for (const key of path) here = (here as Record<PropertyKey, unknown> | undefined)?.[key];
  return here;
}

function requireUniqueIds(study: Study, where: string): void {
  const seen = new Set<string>();
  for (const source of [...study.grids, ...study.tracks]) {
    if (seen.has(source.id)) {
      throw new Fault({
        tag: "study",
        where: `${where}: grids and tracks`,
        expected: "a different id for every source",
        got: `"${source.id}" twice`,
        advice: "rename one of them",
      });
    }
    seen.add(source.id);
  }
}

function requireOrder(study: Study, where: string): void {
  const { region, period } = study;
  if (region && region.south >= region.north) {
    throw new Fault({
      tag: "study",
      where: `${where}: region`,
      expected: "south below north",
      got: `south ${region.south}, north ${region.north}`,
      advice: "exchange the two",
    });
  }
  if (region && region.west === region.east) {
    throw new Fault({
      tag: "study",
      where: `${where}: region`,
      expected: "west and east apart (a region may cross the date line; all longitudes: -180 to 180)",
      got: `both ${region.west}`,
      advice: "widen the region",
    });
  }
  if (period && period.from > period.to) {
    throw new Fault({
      tag: "study",
      where: `${where}: period`,
      expected: "from before to",
      got: `${period.from} to ${period.to}`,
      advice: "exchange the two",
    });
  }
}

/** The word of the list with the fewest single-letter edits from `word`. */
export function nearestWord(word: string, known: readonly string[]): string {
  let best = known[0] ?? "";
  let fewest = Number.POSITIVE_INFINITY;
  for (const candidate of known) {
    const edits = editDistance(word.toLowerCase(), candidate.toLowerCase());
    if (edits < fewest) {
      fewest = edits;
      best = candidate;
    }
  }
  return best;
}

function editDistance(a: string, b: string): number {
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = previous[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      current.push(Math.min(change, previous[j] + 1, current[j - 1] + 1));
    }
    previous = current;
  }
  return previous[b.length];
}
