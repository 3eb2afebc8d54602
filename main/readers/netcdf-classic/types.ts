import type { NumericArray, StoredType } from "../container";
import { arrayTypes } from "../container";

/** External types of the classic format by their code; 7 to 11 exist in CDF-5 only. */
export const classicTypes: Readonly<Record<number, Exclude<StoredType, "string">>> = {
  1: "int8",
  2: "char",
  3: "int16",
  4: "int32",
  5: "float32",
  6: "float64",
  7: "uint8",
  8: "uint16",
  9: "uint32",
  10: "int64",
  11: "uint64",
};

/** Turns big-endian bytes, which it may overwrite, into a typed array. `bytes` starts at a multiple of the value size. */
export function fromBigEndian(bytes: Uint8Array, type: Exclude<StoredType, "string">): NumericArray {
  const arrayType = arrayTypes[type];
  const view = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (arrayType.BYTES_PER_ELEMENT === 2) view.swap16();
  if (arrayType.BYTES_PER_ELEMENT === 4) view.swap32();
  if (arrayType.BYTES_PER_ELEMENT === 8) view.swap64();
  return new arrayType(bytes.buffer as ArrayBuffer, bytes.byteOffset, bytes.byteLength / arrayType.BYTES_PER_ELEMENT);
}
