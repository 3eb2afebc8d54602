import { dtype_to_metadata, File, Module, ready } from "h5wasm/node";
import { Fault } from "../../core/model/errors";
import type { TypedValues } from "./netcdf4-spec";

export interface NewVariable {
  readonly name: string;
  /** Type code of the library: byte order and C type, such as "<h". */
  readonly code: string;
  readonly shape: readonly number[];
  /** Full shape where `shape` is a first slab that later ones extend. */
  readonly limit?: readonly number[];
  readonly chunks?: readonly number[];
  /** Deflate level, 0 for none. */
  readonly compression: number;
  readonly values: TypedValues;
}

/** An HDF5 file being written. Every call checks the library's status, which its own surface lets pass. */
export interface Hdf5Writer {
  createVariable(variable: NewVariable): void;
  appendSlab(name: string, from: number, to: number, shape: readonly number[], values: TypedValues): void;
  createEmptyScale(name: string, length: number, label: string): void;
  makeScale(name: string, label: string): void;
  attachScale(variable: string, axis: number, scale: string): void;
  attribute(owner: string, name: string, values: TypedValues, asVector: boolean): void;
  textAttribute(owner: string, name: string, text: string): void;
  close(): void;
}

export async function openHdf5Writer(path: string): Promise<Hdf5Writer> {
  await ready;
  const file = atNoTime(() => new File(path, "w", { track_order: true }));
  if (file.file_id < 0n) throw refused(path, "open");
  const id = file.file_id;
  const at = (name: string): string => (name === "/" ? "/" : `/${name}`);
  const must = (what: string, call: () => number | undefined): void => {
    const status = atNoTime(call);
    if (typeof status === "number" && status < 0) throw refused(path, what);
  };

  const create = (variable: NewVariable): void => {
    const shape = variable.shape.map(BigInt);
    const metadata = {
      ...dtype_to_metadata(variable.code),
      shape,
      maxshape: variable.limit?.map(BigInt) ?? shape,
      chunks: variable.chunks?.map(BigInt) ?? null,
      compression: variable.compression > 0 ? Module.H5Z_FILTER_DEFLATE : Module.H5Z_FILTER_NONE,
      compression_opts: variable.compression > 0 ? [variable.compression] : [],
      track_order: true,
    };
    const what = `create ${variable.name}`;
    withBytes(variable.values, (pointer) =>
      must(what, () => Module.create_dataset(id, at(variable.name), pointer, metadata as never)),
    );
  };

  const attribute: Hdf5Writer["attribute"] = (owner, name, values, asVector) => {
    const shape = asVector ? [BigInt(values.length)] : [];
    const metadata = { ...dtype_to_metadata(codeOf(values)), shape, maxshape: shape };
    withBytes(values, (pointer) =>
      must(`set ${owner}@${name}`, () => Module.create_attribute(id, at(owner), name, pointer, metadata as never)),
    );
  };

  return {
    createVariable: create,
    appendSlab(name, from, to, shape, values) {
      const count = [to - from, ...shape.slice(1)].map(BigInt);
      const offset = [from, ...shape.slice(1).map(() => 0)].map(BigInt);
      const strides = shape.map(() => 1n);
      must(`extend ${name}`, () => Module.resize_dataset(id, at(name), [to, ...shape.slice(1)].map(BigInt)));
      withBytes(values, (pointer) =>
        must(`write ${name}`, () => Module.set_dataset_data(id, at(name), count, offset, strides, pointer)),
      );
    },
    createEmptyScale(name, length, label) {
      const values = new Float32Array(length);
      const chunks = [Math.min(length, 65536)];
      create({ name, code: "<f", shape: [length], chunks, compression: 9, values });
      must(`make a scale of ${name}`, () => Module.set_scale(id, at(name), label));
    },
    makeScale(name, label) {
      must(`make a scale of ${name}`, () => Module.set_scale(id, at(name), label));
    },
    attachScale(variable, axis, scale) {
      must(`attach ${scale} to ${variable}`, () => Module.attach_scale(id, at(variable), at(scale), axis));
    },
    attribute,
    textAttribute(owner, name, text) {
      const bytes = new TextEncoder().encode(text === "" ? " " : text);
      const metadata = { ...dtype_to_metadata(`S${bytes.length}`), shape: [], maxshape: [] };
      withBytes(bytes, (pointer) =>
        must(`set ${owner}@${name}`, () => Module.create_attribute(id, at(owner), name, pointer, metadata as never)),
      );
    },
    close() {
      must("close", () => file.close());
    },
  };
}

/**
 * HDF5 stamps each object with the second it was made, and asks the clock through Date.now. Held at zero for the length
 * of one synchronous call, so that the same content gives the same bytes.
 */
function atNoTime<T>(call: () => T): T {
  const clock = Date.now;
  Date.now = () => 0;
  try {
    return call();
  } finally {
    Date.now = clock;
  }
}

function withBytes(values: TypedValues, use: (pointer: bigint) => void): void {
  const bytes = new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
  const pointer = Module._malloc(bytes.byteLength);
  if (pointer === 0) {
    throw new Fault({
      tag: "memory",
      where: "writing netCDF-4",
      expected: `${bytes.byteLength} bytes of memory`,
      got: "none left",
      advice: "close other work or write a smaller region",
    });
  }
  try {
    Module.HEAPU8.set(bytes, pointer);
    use(BigInt(pointer));
  } finally {
    Module._free(pointer);
  }
}

function codeOf(values: TypedValues): string {
  if (values instanceof Float64Array) return "<d";
  if (values instanceof Float32Array) return "<f";
  if (values instanceof Int32Array) return "<i";
  if (values instanceof Int16Array) return "<h";
  return values instanceof Int8Array ? "<b" : "<B";
}

function refused(path: string, what: string): Fault {
  return new Fault({
    tag: "output",
    where: path,
    expected: "HDF5 to write",
    got: `a refusal to ${what}`,
    advice: "check that there is space left and that the folder may be written to",
  });
}
