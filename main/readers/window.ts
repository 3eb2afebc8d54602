import { Fault } from "../../core/model/errors";
import type { StoredType, VariableInfo } from "./container";
import { arrayTypes } from "./container";
import { fileFault } from "./faults";

/** No single read may ask for more than this: the rest of the program never needs it, a hostile header does. */
export const largestReadBytes = 2 ** 30;

/**
 * Checks a window against its variable before any memory is asked for and returns the number of values in it.
 * `where` names file and variable. Throws a Fault for a window outside the variable (tag "file") or above
 * `largestReadBytes` (tag "memory").
 */
export function checkWindow(
  variable: VariableInfo,
  start: readonly number[],
  count: readonly number[],
  where: string,
): number {
  const { shape } = variable;
  const inside =
    start.length === shape.length &&
    count.length === shape.length &&
    shape.every(
      (length, i) =>
        Number.isInteger(start[i]) &&
        Number.isInteger(count[i]) &&
        start[i] >= 0 &&
        count[i] >= 0 &&
        start[i] + count[i] <= length,
    );
  if (!inside) {
    const window = `a window of ${count.join(" × ")} from ${start.join(", ")}`;
    throw fileFault(where, `a window within ${shape.join(" × ")}`, window, "ask for less");
  }
  const values = count.reduce((product, length) => product * length, 1);
  refuseHugeRead(values * bytesPerValue(variable.type, where), where);
  return values;
}

export function bytesPerValue(type: StoredType, where: string): number {
  if (type !== "string") return arrayTypes[type].BYTES_PER_ELEMENT;
  throw fileFault(where, "numbers", "strings", "name a variable that holds numbers");
}

export function refuseHugeRead(bytes: number, where: string): void {
  if (bytes <= largestReadBytes) return;
  throw new Fault({
    tag: "memory",
    where,
    expected: `at most ${largestReadBytes / 2 ** 20} MiB in one piece`,
    got: `${Math.ceil(bytes / 2 ** 20)} MiB`,
    advice: "check the sizes in the file's header, or split the file",
  });
}
