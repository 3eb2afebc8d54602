import { statSync } from "node:fs";
import { resolve } from "node:path";
import type { Attributes, Container, FileFormat, NumericArray, VariableInfo } from "../container";
import { fileFault } from "../faults";
import { checkWindow, refuseHugeRead } from "../window";
import { readAttributes } from "./attributes";
import { readContents } from "./contents";
import { callHdf5, checkStatus, loadHdf5 } from "./library";
import { fromLittleEndian } from "./types";

const signature = [0x89, 0x48, 0x44, 0x46, 0x0d, 0x0a, 0x1a, 0x0a];

/** netCDF-4 and plain HDF5, read lazily. A damaged chunk, a cut file or a reference to another file is a Fault. */
export const netcdf4: FileFormat = {
  id: "netcdf4",
  title: "netCDF-4",
  extensions: [".nc", ".nc4", ".h5", ".hdf5"],
  // HDF5 allows a user block before the signature: 0, 512, 1024, 2048 … bytes.
  recognises: (head) => [0, 512, 1024, 2048].some((at) => signature.every((byte, i) => head[at + i] === byte)),
  async open(path) {
    await loadHdf5();
    return openHdf5(path);
  },
};

function openHdf5(path: string): Container {
  const absolute = resolve(path);
  const fileId = callHdf5(absolute, "", (library) => {
    const id = library.open(absolute, library.H5F_ACC_RDONLY, false, -1, -1);
    checkStatus(id);
    return id;
  });
  const close = () => {
    callHdf5(absolute, "", (library) => library.close_file(fileId));
  };
  try {
    const { variables, dimensions } = readContents(absolute, fileId);
    const checkedCodecs = new Set<string>();
    const byName = new Map(variables.map((variable) => [variable.name, variable]));
    let attributes: Attributes | null = null;
    return {
      path,
      format: "netCDF-4",
      bytes: statSync(absolute).size,
      get attributes() {
        attributes ??= readAttributes(absolute, fileId, "/");
        return attributes;
      },
      dimensions,
      variables,
      read(name, start, count) {
        const variable = byName.get(name);
        if (!variable) throw fileFault(path, `a variable ${name}`, "no such variable", "choose one that the file has");
        if (!checkedCodecs.has(name)) refuseUnknownCodec(absolute, fileId, name);
        checkedCodecs.add(name);
        return readWindow(absolute, fileId, variable, start, count);
      },
      close,
    };
  } catch (error) {
    close();
    throw error;
  }
}

/** Filters up to this number are part of HDF5 itself: deflate, shuffle, fletcher32, szip, nbit, scale-offset. */
const lastBuiltInFilter = 6;

function refuseUnknownCodec(path: string, fileId: bigint, name: string): void {
  const filters = callHdf5(path, name, (library) => library.get_dataset_filters(fileId, `/${name}`));
  const unknown = filters.find(({ id }) => id > lastBuiltInFilter);
  if (!unknown) return;
  const got = `the codec ${unknown.name || "without a name"} (HDF5 filter ${unknown.id})`;
  const advice = "write the file again with deflate compression; its other variables stay readable";
  throw fileFault(`${path}: ${name}`, "a codec that HDF5 brings along (deflate, szip, scale-offset)", got, advice);
}

function readWindow(
  path: string,
  fileId: bigint,
  variable: VariableInfo,
  start: readonly number[],
  count: readonly number[],
): NumericArray {
  const where = `${path}: ${variable.name}`;
  const values = checkWindow(variable, start, count, where);
  const type = variable.type as Exclude<typeof variable.type, "string">;
  const empty = fromLittleEndian(new Uint8Array(0), type);
  if (values === 0) return empty;
  const bytes = values * empty.BYTES_PER_ELEMENT;
  // The library holds one decompressed chunk at a time.
  if (variable.chunks)
    refuseHugeRead(
      variable.chunks.reduce((product, length) => product * length, empty.BYTES_PER_ELEMENT),
      where,
    );
  return callHdf5(path, variable.name, (library) => {
    const pointer = library._malloc(bytes);
    if (pointer === 0) throw new Error(`no memory for ${bytes} bytes`);
    try {
      const whole = count.length === 0;
      const ones = count.map(() => 1n);
      const [size, offset] = [count.map(BigInt), start.map(BigInt)];
      const objectPath = `/${variable.name}`;
      checkStatus(
        whole
          ? library.get_dataset_data(fileId, objectPath, null, null, null, BigInt(pointer))
          : library.get_dataset_data(fileId, objectPath, size, offset, ones, BigInt(pointer)),
      );
      return fromLittleEndian(library.HEAPU8.subarray(pointer, pointer + bytes), type);
    } finally {
      library._free(pointer);
    }
  });
}
