import { readFileSync } from "node:fs";
import { expect } from "vitest";
import type { Container, NumericArray } from "../../../main/readers/container";
import { findVariable, readAll } from "../../../main/readers/container";

export interface ExpectedVariable {
  readonly type: string;
  readonly shape: readonly number[];
  readonly dimensions: readonly string[];
  /** 64-bit values as text. */
  readonly values: readonly (number | string)[];
}

/** What Python wrote into the fixtures (test/fixtures/readers/make.py). */
export const expectedFiles = JSON.parse(
  readFileSync(new URL("../../reference/reader_fixtures.json", import.meta.url), "utf8"),
) as Record<string, { variables: Record<string, ExpectedVariable> }> & { "chunked.nc": number[] };

export function asListed(values: NumericArray): (number | string)[] {
  const isBigOrDouble = values.BYTES_PER_ELEMENT === 8 && !(values instanceof Float64Array);
  return isBigOrDouble ? Array.from(values as ArrayLike<bigint>, String) : Array.from(values as ArrayLike<number>);
}

/** Every variable of the file has the type, shape, dimensions and values that Python says, whole and in a window. */
export function expectAsPythonSays(container: Container, file: string): void {
  const { variables } = expectedFiles[file];
  expect(container.variables.map(({ name }) => name).sort()).toEqual(Object.keys(variables).sort());
  for (const [name, expected] of Object.entries(variables)) {
    const variable = findVariable(container, name);
    if (!variable) throw new Error(`no ${name}`);
    const { type, shape, dimensions } = variable;
    expect({ name, type, shape, dimensions }).toEqual({ name, ...expected, values: undefined });
    expect(asListed(readAll(container, variable)), name).toEqual(expected.values);
    if (shape.length === 0) continue;
    const start = shape.map((length) => (length > 1 ? 1 : 0));
    const count = shape.map((length) => Math.max(1, length - 2));
    expect(asListed(container.read(name, start, count)), name).toEqual(windowOf(expected, start, count));
    expect(variable.attributes.note ?? name).toBe(name);
  }
}

function windowOf({ shape, values }: ExpectedVariable, start: readonly number[], count: readonly number[]) {
  const total = count.reduce((product, length) => product * length, 1);
  return Array.from({ length: total }, (_, flat) => {
    let [rest, at, stride] = [flat, 0, 1];
    for (let i = shape.length - 1; i >= 0; stride *= shape[i], i--) {
      at += (start[i] + (rest % count[i])) * stride;
      rest = Math.floor(rest / count[i]);
    }
    return values[at];
  });
}
