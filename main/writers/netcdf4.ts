import { randomUUID } from "node:crypto";
import { rename, rm, stat } from "node:fs/promises";
import { basename, dirname, join } from "node:path";
import { Fault } from "../../core/model/errors";
import { flushFile, outputFault } from "./atomic-file";
import { type Hdf5Writer, openHdf5Writer } from "./hdf5-calls";
import {
  type AttributeValue,
  checkNetcdf4,
  type Netcdf4Spec,
  type NetcdfVariable,
  storage,
  type TypedValues,
} from "./netcdf4-spec";

export type { AttributeValue, Netcdf4Spec, NetcdfVariable, StoredNumber, TypedValues } from "./netcdf4-spec";

/**
 * Writes a netCDF-4 file, whole or not at all (a neighbour is written, flushed and renamed). Dimensions are fixed; a
 * variable of a dimension's own name becomes its coordinate; the other dimensions get the empty scale that the netCDF
 * format asks for. The same spec gives the same bytes: nothing in the file tells the time of writing.
 * Throws Fault "output" for a spec that no netCDF file can hold or a place that cannot be written.
 */
export async function writeNetcdf4(path: string, spec: Netcdf4Spec): Promise<void> {
  checkNetcdf4(path, spec);
  const staging = join(dirname(path), `.${basename(path)}.${randomUUID()}.part`);
  try {
    const writer = await openHdf5Writer(staging);
    try {
      fillFile(writer, spec);
    } finally {
      writer.close();
    }
    const { size } = await stat(staging);
    if (size === 0) throw nothingWritten(path);
    await flushFile(staging);
    await rename(staging, path);
  } catch (error) {
    await rm(staging, { force: true });
    throw outputFault(path, error);
  }
}

function fillFile(writer: Hdf5Writer, spec: Netcdf4Spec): void {
  const dimensions = Object.entries(spec.dimensions);
  const scaleIds = new Map(dimensions.map(([name], index) => [name, index]));
  const isCoordinate = (variable: NetcdfVariable): boolean =>
    variable.dimensions.length === 1 && variable.dimensions[0] === variable.name;
  const coordinates = spec.variables.filter(isCoordinate);
  const others = spec.variables.filter((variable) => !isCoordinate(variable));

  for (const [name, length] of dimensions) {
    const coordinate = coordinates.find((variable) => variable.name === name);
    if (coordinate) {
      writeVariable(writer, coordinate, [length]);
      writer.makeScale(name, name);
    } else {
      // The wording is fixed by the netCDF-4 format specification.
      writer.createEmptyScale(name, length, `This is a netCDF dimension but not a netCDF variable.${padded(length)}`);
    }
    writer.attribute(name, "_Netcdf4Dimid", new Int32Array([scaleIds.get(name) ?? 0]), false);
  }
  for (const variable of others) {
    writeVariable(
      writer,
      variable,
      variable.dimensions.map((name) => spec.dimensions[name]),
    );
    variable.dimensions.forEach((name, axis) => {
      writer.attachScale(variable.name, axis, name);
    });
  }
  for (const [name, value] of Object.entries(spec.attributes ?? {})) writeAttribute(writer, "/", name, value);
}

function padded(length: number): string {
  return String(length).padStart(10, " ");
}

function writeVariable(writer: Hdf5Writer, variable: NetcdfVariable, shape: readonly number[]): void {
  const { name, type, values, chunks, gzipLevel } = variable;
  const { code, array } = storage[type];
  const compression = chunks && gzipLevel ? gzipLevel : 0;
  if (typeof values !== "function") {
    writer.createVariable({ name, code, shape, chunks, compression, values: asStored(values, array) });
  } else {
    // Written in slabs along the first dimension, each as deep as a chunk, so that no chunk is compressed twice.
    const depth = Math.max(1, chunks?.[0] ?? shape[0]);
    const rest = shape.slice(1).reduce((product, length) => product * length, 1);
    for (let from = 0; from < shape[0]; from += depth) {
      const to = Math.min(from + depth, shape[0]);
      const slab = values(from, to);
      if (slab.length !== (to - from) * rest) throw wrongSlab(variable, from, to, (to - from) * rest, slab.length);
      const stored = asStored(slab, array);
      if (from === 0) {
        writer.createVariable({
          name,
          code,
          shape: [to, ...shape.slice(1)],
          limit: shape,
          chunks,
          compression,
          values: stored,
        });
      } else {
        writer.appendSlab(name, from, to, shape, stored);
      }
    }
  }
  // The format wants _FillValue first in line and in the packed type.
  if (variable.fillValue !== undefined) writer.attribute(name, "_FillValue", array.from([variable.fillValue]), true);
  for (const [key, value] of Object.entries(variable.attributes ?? {})) {
    const packed = packedTypeAttributes.has(key) && typeof value !== "string";
    if (packed) writer.attribute(name, key, array.from(typeof value === "number" ? [value] : value), true);
    else writeAttribute(writer, name, key, value);
  }
}

/** CF asks for these in the type of the stored numbers. */
const packedTypeAttributes = new Set([
  "missing_value",
  "valid_min",
  "valid_max",
  "valid_range",
  "flag_values",
  "flag_masks",
]);

function writeAttribute(writer: Hdf5Writer, owner: string, name: string, value: AttributeValue): void {
  if (typeof value === "string") writer.textAttribute(owner, name, value);
  else if (typeof value === "number") writer.attribute(owner, name, new Float64Array([value]), true);
  else writer.attribute(owner, name, Array.isArray(value) ? new Float64Array(value) : (value as TypedValues), true);
}

function asStored(values: TypedValues, array: (typeof storage)[keyof typeof storage]["array"]): TypedValues {
  return values instanceof array ? values : array.from(values as ArrayLike<number>);
}

function wrongSlab(variable: NetcdfVariable, from: number, to: number, expected: number, got: number): Fault {
  return new Fault({
    tag: "internal",
    where: `${variable.name}[${from}:${to}]`,
    expected: `${expected} values`,
    got: String(got),
    advice: "the code that makes the slabs is at fault",
  });
}

function nothingWritten(path: string): Fault {
  return new Fault({
    tag: "output",
    where: path,
    expected: "a file with content",
    got: "an empty one",
    advice: "check the space left on the disk and write again",
  });
}
