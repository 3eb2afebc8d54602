import type { MaskCounts } from "../../core/model/source";
import { numbersAttribute, textAttribute } from "./attributes";
import type { NumericArray, StoredType, VariableInfo } from "./container";
import { arrayTypes } from "./container";
import { fileFault } from "./faults";

type Packed = number | bigint;
type NumericType = Exclude<StoredType, "string">;

/** How a variable's stored values become numbers. Plain data. */
export interface Packing {
  /** The type after _Unsigned is applied: valid and fill values are compared in it. */
  readonly type: NumericType;
  readonly fills: readonly Packed[];
  /** null: no lower, or no upper, bound. */
  readonly validMin: Packed | null;
  readonly validMax: Packed | null;
  readonly scale: number;
  readonly offset: number;
  /** What was not as CF wants it and what was done. */
  readonly notes: readonly string[];
}

export interface PackingChoices {
  /** Whether valid_min, valid_max and valid_range mask values; default true. */
  readonly applyValidRange?: boolean;
}

/** What the netCDF library fills unwritten values with; bytes have no default (netCDF-C, netcdf.h). */
const defaultFills: Partial<Record<StoredType, Packed>> = {
  int16: -32767,
  uint16: 65535,
  int32: -2147483647,
  uint32: 4294967295,
  int64: -9223372036854775806n,
  uint64: 18446744073709551614n,
  float32: 9.969209968386869e36,
  float64: 9.969209968386869e36,
};

/**
 * Reads packing and masking from a variable's attributes by CF-1.11 sections 2.5.1 and 8.1. Fill and valid values are in
 * the packed type. One of another type is taken where it means the same number in the packed type; a valid range that is
 * floating point beside packed integers may be in unpacked units and is left out, with a note. Throws a Fault (tag
 * "file") for strings and for a scale factor that is zero or not finite. `where` names file and variable.
 */
export function readPacking(variable: VariableInfo, where: string, choices: PackingChoices = {}): Packing {
  const { attributes } = variable;
  if (variable.type === "string") {
    throw fileFault(where, "numbers", "strings", "name a variable that holds numbers");
  }
  const notes: string[] = [];
  const type = signedness(variable.type, textAttribute(attributes, "_Unsigned"));
  const fills = new Set<Packed>();
  for (const name of ["_FillValue", "missing_value"]) {
    for (const value of Array.from(numbersAttribute(attributes, name) ?? [])) {
      const packed = toPacked(value, type);
      if (packed === null) notes.push(`${name} ${value} cannot occur in ${type} data and is left out`);
      else fills.add(packed);
    }
  }
  const defaultFill = defaultFills[variable.type];
  if (!numbersAttribute(attributes, "_FillValue") && defaultFill !== undefined) {
    fills.add(toPacked(defaultFill, type) ?? defaultFill);
  }
  const { validMin, validMax } =
    choices.applyValidRange === false ? { validMin: null, validMax: null } : validRange(variable, type, notes);
  const scale = Number(numbersAttribute(attributes, "scale_factor")?.[0] ?? 1);
  const offset = Number(numbersAttribute(attributes, "add_offset")?.[0] ?? 0);
  if (!Number.isFinite(scale) || scale === 0 || !Number.isFinite(offset)) {
    const got = `scale_factor ${scale}, add_offset ${offset}`;
    throw fileFault(where, "a finite scale factor other than zero", got, "correct the packing attributes");
  }
  return { type, fills: [...fills], validMin, validMax, scale, offset, notes };
}

/** _Unsigned is text, "true" or "false" (netCDF Users Guide, Attribute Conventions); other text changes nothing. */
function signedness(type: NumericType, unsigned: string): NumericType {
  const wanted = unsigned.toLowerCase();
  if (wanted === "true" && /^int/.test(type)) return `u${type}` as NumericType;
  if (wanted === "false" && /^uint/.test(type)) return type.slice(1) as NumericType;
  return type === "char" ? "uint8" : type;
}

/** `value` as the packed type would hold it, a fill of the other signedness by its bits; null where it cannot. */
function toPacked(value: Packed, type: NumericType): Packed | null {
  const holder = new arrayTypes[type](1);
  if (holder instanceof BigInt64Array || holder instanceof BigUint64Array) {
    if (typeof value === "number" && !Number.isInteger(value)) return null;
    const big = BigInt(value);
    holder[0] = big;
    return big >= -(2n ** 63n) && big < 2n ** 64n ? holder[0] : null;
  }
  const number = Number(value);
  holder[0] = number;
  if (holder instanceof Float32Array || holder instanceof Float64Array) return holder[0];
  if (holder[0] === number) return number;
  const bits = 8 * holder.BYTES_PER_ELEMENT;
  return Number.isInteger(number) && number >= -(2 ** (bits - 1)) && number < 2 ** bits ? holder[0] : null;
}

function validRange(
  variable: VariableInfo,
  type: NumericType,
  notes: string[],
): { validMin: Packed | null; validMax: Packed | null } {
  const { attributes } = variable;
  const bounds: [name: string, index: number, isLower: boolean][] = [
    ["valid_min", 0, true],
    ["valid_max", 0, false],
    ["valid_range", 0, true],
    ["valid_range", 1, false],
  ];
  const found: { validMin: Packed | null; validMax: Packed | null } = { validMin: null, validMax: null };
  for (const [name, index, isLower] of bounds) {
    const values = numbersAttribute(attributes, name);
    const value = values?.[index];
    if (values === null || value === undefined) continue;
    const own =
      values.constructor === arrayTypes[type] || values.constructor === arrayTypes[variable.type as NumericType];
    const isInteger = !/^float/.test(type);
    const isFloatBound = values instanceof Float32Array || values instanceof Float64Array;
    const packed = isInteger && isFloatBound ? null : toPacked(value, type);
    if (!own && (index === 0 || name !== "valid_range")) {
      const stated = `${name} is ${values.constructor.name.replace("Array", "")} beside ${variable.type} data`;
      notes.push(`${stated}: ${packed === null ? "left out" : "compared as the data are stored"}`);
    }
    if (packed !== null) found[isLower ? "validMin" : "validMax"] = packed;
  }
  return found;
}

/** Running counts of masked values; starts at zero. */
export type MutableMaskCounts = { -readonly [rule in keyof MaskCounts]: number };

export function noMasked(): MutableMaskCounts {
  return { fill: 0, validRange: 0, notFinite: 0 };
}

/**
 * Stored values to numbers: scale * raw + offset in float64, times `factor` where it is not 1. Fill values, values out of the valid
 * range and non-finite ones become NaN and are counted, each under the first of these rules that it breaks. `raw` is as
 * stored; writes `raw.length` values to `target` from `at`.
 */
export function unpack(
  raw: NumericArray,
  packing: Packing,
  factor: number,
  counts: MutableMaskCounts,
  target: Float64Array,
  at = 0,
): void {
  const { scale, offset, type, fills, validMin, validMax } = packing;
  const arrayType = arrayTypes[type];
  // _Unsigned reads the same bits with the other signedness.
  const values = (raw.constructor === arrayType
    ? raw
    : new arrayType(raw.buffer as ArrayBuffer, raw.byteOffset, raw.length)) as unknown as ArrayLike<Packed>;
  const isBig = raw.BYTES_PER_ELEMENT === 8 && !(raw instanceof Float64Array);
  const lower = validMin ?? (isBig ? -(2n ** 64n) : Number.NEGATIVE_INFINITY);
  const upper = validMax ?? (isBig ? 2n ** 64n : Number.POSITIVE_INFINITY);
  const unset = fills[0] ?? Number.NaN;
  const [first, second] = [unset, fills[1] ?? unset];
  const more = fills.length > 2 ? fills.slice(2) : null;
  const nanIsFill = fills.some((fill) => Number.isNaN(fill));
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    let result = Number.NaN;
    if (value === first || value === second || more?.includes(value)) counts.fill++;
    else if (Number.isNaN(value)) counts[nanIsFill ? "fill" : "notFinite"]++;
    else if (value < lower || value > upper) counts.validRange++;
    else {
      result = scale * Number(value) + offset;
      if (factor !== 1) result *= factor;
      if (result - result !== 0) {
        counts.notFinite++;
        result = Number.NaN;
      }
    }
    target[at + i] = result;
  }
}
