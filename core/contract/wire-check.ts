import type { FaultData, FaultTag } from "../model/errors";
import type { CallMessage, Choice, ClientMessage, DoorKind, EngineMessage } from "./wire";
import { isEngineMethod } from "./wire-methods";
import { fitsMethod, hasExactly, isCount, isFields, isText, isTexts } from "./wire-shape";

const choices: Readonly<Record<Choice, true>> = { data: true, folder: true, "study-place": true, "result-place": true };
const doors: Readonly<Record<DoorKind, true>> = { process: true, web: true, desktop: true };
const faultTags: Readonly<Record<FaultTag, true>> = {
  study: true,
  file: true,
  region: true,
  period: true,
  band: true,
  memory: true,
  output: true,
  request: true,
  cancelled: true,
  internal: true,
};

function isOneOf(table: Readonly<Record<string, true>>, value: unknown): boolean {
  return typeof value === "string" && Object.hasOwn(table, value);
}

/** A message from a client, or undefined where it is none: unknown kind or method, missing, surplus or misshapen parts. */
export function readClientMessage(value: unknown): ClientMessage | undefined {
  if (!isFields(value) || !isCount(value.id)) return undefined;
  switch (value.kind) {
    case "call": {
      const { method, args } = value;
      if (!hasExactly(value, ["kind", "id", "method", "args"]) || !isEngineMethod(method)) return undefined;
      // The cast is what fitsMethod has just checked; the compiler cannot tie args to method by itself.
      return fitsMethod(method, args) ? ({ kind: "call", id: value.id, method, args } as CallMessage) : undefined;
    }
    case "cancel":
      return hasExactly(value, ["kind", "id"]) ? { kind: "cancel", id: value.id } : undefined;
    case "ask":
      return hasExactly(value, ["kind", "id", "what"]) && isOneOf(choices, value.what)
        ? { kind: "ask", id: value.id, what: value.what as Choice }
        : undefined;
    default:
      return undefined;
  }
}

/** The id of a refused call, so that its sender can be told; undefined where it bears none. */
export function refusedCallId(value: unknown): number | undefined {
  return isFields(value) && (value.kind === "call" || value.kind === "ask") && isCount(value.id) ? value.id : undefined;
}

function isFaultData(value: unknown): value is FaultData {
  if (!isFields(value) || !isOneOf(faultTags, value.tag)) return false;
  return [value.where, value.expected, value.got, value.advice].every((part) => typeof part === "string");
}

/** A message from the engine, or undefined where it is none. A result's value is taken as it stands. */
export function readEngineMessage(value: unknown): EngineMessage | undefined {
  if (!isFields(value)) return undefined;
  if (value.kind === "hello") {
    if (!isCount(value.version) || !isOneOf(doors, value.door) || !isTexts(value.paths)) return undefined;
    return { kind: "hello", version: value.version, door: value.door as DoorKind, paths: value.paths };
  }
  if (value.kind === "opened") return isTexts(value.paths) ? { kind: "opened", paths: value.paths } : undefined;
  if (!isCount(value.id)) return undefined;
  const { id } = value;
  if (value.kind === "result") return { kind: "result", id, value: value.value };
  if (value.kind === "failure")
    return isFaultData(value.fault) ? { kind: "failure", id, fault: value.fault } : undefined;
  if (value.kind !== "progress" || !isFields(value.progress)) return undefined;
  const { step, done, total } = value.progress;
  if (!isText(step) || typeof done !== "number" || typeof total !== "number") return undefined;
  return { kind: "progress", id, progress: { step, done, total } };
}
