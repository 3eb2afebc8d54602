import { describe, expect, test } from "vitest";
import { readClientMessage, readEngineMessage, refusedCallId } from "../../../core/contract/wire-check";
import { isFields } from "../../../core/contract/wire-shape";
import { hostileMessages } from "./hostile-messages";

const fault = { tag: "file", where: "w", expected: "e", got: "g", advice: "a" };

describe("a message from a client", () => {
  test("10,000 messages wrong in one place are no messages", () => {
    expect(hostileMessages(10_000, 2).filter((message) => readClientMessage(message))).toEqual([]);
  });

  test.each([
    ["a map in place of the arguments", { kind: "call", id: 0, method: "open", args: new Map([["paths", []]]) }],
    ["arguments inherited", { kind: "call", id: 0, method: "open", args: Object.create({ paths: [] }) }],
    ["a message that is text", '{"kind":"cancel","id":0}'],
    ["a message that is an array", [{ kind: "cancel", id: 0 }]],
    [
      "a message that is a class's",
      new (class Cancel {
        kind = "cancel";
        id = 0;
      })(),
    ],
    ["an id that is text", { kind: "cancel", id: "0" }],
    ["a cancel with more", { kind: "cancel", id: 0, method: "open" }],
    ["an ask for nothing known", { kind: "ask", id: 0, what: "toString" }],
    ["the columns left out", { kind: "call", id: 0, method: "spectrum", args: { open: {}, grid: "A" } }],
  ])("with %s is none", (_what, message) => {
    expect(readClientMessage(message)).toBeUndefined();
  });

  test("whose parts are right is read", () => {
    expect(readClientMessage({ kind: "cancel", id: 7 })).toEqual({ kind: "cancel", id: 7 });
    expect(readClientMessage({ kind: "ask", id: 7, what: "study-place" })).toEqual({
      kind: "ask",
      id: 7,
      what: "study-place",
    });
    const call = { kind: "call", id: 7, method: "check", args: { study: null } };
    expect(readClientMessage(call)).toEqual(call);
  });

  test("that is refused is answered only where it bears an id to answer", () => {
    expect(refusedCallId({ kind: "call", id: 3, method: "nothing" })).toBe(3);
    expect(refusedCallId({ kind: "ask", id: 3 })).toBe(3);
    expect(refusedCallId({ kind: "cancel", id: 3, more: 1 })).toBeUndefined();
    expect(refusedCallId({ kind: "call", id: -3 })).toBeUndefined();
    expect(refusedCallId("call")).toBeUndefined();
  });
});

describe("a message from the engine", () => {
  const good = [
    { kind: "hello", version: 1, door: "web", paths: [] },
    { kind: "opened", paths: ["/a"] },
    { kind: "result", id: 0, value: undefined },
    { kind: "failure", id: 0, fault },
    { kind: "progress", id: 0, progress: { step: "s", done: 1, total: 0 } },
  ];
  test.each(good)("of kind $kind is read", (message) => {
    expect(readEngineMessage(message)).toEqual(message);
  });

  test.each([
    null,
    7,
    {},
    { kind: "result" },
    { kind: "other", id: 0 },
    { ...good[0], version: "1" },
    { ...good[0], door: "window" },
    { ...good[0], paths: [1] },
    { kind: "opened", paths: "/a" },
    { kind: "failure", id: 0 },
    { kind: "failure", id: 0, fault: { ...fault, tag: "other" } },
    { kind: "failure", id: 0, fault: { ...fault, advice: 1 } },
    { kind: "progress", id: 0 },
    { kind: "progress", id: 0, progress: { step: 1, done: 1, total: 1 } },
    { kind: "progress", id: 0, progress: { step: "s", done: "1", total: 1 } },
    { kind: "progress", id: 0, progress: { step: "s", done: 1 } },
  ])("that is %o is none", (message) => {
    expect(readEngineMessage(message)).toBeUndefined();
  });
});

test("only what JSON calls an object is one", () => {
  for (const value of [{}, Object.create(null), JSON.parse("{}")]) expect(isFields(value)).toBe(true);
  for (const value of [null, [], "", 1, new Date(), new Map(), new Uint8Array(1), () => 1])
    expect(isFields(value)).toBe(false);
});
