import { describe, expect, it } from "vitest";
import type { Attributes, NumericArray, StoredType } from "../../../main/readers/container";
import type { PackingChoices } from "../../../main/readers/packing";
import { noMasked, readPacking, unpack } from "../../../main/readers/packing";

function decode(raw: NumericArray, type: StoredType, attributes: Attributes, choices?: PackingChoices, factor = 1) {
  const shape = [raw.length];
  const packing = readPacking(
    { name: "sla", type, shape, dimensions: ["x"], attributes, chunks: null },
    "a.nc: sla",
    choices,
  );
  const counts = noMasked();
  const values = new Float64Array(raw.length);
  unpack(raw, packing, factor, counts, values);
  return { values: [...values], counts, notes: packing.notes };
}

it("a packed value is exactly scale × raw + offset in float64, also for a scale stored as float32", () => {
  const raw = Int16Array.of(1234, -1, 0, 32767);
  const scale = Math.fround(1e-4);
  const { values } = decode(raw, "int16", { scale_factor: Float32Array.of(1e-4), add_offset: Float32Array.of(0.5) });
  expect(values).toEqual([...raw].map((value) => scale * value + 0.5));
  expect(decode(Int16Array.of(1234), "int16", { scale_factor: Float64Array.of(1e-4) }).values).toEqual([1234 * 1e-4]);
});

it("the fill value is compared before unpacking, so that a height of the same number stays", () => {
  const attributes = {
    _FillValue: Int16Array.of(-32767),
    scale_factor: Float64Array.of(1),
    add_offset: Float64Array.of(-32768),
  };
  const { values, counts } = decode(Int16Array.of(-32767, 1), "int16", attributes);
  expect(values).toEqual([Number.NaN, -32767]);
  expect(counts).toEqual({ fill: 1, validRange: 0, notFinite: 0 });
});

it("missing_value of several values masks each, and a value outside the valid range is counted apart", () => {
  const attributes = {
    missing_value: Int16Array.of(-1, -2, -3),
    valid_min: Int16Array.of(0),
    valid_max: Int16Array.of(100),
  };
  const { values, counts } = decode(Int16Array.of(-1, -2, -3, -4, 0, 100, 101), "int16", attributes);
  expect(values).toEqual([Number.NaN, Number.NaN, Number.NaN, Number.NaN, 0, 100, Number.NaN]);
  expect(counts).toEqual({ fill: 3, validRange: 2, notFinite: 0 });
});

it("valid_range is inclusive and can be switched off", () => {
  const attributes = { valid_range: Int16Array.of(-5, 5) };
  const raw = Int16Array.of(-6, -5, 5, 6);
  expect(decode(raw, "int16", attributes).values).toEqual([Number.NaN, -5, 5, Number.NaN]);
  expect(decode(raw, "int16", attributes, { applyValidRange: false }).values).toEqual([...raw]);
});

it("a floating-point valid range beside packed integers masks nothing and is noted", () => {
  const attributes = { valid_range: Float64Array.of(-5, 5), scale_factor: Float64Array.of(1e-3) };
  const { counts, notes } = decode(Int16Array.of(-3000, 3000), "int16", attributes);
  expect(counts.validRange).toBe(0);
  expect(notes).toEqual(["valid_range is Float64 beside int16 data: left out"]);
});

it("an integer valid range of another width is compared as the data are stored, and noted", () => {
  const { values, notes } = decode(Int16Array.of(-3, 3), "int16", { valid_min: Int32Array.of(0) });
  expect(values).toEqual([Number.NaN, 3]);
  expect(notes).toEqual(["valid_min is Int32 beside int16 data: compared as the data are stored"]);
});

it("a fill value that the packed type cannot hold masks nothing and is noted", () => {
  const { counts, notes } = decode(Int16Array.of(1), "int16", { missing_value: Float32Array.of(1e20) });
  expect(counts.fill).toBe(0);
  expect(notes[0]).toMatch(/missing_value .* cannot occur in int16 data/);
});

describe("_Unsigned", () => {
  it('"true" reads int8 as 0 to 255, its signed fill value included', () => {
    const attributes = { _Unsigned: "true", _FillValue: Int8Array.of(-1) };
    expect(decode(Int8Array.of(-1, -2, 5), "int8", attributes).values).toEqual([Number.NaN, 254, 5]);
  });

  it('"false" leaves int8 signed and reads uint8 as signed', () => {
    expect(decode(Int8Array.of(-2), "int8", { _Unsigned: "false" }).values).toEqual([-2]);
    expect(decode(Uint8Array.of(254), "uint8", { _Unsigned: "false" }).values).toEqual([-2]);
  });
});

it("64-bit fill values are compared exactly", () => {
  const fill = 9007199254740993n;
  const { values, counts } = decode(BigInt64Array.of(fill, fill - 1n, 7n), "int64", {
    _FillValue: BigInt64Array.of(fill),
  });
  expect(values).toEqual([Number.NaN, 9007199254740992, 7]);
  expect(counts.fill).toBe(1);
});

it("a float32 fill given as float64 is found, NaN and infinity are counted as not finite", () => {
  const raw = Float32Array.of(1e20, Number.NaN, Number.POSITIVE_INFINITY, 0.5);
  const { values, counts } = decode(raw, "float32", { _FillValue: Float64Array.of(1e20) });
  expect(values).toEqual([Number.NaN, Number.NaN, Number.NaN, 0.5]);
  expect(counts).toEqual({ fill: 1, validRange: 0, notFinite: 2 });
});

it("a NaN fill value counts NaN as fill", () => {
  const { counts } = decode(Float32Array.of(Number.NaN, 1), "float32", { _FillValue: Float32Array.of(Number.NaN) });
  expect(counts).toEqual({ fill: 1, validRange: 0, notFinite: 0 });
});

it("values the library never wrote are missing even where the file names no fill value, but bytes have none", () => {
  expect(decode(Int16Array.of(-32767, 1), "int16", {}).values).toEqual([Number.NaN, 1]);
  expect(decode(Int8Array.of(-127, 1), "int8", {}).values).toEqual([-127, 1]);
});

it("centimetres become metres", () => {
  expect(decode(Float64Array.of(250), "float64", {}, {}, 0.01).values).toEqual([2.5]);
});

it("a scale factor of zero and strings are refused with file and variable named", () => {
  expect(() => decode(Int16Array.of(1), "int16", { scale_factor: Float64Array.of(0) })).toThrow(
    /^a\.nc: sla: expected a finite scale/,
  );
  expect(() => decode(Int16Array.of(1), "string", {})).toThrow(/^a\.nc: sla: expected numbers, got strings/);
});
