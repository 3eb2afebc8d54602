import { statSync } from "node:fs";
import type { HeightReference } from "../../core/model/source";
import { textAttribute } from "./attributes";
import type { Container } from "./container";
import { findVariable } from "./container";
import { fileFault } from "./faults";
import type { GridFilePlan, ReadChoices } from "./grid-file";
import { storedAs } from "./grid-file";
import { openContainer } from "./index";
import type { GridIndex } from "./joined-grid";
import { gridLayout } from "./layout";
import { readPacking } from "./packing";
import type { Recognised } from "./recognise";
import { recognise } from "./recognise";
import { isOnGridOf } from "./same-grid";

export interface VariableOptions extends Pick<ReadChoices, "applyValidRange"> {
  /** SI units in one of the variable's own; null refuses it: `metresPerUnit`, `metresPerSecond`. */
  readonly siPerUnit: (units: string) => number | null;
  /** For a message, e.g. "a velocity in m s-1". */
  readonly what: string;
  /** Default "unknown". */
  readonly reference?: HeightReference;
  /** Called before each file; may throw to stop. */
  readonly onFile?: (done: number, total: number) => void;
}

/** What `find` recognises beside the heights in the first file of an indexed grid: a velocity, an error. */
export async function besideHeights<T>(
  index: GridIndex,
  find: (container: Container, recognised: Recognised) => T,
): Promise<T> {
  const [{ path, height }] = index.files;
  const container = await openContainer(path);
  try {
    return find(container, recognise(container, height));
  } finally {
    container.close();
  }
}

/**
 * An index of another variable in the files of an indexed grid: same axes and dates, so that `readHeights` and the windows of
 * the grid serve it as well, in SI units. A variable without time is the same on every date of its file. Each file keeps its own
 * packing and units. Throws a Fault (tag "file") that names the file where it has changed since it was indexed, has no such
 * variable on the height's grid and dates, or the unit is refused.
 */
export async function indexVariable(index: GridIndex, name: string, options: VariableOptions): Promise<GridIndex> {
  const files: GridFilePlan[] = [];
  const notes = new Set<string>();
  let described: GridIndex["height"] | null = null;
  for (const [i, plan] of index.files.entries()) {
    options.onFile?.(i, index.files.length);
    const container = await openContainer(plan.path);
    try {
      if (container.bytes !== plan.bytes || statSync(plan.path).mtimeMs !== plan.modifiedMs) {
        throw fileFault(plan.path, "the file as it was indexed", "one changed since", "load the grid again");
      }
      const own = planVariable(container, plan, name, options);
      files.push(own);
      described ??= describeVariable(container, own, options.reference ?? "unknown");
      for (const note of own.packing.notes) notes.add(`${name}: ${note}`);
    } finally {
      container.close();
    }
  }
  return { ...index, height: described ?? index.height, files, notes: [...notes] };
}

function planVariable(container: Container, plan: GridFilePlan, name: string, options: VariableOptions): GridFilePlan {
  const where = `${plan.path}: ${name}`;
  const variable = findVariable(container, name);
  if (!variable) {
    const expected = `a variable ${name} as in the other files`;
    throw fileFault(plan.path, expected, "none", "leave the file out, or do without the variable");
  }
  const recognised = recognise(container, plan.height);
  if (!isOnGridOf(container, recognised, variable)) {
    const got = `dimensions ${variable.dimensions.join(", ")}`;
    throw fileFault(where, `the latitudes and longitudes of ${plan.height}`, got, "choose another variable");
  }
  const layout = gridLayout(plan.path, { ...recognised, height: variable });
  const maps = (shape: readonly number[], at: number | null) => (at === null ? 1 : shape[at]);
  const [own, wanted] = [maps(variable.shape, layout.time), maps(plan.shape, plan.layout.time)];
  if (layout.time !== null && own < wanted) {
    throw fileFault(where, `${wanted} maps as of ${plan.height}`, `${own}`, "mend the file or leave it out");
  }
  const units = textAttribute(variable.attributes, "units");
  const si = options.siPerUnit(units);
  if (si === null) throw fileFault(where, options.what, `units "${units}"`, "choose another variable");
  return {
    ...plan,
    height: name,
    shape: variable.shape,
    chunks: variable.chunks,
    layout,
    packing: readPacking(variable, where, options),
    metres: si,
  };
}

function describeVariable(container: Container, plan: GridFilePlan, reference: HeightReference): GridIndex["height"] {
  const attributes = findVariable(container, plan.height)?.attributes ?? {};
  return {
    name: plan.height,
    standardName: textAttribute(attributes, "standard_name"),
    longName: textAttribute(attributes, "long_name"),
    fileUnits: textAttribute(attributes, "units"),
    foundBy: "named",
    reference,
    storedAs: storedAs(plan.packing),
  };
}
