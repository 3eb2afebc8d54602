import { writeFileWhole } from "../../main/writers/atomic-file";
import type { AttributeValue, Netcdf4Spec, NetcdfVariable, TypedValues } from "../../main/writers/netcdf4";

/** Type numbers and sizes of the classic format (NetCDF Classic Format Specification, Unidata). */
const classicTypes = {
  int8: { code: 1, bytes: 1 },
  char: { code: 2, bytes: 1 },
  int16: { code: 3, bytes: 2 },
  int32: { code: 4, bytes: 4 },
  float32: { code: 5, bytes: 4 },
  float64: { code: 6, bytes: 8 },
} as const;

type ClassicType = keyof typeof classicTypes;

const listTags = { dimensions: 0x0a, variables: 0x0b, attributes: 0x0c } as const;

/**
 * Writes the classic format with 64-bit offsets (CDF-2): big-endian, fixed dimensions, nothing compressed. Takes the same
 * spec as the netCDF-4 writer, less slabs and unsigned bytes; chunks and compression are passed over.
 */
export async function writeClassicNetcdf(path: string, spec: Netcdf4Spec): Promise<void> {
  // Offsets take a fixed number of bytes, so that a header with zeros in their place has the final length.
  let begin = header(
    spec,
    spec.variables.map(() => 0),
  ).length;
  const begins = spec.variables.map((variable) => {
    const here = begin;
    begin += storedBytes(variable).length;
    return here;
  });
  await writeFileWhole(path, Buffer.concat([header(spec, begins), ...spec.variables.map(storedBytes)]));
}

function header(spec: Netcdf4Spec, begins: readonly number[]): Buffer {
  const names = Object.keys(spec.dimensions);
  const noRecords = word(0);
  return Buffer.concat([
    Buffer.from("CDF\x02", "latin1"),
    noRecords,
    list(
      listTags.dimensions,
      names.map((name) => Buffer.concat([text(name), word(spec.dimensions[name])])),
    ),
    attributes(spec.attributes ?? {}),
    list(
      listTags.variables,
      spec.variables.map((variable, i) => {
        const offset = Buffer.alloc(8);
        offset.writeBigUInt64BE(BigInt(begins[i]));
        const fill: Record<string, AttributeValue> =
          variable.fillValue === undefined ? {} : { _FillValue: variable.fillValue };
        return Buffer.concat([
          text(variable.name),
          word(variable.dimensions.length),
          ...variable.dimensions.map((name) => word(names.indexOf(name))),
          attributes({ ...fill, ...variable.attributes }, classicType(variable)),
          word(classicTypes[classicType(variable)].code),
          word(storedBytes(variable).length),
          offset,
        ]);
      }),
    ),
  ]);
}

/** The fill value takes the variable's type; other numbers are doubles. */
function attributes(values: Readonly<Record<string, AttributeValue>>, ownType: ClassicType = "float64"): Buffer {
  return list(
    listTags.attributes,
    Object.entries(values).map(([name, value]) => {
      if (typeof value === "string") {
        const bytes = Buffer.from(value, "utf8");
        return Buffer.concat([text(name), word(classicTypes.char.code), word(bytes.length), padded(bytes)]);
      }
      const numbers = typeof value === "number" ? [value] : Array.from(value);
      const type = name === "_FillValue" ? ownType : "float64";
      return Buffer.concat([text(name), word(classicTypes[type].code), word(numbers.length), bigEndian(numbers, type)]);
    }),
  );
}

function classicType({ name, type }: NetcdfVariable): ClassicType {
  if (type === "uint8") throw new RangeError(`${name}: the classic format holds no unsigned bytes`);
  return type;
}

function storedBytes(variable: NetcdfVariable): Buffer {
  if (typeof variable.values === "function") throw new RangeError(`${variable.name}: expected values, got slabs`);
  return bigEndian(variable.values, classicType(variable));
}

function bigEndian(values: TypedValues | readonly number[], type: ClassicType): Buffer {
  const { bytes } = classicTypes[type];
  const buffer = Buffer.alloc(Math.ceil((values.length * bytes) / 4) * 4);
  values.forEach((value, i) => {
    if (type === "float64") buffer.writeDoubleBE(value, i * bytes);
    else if (type === "float32") buffer.writeFloatBE(value, i * bytes);
    else buffer.writeIntBE(value, i * bytes, bytes);
  });
  return buffer;
}

function list(tag: number, members: readonly Buffer[]): Buffer {
  return Buffer.concat([word(members.length > 0 ? tag : 0), word(members.length), ...members]);
}

function text(value: string): Buffer {
  const bytes = Buffer.from(value, "utf8");
  return Buffer.concat([word(bytes.length), padded(bytes)]);
}

function padded(bytes: Buffer): Buffer {
  return Buffer.concat([bytes, Buffer.alloc((4 - (bytes.length % 4)) % 4)]);
}

function word(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32BE(value);
  return bytes;
}
