import type { Attributes, AttributeValue, StoredType } from "../container";
import { arrayTypes } from "../container";
import { fileFault } from "../faults";
import type { ByteFile } from "./bytes";
import { HeaderCursor } from "./bytes";
import { classicTypes, fromBigEndian } from "./types";

export interface ClassicVariable {
  readonly name: string;
  readonly type: Exclude<StoredType, "string">;
  readonly shape: readonly number[];
  readonly dimensions: readonly string[];
  readonly attributes: Attributes;
  readonly isRecord: boolean;
  /** Byte at which the variable, or its part of the first record, begins. */
  readonly begin: number;
  /** Bytes of the variable, or of its part of one record, without padding. */
  readonly bytes: number;
}

export interface ClassicHeader {
  readonly version: 1 | 2 | 5;
  readonly dimensions: readonly { readonly name: string; readonly length: number }[];
  readonly attributes: Attributes;
  readonly variables: readonly ClassicVariable[];
  /** Bytes from one record to the next; 0 without record variables. */
  readonly recordBytes: number;
}

interface Dimension {
  readonly name: string;
  readonly length: number;
  readonly isRecord: boolean;
}

type RawVariable = Omit<ClassicVariable, "shape" | "bytes" | "isRecord" | "dimensions"> & {
  readonly dimensionIds: readonly number[];
};

/** Tags of the header's lists. */
const listTags = { dimensions: 0x0a, variables: 0x0b, attributes: 0x0c } as const;

/**
 * Reads the header of a classic netCDF file (CDF-1, CDF-2 and CDF-5: netCDF Classic Format Specification, and the CDF-5
 * extension of PnetCDF). Every count is checked against the file's size before anything of that size is allocated, and
 * every variable's data must lie inside the file, so that a cut file is a Fault that says how much is missing.
 */
export function readClassicHeader(file: ByteFile): ClassicHeader {
  return new HeaderReader(file).read();
}

class HeaderReader {
  private readonly cursor: HeaderCursor;
  private version: 1 | 2 | 5 = 1;

  constructor(private readonly file: ByteFile) {
    this.cursor = new HeaderCursor(file);
  }

  read(): ClassicHeader {
    const version = this.cursor.bytes(4, "the magic bytes")[3];
    if (version !== 1 && version !== 2 && version !== 5) throw this.damaged("version 1, 2 or 5", `${version}`);
    this.version = version;
    const records = this.recordCount();
    const dimensions = this.list("dimensions", () => this.dimension());
    if (dimensions.filter(({ isRecord }) => isRecord).length > 1) {
      throw this.damaged("one record dimension", "more than one");
    }
    const attributes = this.attributes();
    const raw = this.list("variables", () => this.variable());
    const headerBytes = this.cursor.position;
    const { variables, recordBytes, count } = this.layOut(raw, dimensions, records, headerBytes);
    const named = dimensions.map(({ name, length, isRecord }) => ({ name, length: isRecord ? count : length }));
    return { version, dimensions: named, attributes, variables, recordBytes };
  }

  /** Number of records; null where the writer left it open ("streaming": all bits set). */
  private recordCount(): number | null {
    const count = this.size("the number of records");
    return count === (this.version === 5 ? 2 ** 64 : 2 ** 32 - 1) ? null : count;
  }

  private size(what: string): number {
    return this.version === 5 ? this.cursor.uint64(what) : this.cursor.uint32(what);
  }

  private list<T>(kind: keyof typeof listTags, item: () => T): T[] {
    const tag = this.cursor.uint32(`the list of ${kind}`);
    const count = this.size(`the number of ${kind}`);
    if (tag !== listTags[kind] && !(tag === 0 && count === 0)) {
      throw this.damaged(`the list of ${kind}`, `tag ${tag} with ${count} items`);
    }
    // The smallest item, a dimension with an empty name, takes eight bytes.
    this.cursor.need(count * 8, `${count} ${kind}`);
    return Array.from({ length: count }, item);
  }

  private name(): string {
    const length = this.size("the length of a name");
    const bytes = this.cursor.bytes(length, "a name");
    const text = new TextDecoder().decode(bytes);
    this.cursor.pad(length, "a name");
    return text;
  }

  private dimension(): Dimension {
    const name = this.name();
    const length = this.size("a dimension's length");
    return { name, length, isRecord: length === 0 };
  }

  private attributes(): Attributes {
    return Object.fromEntries(this.list("attributes", () => this.attribute()));
  }

  private attribute(): [string, AttributeValue] {
    const name = this.name();
    const type = this.type();
    const count = this.size("an attribute's length");
    const length = count * arrayTypes[type].BYTES_PER_ELEMENT;
    const bytes = this.cursor.bytes(length, `attribute ${name}`).slice();
    this.cursor.pad(length, `attribute ${name}`);
    if (type !== "char") return [name, fromBigEndian(bytes, type)];
    return [name, new TextDecoder().decode(bytes).replace(/\0+$/, "")];
  }

  private type(): Exclude<StoredType, "string"> {
    const code = this.cursor.uint32("a type");
    const type = classicTypes[code];
    if (type === undefined || (code > 6 && this.version !== 5)) throw this.damaged("a known type", `code ${code}`);
    return type;
  }

  private variable(): RawVariable {
    const name = this.name();
    const rank = this.size("the number of dimensions");
    this.cursor.need(rank * 4, `${rank} dimensions of ${name}`);
    const dimensionIds = Array.from({ length: rank }, () => this.size("a dimension's number"));
    const attributes = this.attributes();
    const type = this.type();
    // The stored size overflows for large variables: the shape says it better.
    this.size("a variable's size");
    const begin = this.version === 1 ? this.cursor.uint32("an offset") : this.cursor.uint64("an offset");
    return { name, type, dimensionIds, attributes, begin };
  }

  private layOut(raw: RawVariable[], dimensions: Dimension[], stored: number | null, headerBytes: number) {
    const perRecord = raw.map((variable) => this.extent(variable, dimensions));
    const records = perRecord.filter(({ isRecord }) => isRecord);
    // A lone record variable of a small type is not padded to four bytes.
    const padded = records.reduce((sum, { bytes }) => sum + Math.ceil(bytes / 4) * 4, 0);
    const recordBytes = records.length === 1 ? records[0].bytes : padded;
    const count = stored ?? this.recordsInFile(records, recordBytes);
    const variables = perRecord.map((variable): ClassicVariable => {
      const { name, type, attributes, begin, bytes, isRecord, lengths, dimensionIds } = variable;
      const shape = isRecord ? [count, ...lengths] : lengths;
      const end = !isRecord ? begin + bytes : count === 0 ? begin : begin + (count - 1) * recordBytes + bytes;
      if (begin < headerBytes && end > begin) throw this.damaged(`${name} after the header`, `offset ${begin}`);
      if (end > this.file.size) {
        const got = `${this.file.size} bytes`;
        throw fileFault(`${this.file.path}: ${name}`, `a file of ${end} bytes`, got, "it is cut: fetch it again");
      }
      const names = dimensionIds.map((id) => dimensions[id].name);
      return { name, type, shape, dimensions: names, attributes, isRecord, begin, bytes };
    });
    return { variables, recordBytes, count };
  }

  private recordsInFile(records: readonly { begin: number }[], recordBytes: number): number {
    if (records.length === 0 || recordBytes === 0) return 0;
    const first = Math.min(...records.map(({ begin }) => begin));
    return Math.max(0, Math.floor((this.file.size - first) / recordBytes));
  }

  private extent(variable: RawVariable, dimensions: Dimension[]) {
    const unknown = variable.dimensionIds.find((id) => id >= dimensions.length);
    if (unknown !== undefined) throw this.damaged(`a dimension of ${variable.name}`, `number ${unknown}`);
    const used = variable.dimensionIds.map((id) => dimensions[id]);
    if (used.some(({ isRecord }, i) => isRecord && i > 0)) {
      throw this.damaged(`the record dimension first in ${variable.name}`, "it stands later");
    }
    const isRecord = used[0]?.isRecord ?? false;
    const lengths = used.slice(isRecord ? 1 : 0).map(({ length }) => length);
    const bytes = lengths.reduce((product, length) => product * length, arrayTypes[variable.type].BYTES_PER_ELEMENT);
    return { ...variable, isRecord, lengths, bytes };
  }

  private damaged(expected: string, got: string) {
    return fileFault(this.file.path, expected, got, "the header is damaged: fetch the file again");
  }
}
