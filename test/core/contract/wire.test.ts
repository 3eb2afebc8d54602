import { afterEach, describe, expect, test } from "vitest";
import { connectDoor, connectEngine } from "../../../core/contract/client";
import { type Served, serveEngine } from "../../../core/contract/server";
import { wireVersion } from "../../../core/contract/wire";
import { engineMethods } from "../../../core/contract/wire-methods";
import { Fault } from "../../../core/model/errors";
import { type Channel, channels } from "./channels";
import { hostileMessages } from "./hostile-messages";
import { createStandIn, openStudy, type StandIn, standInLatitudes } from "./stand-in-engine";

const cancelMilliseconds = 200;
const runRequest = { open: openStudy, folder: "/r", overwrite: false };

async function until(isSo: () => boolean): Promise<void> {
  const end = Date.now() + 5000;
  while (!isSo()) {
    if (Date.now() > end) throw new Error("it did not come to be within 5 s");
    await new Promise((resolve) => setTimeout(resolve, 2));
  }
}

async function caught(work: Promise<unknown>): Promise<Fault> {
  const error: unknown = await work.then(
    () => new Error("nothing was thrown"),
    (thrown) => thrown,
  );
  expect(error).toBeInstanceOf(Fault);
  return error as Fault;
}

describe.each(channels)("over %s", (_name, makeChannel) => {
  let channel: Channel;
  afterEach(() => channel.close());

  async function connected(standIn: StandIn = createStandIn()) {
    channel = await makeChannel();
    const served: Served = serveEngine(standIn, channel.server);
    return { engine: connectEngine(channel.client), served, standIn };
  }

  test("a call gives what the engine gave", async () => {
    const { engine } = await connected();
    expect(await engine.open({ paths: ["/data/a.study.json"] })).toEqual({ ...openStudy, path: "/data/a.study.json" });
  });

  test("typed arrays arrive bit for bit, as the types they were, views as arrays of their own", async () => {
    const { engine } = await connected();
    const choice = { quantity: "u", inBand: true };
    const got = await engine.latitudes({ open: openStudy, grid: "A", choice, dateIndex: 3, columns: 100 });
    const sent = standInLatitudes();
    expect(got).toStrictEqual(sent);
    expect(Object.is(got.profile.half95[1], -0)).toBe(true);
    expect(got.filterEnd.constructor).toBe(Uint8Array);
    expect(got.map.values.constructor).toBe(Float32Array);
    expect(got.columnDates.constructor).toBe(Int32Array);
  });

  test("progress arrives in order, the last report included, before the result", async () => {
    const { engine } = await connected(createStandIn(500));
    const seen: number[] = [];
    await engine.load({ open: openStudy, grid: "A" }, { onProgress: ({ done }) => seen.push(done) });
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    expect(seen[0]).toBe(1);
    expect(seen.at(-1)).toBe(500);
    expect(seen.length).toBeLessThan(40);
  });

  test("a cancel rejects within 200 ms and stops the engine's work", async () => {
    const { engine, served, standIn } = await connected();
    const controller = new AbortController();
    const running = caught(engine.run(runRequest, { signal: controller.signal }));
    await until(() => served.running() === 1);
    const begun = performance.now();
    controller.abort();
    expect((await running).tag).toBe("cancelled");
    expect(performance.now() - begun).toBeLessThan(cancelMilliseconds);
    await until(() => standIn.cancelled() === 1 && served.running() === 0);
    expect(performance.now() - begun).toBeLessThan(cancelMilliseconds);
  });

  test("a call whose signal is aborted already never reaches the engine", async () => {
    const { engine, standIn } = await connected();
    expect((await caught(engine.run(runRequest, { signal: AbortSignal.abort() }))).tag).toBe("cancelled");
    await engine.open({ paths: [] });
    expect(standIn.called).toEqual(["open"]);
  });

  test("a Fault arrives as a Fault with all its parts, another error as a fault of ours", async () => {
    const { engine } = await connected();
    const fault = await caught(engine.describe({ paths: ["/throw/fault"] }));
    expect(fault.toData()).toEqual({
      tag: "file",
      where: "/throw/fault",
      expected: "a whole file",
      got: "half of it",
      advice: "fetch it again",
    });
    const error = await caught(engine.describe({ paths: ["/throw/error"] }));
    expect([error.tag, error.got]).toEqual(["internal", "RangeError: out of range"]);
  });

  test("calls at once do not take each other's answers", async () => {
    const { engine } = await connected();
    const names = Array.from({ length: 100 }, (_, index) => `/data/${index}.nc`);
    const answers = await Promise.all(names.map((name) => engine.describe({ paths: [name] })));
    expect(answers.map(([first]) => first.path)).toEqual(names);
  });

  test("1,000 messages wrong in one place are refused and counted, none reaches the engine, and work goes on", async () => {
    const { engine, served, standIn } = await connected();
    const messages = hostileMessages(1000);
    for (const message of messages) channel.client.post(message);
    expect((await engine.open({ paths: ["/still"] })).path).toBe("/still");
    expect(served.refused()).toBe(messages.length);
    expect(standIn.called).toEqual(["open"]);
  });

  test("a closed connection rejects every call under way, and later ones, and stops the work behind them", async () => {
    const { engine, served, standIn } = await connected();
    const running = [caught(engine.run(runRequest)), caught(engine.run(runRequest))];
    await until(() => served.running() === 2);
    channel.server.close();
    for (const fault of await Promise.all(running)) expect(fault.where).toBe("connection to the engine");
    expect((await caught(engine.open({ paths: [] }))).got).toBe("a closed one");
    await until(() => standIn.cancelled() === 2);
  });

  test("the client hears how it came in, of paths opened, and of an engine started anew", async () => {
    channel = await makeChannel();
    const welcome = { door: "desktop", paths: ["/data"] } as const;
    const onAsk = async () => ["/chosen"];
    const served = serveEngine(createStandIn(), channel.server, { welcome, onAsk });
    const heard: unknown[] = [];
    const { ask } = connectDoor(channel.client, {
      onHello: (said, again) => heard.push([said, again]),
      onOpened: (paths) => heard.push(paths),
    });
    served.opened(["/more"]);
    served.greet();
    expect(await ask("data")).toEqual(["/chosen"]);
    expect(heard).toEqual([[welcome, false], ["/more"], [welcome, true]]);
  });

  test("a door without dialogs says so when asked", async () => {
    channel = await makeChannel();
    serveEngine(createStandIn(), channel.server);
    expect((await caught(connectDoor(channel.client).ask("folder"))).tag).toBe("request");
  });
});

describe("the contract", () => {
  test("lists every method of an engine once", () => {
    const { called: _called, cancelled: _cancelled, close: _close, ...engine } = createStandIn();
    expect([...engineMethods].sort()).toEqual(Object.keys(engine).sort());
  });

  test("an engine that speaks another version is refused with the reason", async () => {
    const [, makeChannel] = channels[0];
    const channel = await makeChannel();
    const engine = connectEngine(channel.client);
    channel.server.post({ kind: "hello", version: wireVersion + 1, door: "web", paths: [] });
    expect((await caught(engine.open({ paths: [] }))).got).toBe(`version ${wireVersion + 1}`);
  });
});
