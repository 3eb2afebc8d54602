import { writeFileSync } from "node:fs";

type Values = Int8Array | Int16Array | Int32Array | Float32Array | Float64Array;
export type WrittenAttribute = string | Values;

export interface WrittenVariable {
  readonly name: string;
  readonly dimensions: readonly string[];
  readonly attributes?: Readonly<Record<string, WrittenAttribute>>;
  readonly values: Values;
}

export interface WrittenFile {
  readonly dimensions: Readonly<Record<string, number>>;
  readonly attributes?: Readonly<Record<string, WrittenAttribute>>;
  readonly variables: readonly WrittenVariable[];
}

const codes = new Map<unknown, number>([
  [Int8Array, 1],
  [Int16Array, 3],
  [Int32Array, 4],
  [Float32Array, 5],
  [Float64Array, 6],
]);

/** Writes a CDF-2 file without record dimension, for tests: netCDF Classic Format Specification. */
export function writeClassic(path: string, file: WrittenFile): void {
  writeFileSync(path, classicBytes(file));
}

export function classicBytes({ dimensions, attributes = {}, variables }: WrittenFile): Buffer {
  const names = Object.keys(dimensions);
  const headerLength = header(0).length;
  return Buffer.concat([header(headerLength), ...variables.map(({ values }) => padded(bigEndian(values)))]);

  function header(dataStart: number): Buffer {
    let begin = dataStart;
    const parts = [
      Buffer.from("CDF\x02"),
      int32(0),
      list(
        0x0a,
        names.map((name) => [text(name), int32(dimensions[name])]),
      ),
    ];
    parts.push(attributeList(attributes));
    const entries = variables.map(({ name, dimensions: over, attributes: own = {}, values }) => {
      const length = padded(bigEndian(values)).length;
      const ids = over.map((dimension) => int32(names.indexOf(dimension)));
      const offset = Buffer.alloc(8);
      offset.writeBigUInt64BE(BigInt(begin));
      begin += length;
      return [
        text(name),
        int32(over.length),
        ...ids,
        attributeList(own),
        int32(typeCode(values)),
        int32(length),
        offset,
      ];
    });
    return Buffer.concat([...parts, list(0x0b, entries)]);
  }
}

function attributeList(attributes: Readonly<Record<string, WrittenAttribute>>): Buffer {
  const entries = Object.entries(attributes).map(([name, value]) =>
    typeof value === "string"
      ? [text(name), int32(2), text(value)]
      : [text(name), int32(typeCode(value)), int32(value.length), padded(bigEndian(value))],
  );
  return list(0x0c, entries);
}

function list(tag: number, entries: readonly (readonly Buffer[])[]): Buffer {
  if (entries.length === 0) return Buffer.alloc(8);
  return Buffer.concat([int32(tag), int32(entries.length), ...entries.flat()]);
}

function typeCode(values: Values): number {
  return codes.get(values.constructor) as number;
}

function bigEndian(values: Values): Buffer {
  const bytes = Buffer.from(values.slice().buffer);
  if (values.BYTES_PER_ELEMENT === 2) bytes.swap16();
  if (values.BYTES_PER_ELEMENT === 4) bytes.swap32();
  if (values.BYTES_PER_ELEMENT === 8) bytes.swap64();
  return bytes;
}

function text(value: string): Buffer {
  const bytes = Buffer.from(value);
  return Buffer.concat([int32(bytes.length), padded(bytes)]);
}

function padded(bytes: Buffer): Buffer {
  return Buffer.concat([bytes, Buffer.alloc((4 - (bytes.length % 4)) % 4)]);
}

function int32(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeInt32BE(value);
  return bytes;
}
