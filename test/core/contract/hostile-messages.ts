import { standInStudy } from "./stand-in-engine";

const study = { study: standInStudy, folder: "/d", path: "" };

/** A linear congruential generator (constants of Numerical Recipes): the same messages on every run. */
function makeRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

const valid: readonly Record<string, unknown>[] = [
  { kind: "call", id: 1, method: "open", args: { paths: ["/a"] } },
  { kind: "call", id: 1, method: "load", args: { open: study, grid: "A" } },
  { kind: "call", id: 1, method: "run", args: { open: study, folder: "/r", overwrite: false } },
  {
    kind: "call",
    id: 1,
    method: "latitudes",
    args: { open: study, grid: "A", choice: { quantity: "u", inBand: true }, dateIndex: 0, columns: 10 },
  },
  { kind: "cancel", id: 1 },
  { kind: "ask", id: 1, what: "data" },
];

/**
 * Values no part of a message may have. No Map is among them: in MessagePack it is the same bytes as an object, so that over
 * a web socket a well-shaped message would arrive; wire-check.test.ts has that case.
 */
const wrong: readonly unknown[] = [
  undefined,
  null,
  Number.NaN,
  -1,
  0.5,
  2 ** 31,
  [],
  [[]],
  [1],
  new Uint8Array(3),
  new Date(0),
  "x".repeat(5000),
  ["x".repeat(5000)],
  new Array(10_001).fill("a"),
  {},
  { paths: { length: 1, 0: "/a" } },
];

/** Where a part may rightly be anything, or has a value that `wrong` happens to fit. */
function mayPass(path: readonly string[], value: unknown): boolean {
  const [last] = path.slice(-1);
  const isPlain = typeof value === "object" && value !== null && Object.getPrototypeOf(value) === Object.prototype;
  return (last === "study" && isPlain) || (last === "paths" && Array.isArray(value) && value.length === 0);
}

function partsOf(value: unknown, path: readonly string[] = []): (readonly string[])[] {
  if (typeof value !== "object" || value === null || Array.isArray(value)) return [path];
  if (path.at(-1) === "study") return [path];
  return [path, ...Object.entries(value).flatMap(([key, inner]) => partsOf(inner, [...path, key]))];
}

function replaced(value: unknown, path: readonly string[], by: unknown): unknown {
  const [key, ...rest] = path;
  if (key === undefined) return by;
  const fields = value as Record<string, unknown>;
  return { ...fields, [key]: replaced(fields[key], rest, by) };
}

function without(value: unknown, path: readonly string[]): unknown {
  const [key, ...rest] = path;
  const fields = { ...(value as Record<string, unknown>) };
  if (rest.length > 0) fields[key] = without(fields[key], rest);
  else delete fields[key];
  return fields;
}

const kinds = ["", "call ", "CALL", "hello", "result", "failure", "progress", "opened", "__proto__", "constructor"];
const methods = ["", "close", "toString", "__proto__", "constructor", "hasOwnProperty", "Open", "then", "open "];

/** `count` messages, each wrong in one place, by a fixed seed; every one must be refused. */
export function hostileMessages(count: number, seed = 1): readonly unknown[] {
  const random = makeRandom(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)];
  const made: unknown[] = [];
  while (made.length < count) {
    const base = pick(valid);
    const path = pick(partsOf(base));
    const way = random();
    if (way < 0.1) made.push({ ...base, kind: pick(kinds) });
    else if (way < 0.2) made.push({ ...valid[0], method: pick(methods) });
    else if (way < 0.3) made.push({ ...base, [pick(["surplus", "then", "toJSON"])]: 1 });
    else if (way < 0.4 && path.length > 0) made.push(without(base, path));
    else {
      const value = pick(wrong);
      if (!mayPass(path, value)) made.push(replaced(base, path, value));
    }
  }
  return made;
}
