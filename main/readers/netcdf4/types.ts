import type { Metadata } from "h5wasm/node";
import type { NumericArray, StoredType } from "../container";
import { arrayTypes } from "../container";

/** HDF5 type classes (H5T_class_t). */
export const typeClass = { integer: 0, float: 1, string: 3, enumeration: 8 } as const;

/** The stored type of an HDF5 type; enumerations, booleans among them, as their integers. Null for one not read here. */
export function storedType(metadata: Metadata): StoredType | null {
  const { type, size, signed } = metadata;
  if (type === typeClass.string) return !metadata.vlen && size === 1 ? "char" : "string";
  if (type === typeClass.float) return size === 4 ? "float32" : size === 8 ? "float64" : null;
  if (type !== typeClass.integer && type !== typeClass.enumeration) return null;
  const name = `${signed ? "" : "u"}int${size * 8}`;
  return name in arrayTypes ? (name as StoredType) : null;
}

/** A copy of `bytes` (little-endian, as the library hands them over) as a typed array. */
export function fromLittleEndian(bytes: Uint8Array, type: Exclude<StoredType, "string">): NumericArray {
  const arrayType = arrayTypes[type];
  return new arrayType(bytes.slice().buffer as ArrayBuffer);
}
