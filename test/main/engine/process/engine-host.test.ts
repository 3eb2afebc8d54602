import { spawn } from "node:child_process";
import { once } from "node:events";
import { fileURLToPath } from "node:url";
import { afterEach, describe, expect, test } from "vitest";
import { type EngineHost, startEngineHost } from "../../../../main/engine/process/engine-host";
import { forkEngine } from "../../../../main/engine/process/fork-engine";
import { openStudy, standInLatitudes } from "../../../core/contract/stand-in-engine";
import { forkStandIn, isAlive, loader, waitFor } from "./fork-stand-in";

const recoverMilliseconds = 5000;
const cancelMilliseconds = 200;
const runRequest = { open: openStudy, folder: "/r", overwrite: false };

describe("an engine in a process of its own", () => {
  let host: EngineHost;
  afterEach(() => host?.close());

  test("answers, reports progress, sends typed arrays whole and cancels within 200 ms", async () => {
    host = startEngineHost(forkStandIn());
    const choice = { quantity: "u", inBand: true };
    const got = await host.engine.latitudes({ open: openStudy, grid: "A", choice, dateIndex: 3, columns: 9 });
    expect(got).toStrictEqual(standInLatitudes());
    const seen: number[] = [];
    await host.engine.load({ open: openStudy, grid: "A" }, { onProgress: ({ done }) => seen.push(done) });
    expect(seen.at(-1)).toBe(200);
    const controller = new AbortController();
    const running = host.engine.run(runRequest, { signal: controller.signal });
    await new Promise((resolve) => setTimeout(resolve, 50));
    const begun = performance.now();
    controller.abort();
    await expect(running).rejects.toMatchObject({ tag: "cancelled" });
    expect(performance.now() - begun).toBeLessThan(cancelMilliseconds);
  });

  test("killed during a call fails that call with the reason, says so once and answers again within 5 s", async () => {
    host = startEngineHost(forkStandIn());
    let restarts = 0;
    host.onRestart(() => {
      restarts += 1;
    });
    await host.engine.open({ paths: [] });
    const first = Number(host.pid());
    const running = host.engine.run(runRequest);
    await new Promise((resolve) => setTimeout(resolve, 50));
    const begun = performance.now();
    process.kill(first, "SIGKILL");
    await expect(running).rejects.toMatchObject({
      tag: "internal",
      where: "engine",
      got: expect.stringContaining("SIGKILL"),
    });
    expect((await host.engine.open({ paths: ["/again"] })).path).toBe("/again");
    expect(performance.now() - begun).toBeLessThan(recoverMilliseconds);
    expect(restarts).toBe(1);
    expect(host.pid()).not.toBe(first);
    expect(isAlive(first)).toBe(false);
  });

  test("closed leaves no process behind and is not started again", async () => {
    host = startEngineHost(forkStandIn());
    await host.engine.open({ paths: [] });
    const running = host.engine.run(runRequest);
    const pid = Number(host.pid());
    const failed = expect(running).rejects.toMatchObject({ where: "connection to the engine" });
    await host.close();
    await failed;
    expect(isAlive(pid)).toBe(false);
    expect(host.pid()).toBeUndefined();
  });

  test("whose entry cannot run fails the call with the reason instead of trying for ever", async () => {
    host = startEngineHost(forkEngine("/nowhere/engine.js", { execArgv: ["--eval=process.exit(3)"] }));
    await expect(host.engine.open({ paths: [] })).rejects.toMatchObject({
      got: expect.stringContaining("exit code 3"),
    });
    await waitFor(() => host.pid() === undefined, recoverMilliseconds);
  });

  test("ends by itself when its parent is killed", async () => {
    const script = fileURLToPath(new URL("./stand-in-parent.ts", import.meta.url));
    const parent = spawn(process.execPath, [...loader, script], { stdio: ["ignore", "pipe", "inherit"] });
    const [line] = (await once(parent.stdout, "data")) as [Buffer];
    const pid = Number(String(line));
    expect(isAlive(pid)).toBe(true);
    parent.kill("SIGKILL");
    expect(await waitFor(() => !isAlive(pid), recoverMilliseconds)).toBeLessThan(recoverMilliseconds);
  });
});
