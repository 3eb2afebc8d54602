import type { EngineMethod, FieldChoice, OpenStudy } from "./engine";
import type { RequestOf } from "./wire";

/** Shapes a request's entries can have on the wire; a question mark says that the entry may be left out. */
export type Shape = "text" | "texts" | "flag" | "count" | "number" | "study" | "choice" | "record" | "anything";

type FittingShape<T> = unknown extends T
  ? "anything"
  : undefined extends T
    ? `${FittingShape<Exclude<T, undefined>>}?`
    : [T] extends [string]
      ? "text"
      : [T] extends [boolean]
        ? "flag"
        : [T] extends [number]
          ? "count" | "number"
          : [T] extends [readonly string[]]
            ? "texts"
            : [T] extends [OpenStudy]
              ? "study"
              : [T] extends [FieldChoice]
                ? "choice"
                : "record";

type RequestShapes = {
  readonly [M in EngineMethod]: { readonly [K in keyof RequestOf<M>]-?: FittingShape<RequestOf<M>[K]> };
};

/** Every method of the engine with the shape of its request. A method added to Engine must be added here to compile. */
export const requestShapes: RequestShapes = {
  open: { paths: "texts" },
  describe: { paths: "texts" },
  check: { study: "anything" },
  load: { open: "study", grid: "text" },
  latitudes: { open: "study", grid: "text", choice: "choice", dateIndex: "count", columns: "count" },
  spectrum: { open: "study", grid: "text", quantity: "text" },
  velocities: { open: "study", grid: "text" },
  jets: { open: "study", grid: "text" },
  eddyTest: { open: "study", grid: "text" },
  scales: { open: "study", grid: "text", latitude: "number?" },
  run: { open: "study", folder: "text", overwrite: "flag" },
  save: { open: "study", path: "text" },
};

/** The engine's methods, for whatever lists them. */
export const engineMethods = Object.keys(requestShapes) as readonly EngineMethod[];

export function isEngineMethod(value: unknown): value is EngineMethod {
  return typeof value === "string" && Object.hasOwn(requestShapes, value);
}
