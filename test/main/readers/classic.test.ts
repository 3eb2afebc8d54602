import { readFileSync, truncateSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { Fault } from "../../../core/model/errors";
import { readAll } from "../../../main/readers/container";
import { openContainer } from "../../../main/readers/index";
import { asListed, expectAsPythonSays, expectedFiles } from "./oracle";
import { faultOf, fixture, seeded, temporaryFolder } from "./places";
import { classicBytes } from "./write-classic";

const folder = temporaryFolder();

describe.each([
  ["classic.nc", "netCDF classic"],
  ["lone-record.nc", "netCDF classic"],
  ["offset64.nc", "netCDF classic, 64-bit offsets"],
  ["data64.nc", "netCDF classic, 64-bit data"],
])("%s", (file, format) => {
  it("reads value for value as Python wrote it, whole and in windows", async () => {
    const container = await openContainer(fixture(file));
    expect(container.format).toBe(format);
    expect(container.attributes.title).toBe("Größe");
    expect(container.attributes.version).toEqual(Int16Array.of(7));
    expectAsPythonSays(container, file);
    container.close();
  });

  it("cut at any of 50 places is refused, with the file named", async () => {
    const bytes = readFileSync(fixture(file));
    const random = seeded(1);
    const path = join(folder, `cut-${file}`);
    for (let i = 0; i < 50; i++) {
      const length = Math.floor(random() * (bytes.length - 4));
      writeFileSync(path, bytes);
      truncateSync(path, length);
      const fault = await faultOf(() => openContainer(path));
      expect(fault.where).toContain(path);
    }
  });

  // The format has no checksum: a flipped bit in the data changes a number and nothing can tell. What is asked for here is that
  // no flip crashes, hangs or asks for memory, and that a flip in the data leaves every other value alone.
  it("with any of 200 bytes flipped opens or is refused, and never fails in another way", async () => {
    const bytes = readFileSync(fixture(file));
    const random = seeded(2);
    const path = join(folder, `flipped-${file}`);
    let refused = 0;
    for (let i = 0; i < 200; i++) {
      const flipped = Buffer.from(bytes);
      flipped[Math.floor(random() * bytes.length)] ^= 1 << Math.floor(random() * 8);
      writeFileSync(path, flipped);
      try {
        const container = await openContainer(path);
        for (const variable of container.variables) readAll(container, variable);
        container.close();
      } catch (error) {
        if (!(error instanceof Fault)) throw error;
        refused++;
      }
    }
    expect(refused).toBeGreaterThan(0);
  });
});

it("a number of records left open by the writer is taken from the file's size", async () => {
  const bytes = readFileSync(fixture("classic.nc"));
  bytes.fill(0xff, 4, 8);
  const path = join(folder, "streaming.nc");
  writeFileSync(path, bytes);
  const container = await openContainer(path);
  expectAsPythonSays(container, "classic.nc");
  container.close();
});

it("more records than the file holds are refused with the variable and both sizes named", async () => {
  const bytes = readFileSync(fixture("classic.nc"));
  bytes.writeUInt32BE(5, 4);
  const path = join(folder, "more-records.nc");
  writeFileSync(path, bytes);
  const fault = await faultOf(() => openContainer(path));
  expect(fault.message).toMatch(/record_\w+: expected a file of \d+ bytes, got \d+ bytes; it is cut/);
});

it("a flipped bit in the data changes that one value only", async () => {
  const bytes = readFileSync(fixture("classic.nc"));
  bytes[bytes.length - 9] ^= 0x01;
  const path = join(folder, "one-flip.nc");
  writeFileSync(path, bytes);
  const container = await openContainer(path);
  let changed = 0;
  for (const variable of container.variables) {
    const { values } = expectedFiles["classic.nc"].variables[variable.name];
    changed += asListed(readAll(container, variable)).filter((value, i) => value !== values[i]).length;
  }
  container.close();
  expect(changed).toBe(1);
});

describe("a hostile header is refused before memory is asked for", () => {
  const residentBytes = () => process.memoryUsage().rss;
  const claim = (name: string, bytes: Buffer) => {
    const path = join(folder, `${name}.nc`);
    writeFileSync(path, bytes);
    return path;
  };
  const uint32 = (value: number) => {
    const bytes = Buffer.alloc(4);
    bytes.writeUInt32BE(value);
    return bytes;
  };

  it.each([
    ["four billion dimensions", Buffer.concat([Buffer.from("CDF\x01"), uint32(0), uint32(10), uint32(0xfffffff0)])],
    [
      "four billion attributes",
      Buffer.concat([Buffer.from("CDF\x01"), uint32(0), Buffer.alloc(8), uint32(12), uint32(0xfffffff0)]),
    ],
    [
      "a name of two gigabytes",
      Buffer.concat([Buffer.from("CDF\x01"), uint32(0), uint32(10), uint32(1), uint32(0x7fffffff), uint32(0)]),
    ],
    ["an unknown list", Buffer.concat([Buffer.from("CDF\x01"), uint32(0), uint32(77), uint32(1), Buffer.alloc(64)])],
    [
      "a count of 2^63 in 64-bit data",
      Buffer.concat([
        Buffer.from("CDF\x05"),
        Buffer.alloc(8),
        uint32(10),
        uint32(0x80000000),
        uint32(0),
        Buffer.alloc(64),
      ]),
    ],
  ])("%s", async (name, bytes) => {
    const path = claim(name, bytes);
    const start = residentBytes();
    const fault = await faultOf(() => openContainer(path));
    expect(fault.where).toContain(path);
    expect(residentBytes() - start).toBeLessThan(50e6);
  });

  it("a variable of 10^12 cells", async () => {
    const bytes = classicBytes({
      dimensions: { a: 1_000_000, b: 1_000_000 },
      variables: [{ name: "sla", dimensions: ["a", "b"], values: Int16Array.of(1) }],
    });
    const start = residentBytes();
    const fault = await faultOf(() => openContainer(claim("cells", bytes)));
    expect(fault.message).toMatch(/sla: expected a file of 2000000000\d+ bytes/);
    expect(residentBytes() - start).toBeLessThan(50e6);
  });
});

it("a window outside the variable and an unknown variable are refused by name", async () => {
  const container = await openContainer(fixture("classic.nc"));
  expect(() => container.read("fixed_int16", [0, 3], [3, 3])).toThrow(/fixed_int16: expected a window within 3 × 5/);
  expect(() => container.read("nothing", [], [])).toThrow(/a variable nothing/);
  container.close();
});
