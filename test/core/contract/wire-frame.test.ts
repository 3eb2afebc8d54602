import fc from "fast-check";
import { Packr } from "msgpackr";
import { describe, expect, test } from "vitest";
import { readClientMessage } from "../../../core/contract/wire-check";
import { decodeFrame, encodeFrame } from "../../../core/contract/wire-frame";

const limit = 2 ** 20;
const throughWire = (value: unknown) => decodeFrame(encodeFrame(value, limit), limit);

describe("a frame", () => {
  test("gives back every value the contract can carry", () => {
    const leaf = fc.oneof(
      fc.string({ unit: "grapheme" }),
      fc.double().filter((value) => !Object.is(value, -0)),
      fc.maxSafeInteger(),
      fc.boolean(),
      fc.constant(null),
      fc.constant(undefined),
      fc.float32Array(),
      fc.float64Array(),
      fc.int32Array(),
      fc.uint8Array(),
    );
    const { tree } = fc.letrec((tie) => ({
      tree: fc.oneof(
        { maxDepth: 4 },
        leaf,
        fc.array(tie("tree")),
        fc.dictionary(fc.string(), tie("tree"), { noNullPrototype: true }),
      ),
    }));
    // The decoder renames a key "__proto__"; no request or answer has one.
    const hasProto = (value: unknown) => /"__proto__"/.test(JSON.stringify(value) ?? "");
    fc.assert(
      fc.property(
        tree.filter((value) => !hasProto(value)),
        (value) => {
          expect(throughWire(value)).toStrictEqual(value);
        },
      ),
      { seed: 1, numRuns: 500 },
    );
  });

  test("is aligned and its own memory, wherever the bytes lay", () => {
    const frame = encodeFrame({ values: Float64Array.of(1, 2) }, limit);
    for (let shift = 0; shift < 8; shift++) {
      const larger = new Uint8Array(frame.length + shift);
      larger.set(frame, shift);
      const { values } = decodeFrame(larger.subarray(shift), limit) as { values: Float64Array };
      larger.fill(0);
      expect(values).toStrictEqual(Float64Array.of(1, 2));
    }
  });

  test("read by Node keeps Uint8Array and does not make it a Buffer", () => {
    const { bytes } = decodeFrame(Buffer.from(encodeFrame({ bytes: Uint8Array.of(1) }, limit)), limit) as {
      bytes: Uint8Array;
    };
    expect(Object.getPrototypeOf(bytes)).toBe(Uint8Array.prototype);
  });

  test("is the same bytes by the library's build for browsers", async () => {
    const built = new URL("../../../node_modules/msgpackr/index.js", import.meta.url).href;
    const browser = (await import(/* @vite-ignore */ built)) as { Packr: typeof Packr };
    const options = { useRecords: false, mapsAsObjects: true, moreTypes: true, structuredClone: false } as const;
    const value = {
      a: Float32Array.of(1, Number.NaN),
      b: Int32Array.of(-1),
      c: Uint8Array.of(9),
      d: undefined,
      e: "ü",
    };
    expect(new Uint8Array(new browser.Packr({ ...options }).pack(value))).toEqual(encodeFrame(value, limit));
    expect(new browser.Packr({ ...options, copyBuffers: true }).unpack(encodeFrame(value, limit))).toStrictEqual(value);
  });

  test("above the limit is neither made nor read", () => {
    const value = new Uint8Array(1000);
    expect(() => encodeFrame(value, 999)).toThrow(/at most 999 bytes/);
    expect(() => decodeFrame(encodeFrame(value, 2000), 999)).toThrow(/at most 999 bytes/);
  });

  test("that claims four thousand million entries, once or nested, throws without taking the memory", () => {
    const claim = [0xdd, 0xff, 0xff, 0xff, 0xff];
    const before = process.memoryUsage().rss;
    expect(() => decodeFrame(Uint8Array.from(claim), limit)).toThrow();
    expect(() => decodeFrame(Uint8Array.from(Array.from({ length: 1000 }, () => claim).flat()), limit)).toThrow();
    expect(() => decodeFrame(Uint8Array.from([0xdf, 0xff, 0xff, 0xff, 0xff]), limit)).toThrow();
    expect(() => decodeFrame(Uint8Array.from([0xc6, 0xff, 0xff, 0xff, 0xff]), limit)).toThrow();
    // 64 MiB: far below one such array, far above what the test itself takes.
    expect(process.memoryUsage().rss - before).toBeLessThan(64 * 2 ** 20);
  });

  test("of 10,000 damaged or random ones gives a refused message, a right one or an error, and touches no prototype", () => {
    const good = encodeFrame({ kind: "call", id: 1, method: "open", args: { paths: ["/a"] } }, limit);
    let state = 1;
    const next = (below: number) => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return Math.floor((state / 2 ** 32) * below);
    };
    for (let run = 0; run < 10_000; run++) {
      const bytes =
        run % 2 ? Uint8Array.from({ length: next(60) }, () => next(256)) : good.slice(0, 1 + next(good.length));
      if (run % 2 === 0) bytes[next(bytes.length)] = next(256);
      let message: unknown;
      try {
        message = decodeFrame(bytes, limit);
      } catch (error) {
        expect(error).toBeInstanceOf(Error);
        continue;
      }
      const read = readClientMessage(message);
      if (read?.kind === "call") expect(["open"]).toContain(read.method);
    }
    expect(Object.keys(Object.prototype)).toEqual([]);
    expect(throughWire({ still: "right" })).toEqual({ still: "right" });
  });

  test("cannot set a prototype by its keys", () => {
    const hostile = new Packr({ useRecords: false }).pack(new Map([["__proto__", { polluted: true }]]));
    expect((decodeFrame(hostile, limit) as { polluted?: boolean }).polluted).toBeUndefined();
  });
});
