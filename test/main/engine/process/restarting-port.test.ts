import { describe, expect, test, vi } from "vitest";
import type { ProcessHandle } from "../../../../main/engine/process/process-port";
import { restartingPort, restartsAMinute } from "../../../../main/engine/process/restarting-port";

type Exit = Parameters<Parameters<ProcessHandle["onExit"]>[0]>[0];

class FakeProcess implements ProcessHandle {
  readonly sent: unknown[] = [];
  readonly messageListeners: ((message: unknown) => void)[] = [];
  readonly exitListeners: ((how: Exit) => void)[] = [];
  asked = 0;
  killed = 0;
  constructor(readonly pid: number) {}
  send = (message: unknown) => void this.sent.push(message);
  onMessage = (listener: (message: unknown) => void) => void this.messageListeners.push(listener);
  onExit = (listener: (how: Exit) => void) => void this.exitListeners.push(listener);
  disconnect = () => {
    this.asked += 1;
  };
  kill = () => {
    this.killed += 1;
    this.die({ code: null, signal: "SIGKILL" });
  };
  say(message: unknown) {
    for (const listener of this.messageListeners) listener(message);
  }
  die(how: Exit = { code: 1, signal: null }) {
    for (const listener of [...this.exitListeners]) listener(how);
  }
}

function setUp(now: () => number = () => 0) {
  const started: FakeProcess[] = [];
  const heard: { kind: string; id?: number; fault?: { got: string } }[] = [];
  const restarting = restartingPort(() => {
    const process = new FakeProcess(started.length + 1);
    started.push(process);
    return process;
  }, now);
  restarting.port.onMessage((message) => heard.push(message as (typeof heard)[number]));
  return { started, heard, ...restarting };
}

const call = (id: number) => ({ kind: "call", id, method: "open", args: { paths: [] } });

describe("a port that outlives its process", () => {
  test("fails exactly the calls not answered and not cancelled", () => {
    const { started, heard, port } = setUp();
    for (const id of [1, 2, 3, 4]) port.post(call(id));
    port.post({ kind: "cancel", id: 2 });
    started[0].say({ kind: "result", id: 1, value: 1 });
    started[0].say({ kind: "failure", id: 3, fault: {} });
    started[0].die({ code: 7, signal: null });
    expect(heard.slice(2).map(({ kind, id }) => [kind, id])).toEqual([["failure", 4]]);
    expect(heard[2].fault?.got).toBe("the engine stopped (exit code 7) and was restarted");
  });

  test("hears nothing of a process that was replaced", () => {
    const { started, heard, port, pid } = setUp();
    started[0].die();
    started[0].say({ kind: "result", id: 1, value: "old" });
    started[0].die();
    expect(heard).toEqual([]);
    expect(pid()).toBe(2);
    port.post("any");
    expect(started[1].sent).toEqual(["any"]);
  });

  test("gives up after five restarts within a minute, and starts again with the next call", () => {
    let time = 0;
    const { started, heard, port, pid } = setUp(() => time);
    port.post(call(1));
    for (let death = 0; death < restartsAMinute; death++) started[death].die();
    port.post(call(2));
    started[restartsAMinute].die({ code: null, signal: null });
    expect(pid()).toBeUndefined();
    expect(heard.at(-1)?.fault?.got).toBe(
      "the engine stopped (exit code unknown) and stopped again each time it was restarted",
    );
    port.post(call(3));
    expect(pid()).toBe(restartsAMinute + 2);
    time = 60_001;
    started[restartsAMinute + 1].die();
    expect(pid()).toBe(restartsAMinute + 3);
  });

  test("closed by its port ends the process, kills it after two seconds of patience, and sends no more", async () => {
    vi.useFakeTimers();
    try {
      const { started, port, close } = setUp();
      let closed = 0;
      port.onClose(() => {
        closed += 1;
      });
      port.close();
      port.post(call(1));
      expect([started[0].asked, started[0].killed, closed]).toEqual([1, 0, 1]);
      vi.advanceTimersByTime(2000);
      await close();
      expect([started[0].killed, started[0].sent, started.length]).toEqual([1, [], 1]);
    } finally {
      vi.useRealTimers();
    }
  });

  test("closed with no process running settles at once", async () => {
    const { started, close } = setUp();
    for (let death = 0; death <= restartsAMinute; death++) started[death].die();
    await close();
    expect(started).toHaveLength(restartsAMinute + 1);
  });
});
