import { Fault } from "../../core/model/errors";

/** A Fault about a file (tag "file"). `where` is the path, or the path and the variable: "a.nc: sla". */
export function fileFault(where: string, expected: string, got: string, advice: string, cause?: unknown): Fault {
  return new Fault({ tag: "file", where, expected, got, advice }, cause === undefined ? undefined : { cause });
}

/** Names for a message: at most twelve, the rest counted. */
export function listNames(names: readonly string[]): string {
  if (names.length === 0) return "none";
  const shown = names.slice(0, 12).map((name) => name.slice(0, 60));
  return names.length > 12 ? `${shown.join(", ")} and ${names.length - 12} more` : shown.join(", ");
}
