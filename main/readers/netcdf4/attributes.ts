import type { Attributes, AttributeValue } from "../container";
import { fileFault } from "../faults";
import { callHdf5, checkStatus } from "./library";
import { fromLittleEndian, storedType, typeClass } from "./types";

/** Attributes by which netCDF-4 keeps its own books; no person set them. */
const bookkeeping = new Set([
  "CLASS",
  "NAME",
  "REFERENCE_LIST",
  "DIMENSION_LIST",
  "_Netcdf4Dimid",
  "_Netcdf4Coordinates",
  "_NCProperties",
  "_nc3_strict",
]);

const largestAttributeBytes = 2 ** 24;

/** All attributes of the object at `objectPath`, those of types not read here (compound, reference) left out. */
export function readAttributes(path: string, fileId: bigint, objectPath: string): Attributes {
  const names = callHdf5(path, objectPath, (library) => library.get_attribute_names(fileId, objectPath));
  const attributes: Record<string, AttributeValue> = {};
  for (const name of names) {
    if (bookkeeping.has(name)) continue;
    const value = readAttribute(path, fileId, objectPath, name);
    if (value !== null) attributes[name] = value;
  }
  return attributes;
}

/** One attribute; null where it is missing, empty or of a type not read here. */
export function readAttribute(path: string, fileId: bigint, objectPath: string, name: string): AttributeValue | null {
  return callHdf5(path, `${objectPath.slice(1)}@${name}`, (library) => {
    const metadata = library.get_attribute_metadata(fileId, objectPath, name);
    const type = storedType(metadata);
    if (type === null) return null;
    const isText = metadata.type === typeClass.string;
    // An attribute with a null data space is how empty text is written.
    if (!metadata.shape || metadata.total_size === 0) return isText ? "" : null;
    const bytes = metadata.size * metadata.total_size;
    if (bytes > largestAttributeBytes) {
      throw fileFault(path, "attributes below 16 MiB", `${bytes} bytes in ${name}`, "the file is damaged");
    }
    const pointer = library._malloc(bytes);
    if (pointer === 0) throw new Error("no memory for an attribute");
    try {
      library.HEAPU8.fill(0, pointer, pointer + bytes);
      checkStatus(library.get_attribute_data(fileId, objectPath, name, BigInt(pointer)));
      const raw = library.HEAPU8.slice(pointer, pointer + bytes);
      if (!isText) return fromLittleEndian(raw, type as Exclude<typeof type, "string">);
      if (!metadata.vlen) return oneOrMany(fixedTexts(raw, metadata.size));
      const texts = [...new Uint32Array(raw.buffer)].map((at) => (at === 0 ? "" : library.UTF8ToString(at)));
      library.reclaim_vlen_memory(fileId, objectPath, name, BigInt(pointer));
      return oneOrMany(texts);
    } finally {
      library._free(pointer);
    }
  });
}

function fixedTexts(raw: Uint8Array, size: number): string[] {
  const decoder = new TextDecoder();
  return Array.from({ length: raw.length / size }, (_, i) => {
    const bytes = raw.subarray(i * size, (i + 1) * size);
    const end = bytes.indexOf(0);
    return decoder.decode(end < 0 ? bytes : bytes.subarray(0, end));
  });
}

function oneOrMany(texts: string[]): AttributeValue {
  return texts.length === 1 ? texts[0] : texts;
}
