/** The numbers a file holds, as stored (packed values stay packed; 64-bit integers stay exact). */
export type NumericArray =
  | Int8Array
  | Uint8Array
  | Int16Array
  | Uint16Array
  | Int32Array
  | Uint32Array
  | BigInt64Array
  | BigUint64Array
  | Float32Array
  | Float64Array;

/** How the values of each stored type are held and how many bytes one takes; "string" has no fixed size. */
export const arrayTypes = {
  int8: Int8Array,
  uint8: Uint8Array,
  int16: Int16Array,
  uint16: Uint16Array,
  int32: Int32Array,
  uint32: Uint32Array,
  int64: BigInt64Array,
  uint64: BigUint64Array,
  float32: Float32Array,
  float64: Float64Array,
  char: Uint8Array,
} as const;

export type StoredType = keyof typeof arrayTypes | "string";

/** Text, several texts, or numbers in a typed array whose kind is the type in the file. */
export type AttributeValue = string | readonly string[] | NumericArray;
export type Attributes = Readonly<Record<string, AttributeValue>>;

export interface VariableInfo {
  /** Path without the leading slash for a variable in a group: "data/sla". */
  readonly name: string;
  readonly type: StoredType;
  readonly shape: readonly number[];
  readonly dimensions: readonly string[];
  /** Read from the file when first asked for. */
  readonly attributes: Attributes;
  /** Shape of the pieces the file stores and compresses; null where it stores the variable in one run. */
  readonly chunks: readonly number[] | null;
}

/** An open file of any format, with random access to its variables. */
export interface Container {
  readonly path: string;
  /** A person's name for the format, e.g. "netCDF-4". */
  readonly format: string;
  readonly bytes: number;
  readonly attributes: Attributes;
  readonly dimensions: readonly { readonly name: string; readonly length: number }[];
  readonly variables: readonly VariableInfo[];
  /**
   * The window of `count` values from `start` along each dimension, row-major. Throws a Fault (tag "file") for an unknown
   * variable, a window outside it, a variable of strings, or data that the file does not hold or that are damaged.
   */
  read(name: string, start: readonly number[], count: readonly number[]): NumericArray;
  close(): void;
}

/** One file format. Registered with one line in index.ts. */
export interface FileFormat {
  readonly id: string;
  readonly title: string;
  readonly extensions: readonly string[];
  /** Whether the first bytes (at least 2,056 where the file has them) are this format's. */
  recognises(head: Uint8Array): boolean;
  open(path: string): Promise<Container>;
}

export function findVariable(container: Container, name: string): VariableInfo | undefined {
  return container.variables.find((variable) => variable.name === name);
}

/** The last part of a variable's path. */
export function baseName(name: string): string {
  return name.slice(name.lastIndexOf("/") + 1);
}

/** All of a variable. */
export function readAll(container: Container, variable: VariableInfo): NumericArray {
  return container.read(
    variable.name,
    variable.shape.map(() => 0),
    variable.shape,
  );
}
