import { Fault } from "../../core/model/errors";

export type StoredNumber = "int8" | "uint8" | "int16" | "int32" | "float32" | "float64";
export type TypedValues = Int8Array | Uint8Array | Int16Array | Int32Array | Float32Array | Float64Array;

/** Numbers are written as doubles, which is what scale_factor and add_offset want; typed arrays keep their type. */
export type AttributeValue = string | number | readonly number[] | TypedValues;

export interface NetcdfVariable {
  readonly name: string;
  readonly type: StoredNumber;
  /** Names from the spec's dimensions; none for a scalar. */
  readonly dimensions: readonly string[];
  /**
   * Numbers as stored (packed already), row-major; or a function that gives those from index `from` up to `to` of the
   * first dimension, called in order with slabs as deep as a chunk, so that a large cube need not be in memory twice.
   */
  readonly values: TypedValues | ((from: number, to: number) => TypedValues);
  readonly attributes?: Readonly<Record<string, AttributeValue>>;
  /** In the stored type; becomes _FillValue. Never on a coordinate. */
  readonly fillValue?: number;
  readonly chunks?: readonly number[];
  /** 1 to 9; needs chunks. */
  readonly gzipLevel?: number;
}

export interface Netcdf4Spec {
  readonly dimensions: Readonly<Record<string, number>>;
  readonly variables: readonly NetcdfVariable[];
  readonly attributes?: Readonly<Record<string, AttributeValue>>;
}

interface Storage {
  readonly code: string;
  readonly array: TypedArrayType;
}

interface TypedArrayType {
  new (length: number): TypedValues;
  from(values: ArrayLike<number>): TypedValues;
}

export const storage: Readonly<Record<StoredNumber, Storage>> = {
  int8: { code: "<b", array: Int8Array },
  uint8: { code: "<B", array: Uint8Array },
  int16: { code: "<h", array: Int16Array },
  int32: { code: "<i", array: Int32Array },
  float32: { code: "<f", array: Float32Array },
  float64: { code: "<d", array: Float64Array },
};

/** Throws Fault "internal" for a spec that a netCDF file cannot hold: unknown or empty dimensions, wrong counts, bad chunks. */
export function checkNetcdf4(path: string, spec: Netcdf4Spec): void {
  for (const [name, length] of Object.entries(spec.dimensions)) {
    if (!Number.isInteger(length) || length < 1) throw unfit(path, name, "a length of 1 or more", String(length));
  }
  const seen = new Set<string>();
  for (const variable of spec.variables) {
    if (seen.has(variable.name)) throw unfit(path, variable.name, "one variable of a name", "two");
    seen.add(variable.name);
    checkVariable(path, spec, variable);
  }
}

function checkVariable(path: string, spec: Netcdf4Spec, variable: NetcdfVariable): void {
  const { name, dimensions, values, chunks } = variable;
  const shape = dimensions.map((dimension) => spec.dimensions[dimension]);
  const unknown = dimensions.find((dimension) => spec.dimensions[dimension] === undefined);
  if (unknown !== undefined) throw unfit(path, name, `one of ${Object.keys(spec.dimensions).join(", ")}`, unknown);
  const isDimension = spec.dimensions[name] !== undefined;
  if (isDimension && (dimensions.length !== 1 || dimensions[0] !== name)) {
    throw unfit(path, name, "a variable named like a dimension to lie along it", `dimensions ${dimensions.join(", ")}`);
  }
  if (isDimension && variable.fillValue !== undefined) throw unfit(path, name, "no fill value on a coordinate", "one");
  if (isDimension && typeof values === "function")
    throw unfit(path, name, "a coordinate's values as an array", "slabs");
  const count = shape.reduce((product, length) => product * length, 1);
  if (typeof values !== "function" && values.length !== count) {
    throw unfit(path, name, `${count} values (${shape.join(" × ")})`, String(values.length));
  }
  if (typeof values === "function" && dimensions.length === 0) throw unfit(path, name, "a scalar's value", "slabs");
  // Slabs grow the variable step by step, which HDF5 can do with chunks only.
  if (typeof values === "function" && chunks === undefined)
    throw unfit(path, name, "chunks, since it comes in slabs", "none");
  if (variable.gzipLevel !== undefined && chunks === undefined) throw unfit(path, name, "chunks to compress", "none");
  if (chunks && (chunks.length !== shape.length || chunks.some((chunk, axis) => chunk < 1 || chunk > shape[axis]))) {
    throw unfit(path, name, `chunks within ${shape.join(" × ")}`, chunks.join(" × "));
  }
}

function unfit(path: string, place: string, expected: string, got: string): Fault {
  return new Fault({
    tag: "internal",
    where: `${path}: ${place}`,
    expected,
    got,
    advice: "the code that lays out this file is at fault",
  });
}
