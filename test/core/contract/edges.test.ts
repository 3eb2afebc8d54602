import { describe, expect, test } from "vitest";
import { connectDoor, connectEngine } from "../../../core/contract/client";
import { memoryPortPair } from "../../../core/contract/memory-port";
import type { Port } from "../../../core/contract/port";
import { serveEngine } from "../../../core/contract/server";
import { cancelSource } from "../../../core/contract/wire-cancel";
import { createStandIn, openStudy } from "./stand-in-engine";

const runRequest = { open: openStudy, folder: "/r", overwrite: false };
const soon = () => new Promise((resolve) => setTimeout(resolve, 5));

describe("a client", () => {
  test("rejects a request that no wire carries, and goes on", async () => {
    const [client, server] = memoryPortPair();
    serveEngine(createStandIn(), server);
    const engine = connectEngine(client);
    await expect(engine.check({ study: () => 1 })).rejects.toMatchObject({ tag: "request", where: "check" });
    expect((await engine.open({ paths: ["/a"] })).path).toBe("/a");
  });

  test("counts what is no message, and a listener of its own that throws stops nothing", async () => {
    const [client, server] = memoryPortPair();
    const counts: number[] = [];
    const engine = connectEngine(client, {
      onRefused: (count) => counts.push(count),
      onHello: () => {
        throw new Error("a listener's own fault");
      },
    });
    for (const message of [null, "text", { kind: "result" }]) server.post(message);
    serveEngine(createStandIn(), server);
    expect((await engine.open({ paths: ["/a"] })).path).toBe("/a");
    expect(counts).toEqual([1, 2, 3]);
  });

  test("passes over an answer to no call of its own, of any kind", async () => {
    const [client, server] = memoryPortPair();
    const engine = connectEngine(client);
    const { fault } = { fault: { tag: "file", where: "", expected: "", got: "", advice: "" } };
    server.post({ kind: "result", id: 99, value: 1 });
    server.post({ kind: "failure", id: 99, fault });
    server.post({ kind: "progress", id: 99, progress: { step: "", done: 0, total: 0 } });
    serveEngine(createStandIn(), server);
    expect((await engine.open({ paths: ["/a"] })).path).toBe("/a");
  });

  test("cancelled while its port is closing rejects all the same", async () => {
    let posts = 0;
    const port: Port = {
      post: () => {
        posts += 1;
        if (posts > 1) throw new Error("closing");
      },
      onMessage: () => undefined,
      onClose: () => undefined,
      close: () => undefined,
    };
    const controller = new AbortController();
    const running = connectDoor(port).engine.run(runRequest, { signal: controller.signal });
    controller.abort();
    await expect(running).rejects.toMatchObject({ tag: "cancelled" });
  });

  test("hears of the end once, whichever side closed", async () => {
    for (const side of [0, 1] as const) {
      const pair = memoryPortPair();
      const ends: string[] = [];
      connectEngine(pair[0], { onEnd: (fault) => ends.push(fault.got) });
      pair[side].close();
      pair[side].close();
      pair[0].post("dropped");
      await soon();
      expect(ends).toEqual(["a closed one"]);
    }
  });
});

describe("a server", () => {
  test("answers with a fault where the engine's result cannot be sent", async () => {
    const [client, server] = memoryPortPair();
    serveEngine(createStandIn(), server);
    await expect(connectEngine(client).describe({ paths: ["/function"] })).rejects.toMatchObject({
      tag: "internal",
      where: "answer of the engine",
    });
  });

  test("refuses an id in use without disturbing its call, and more calls at once than it takes", async () => {
    const [client, server] = memoryPortPair();
    const served = serveEngine(createStandIn(), server, { mostAtOnce: 2 });
    const heard: unknown[] = [];
    client.onMessage((message) => heard.push(message));
    const call = (id: number) => ({ kind: "call", id, method: "run", args: runRequest });
    for (const id of [1, 1, 2, 3]) client.post(call(id));
    await soon();
    expect([served.running(), served.refused()]).toEqual([2, 2]);
    expect(heard.slice(1)).toMatchObject([{ kind: "failure", id: 3, fault: { tag: "request" } }]);
    client.close();
  });

  test("sends nothing of a call that was cancelled, even where the engine goes on to its end", async () => {
    const [client, server] = memoryPortPair();
    let report: (() => void) | undefined;
    let finish: (() => void) | undefined;
    const standIn = createStandIn();
    serveEngine(
      {
        ...standIn,
        load: (_request, options) =>
          new Promise((resolve) => {
            report = () => options?.onProgress?.({ step: "late", done: 1, total: 1 });
            finish = () => resolve({} as never);
          }),
      },
      server,
    );
    const heard: unknown[] = [];
    client.onMessage((message) => heard.push(message));
    client.post({ kind: "call", id: 1, method: "load", args: { open: openStudy, grid: "A" } });
    await soon();
    client.post({ kind: "cancel", id: 1 });
    client.post({ kind: "cancel", id: 2 });
    await soon();
    report?.();
    finish?.();
    await soon();
    expect(heard).toMatchObject([{ kind: "hello" }]);
  });
});

test("a cancel calls every listener once, those behind one that throws included, and none that was removed", () => {
  const source = cancelSource();
  const called: string[] = [];
  const removed = () => called.push("removed");
  source.signal.addEventListener("abort", () => {
    called.push("first");
    throw new Error("a listener's own fault");
  });
  source.signal.addEventListener("abort", removed);
  source.signal.addEventListener("abort", () => called.push("second"));
  source.signal.removeEventListener("abort", removed);
  expect(source.signal.aborted).toBe(false);
  source.cancel();
  source.cancel();
  source.signal.addEventListener("abort", () => called.push("late"));
  expect([source.signal.aborted, called]).toEqual([true, ["first", "second"]]);
});
