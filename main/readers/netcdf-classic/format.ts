import type { Container, FileFormat, NumericArray } from "../container";
import { arrayTypes } from "../container";
import { fileFault } from "../faults";
import { checkWindow } from "../window";
import { ByteFile } from "./bytes";
import type { ClassicVariable } from "./header";
import { readClassicHeader } from "./header";
import { fromBigEndian } from "./types";

const titles = { 1: "netCDF classic", 2: "netCDF classic, 64-bit offsets", 5: "netCDF classic, 64-bit data" } as const;

/**
 * Classic netCDF (CDF-1, CDF-2, CDF-5), read at positions: only the header and the windows asked for are read. The format
 * keeps no checksum, so that a flipped bit inside the data cannot be noticed; a damaged header or a cut file is.
 */
export const netcdfClassic: FileFormat = {
  id: "netcdf-classic",
  title: "netCDF classic",
  extensions: [".nc", ".nc3", ".cdf"],
  recognises: (head) => head[0] === 0x43 && head[1] === 0x44 && head[2] === 0x46 && [1, 2, 5].includes(head[3]),
  async open(path) {
    return openClassic(path);
  },
};

function openClassic(path: string): Container {
  const file = new ByteFile(path);
  try {
    const header = readClassicHeader(file);
    const byName = new Map(header.variables.map((variable) => [variable.name, variable]));
    return {
      path,
      format: titles[header.version],
      bytes: file.size,
      attributes: header.attributes,
      dimensions: header.dimensions,
      variables: header.variables.map(({ name, type, shape, dimensions, attributes, isRecord }) => ({
        name,
        type,
        shape,
        dimensions,
        attributes,
        chunks: isRecord ? [1, ...shape.slice(1)] : null,
      })),
      read(name, start, count) {
        const variable = byName.get(name);
        if (!variable) throw fileFault(path, `a variable ${name}`, "no such variable", "choose one that the file has");
        return readWindow(file, variable, header.recordBytes, start, count);
      },
      close: () => file.close(),
    };
  } catch (error) {
    file.close();
    throw error;
  }
}

function readWindow(
  file: ByteFile,
  variable: ClassicVariable,
  recordBytes: number,
  start: readonly number[],
  count: readonly number[],
): NumericArray {
  const { shape, type, begin, isRecord } = variable;
  const values = checkWindow({ ...variable, chunks: null }, start, count, `${file.path}: ${variable.name}`);
  const valueBytes = arrayTypes[type].BYTES_PER_ELEMENT;
  const target = new Uint8Array(values * valueBytes);
  if (values === 0) return fromBigEndian(target, type);

  // Bytes from one index to the next along each dimension.
  const strides = new Array<number>(shape.length);
  for (let i = shape.length - 1, stride = valueBytes; i >= 0; stride *= shape[i], i--) strides[i] = stride;
  if (isRecord) strides[0] = recordBytes;

  // The innermost dimensions that are read whole, and the next one, lie in one run of bytes.
  let inner = shape.length;
  let run = valueBytes;
  while (inner > 0 && strides[inner - 1] === run) {
    inner--;
    run *= count[inner];
    if (count[inner] !== shape[inner]) break;
  }
  const origin = start.reduce((sum, index, i) => sum + index * strides[i], begin);
  const index = new Array<number>(inner).fill(0);
  for (let done = 0; done < target.length; done += run) {
    const position = index.reduce((sum, at, i) => sum + at * strides[i], origin);
    file.read(target.subarray(done, done + run), position);
    for (let i = inner - 1; i >= 0 && ++index[i] === count[i]; i--) index[i] = 0;
  }
  return fromBigEndian(target, type);
}
