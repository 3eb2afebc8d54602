import { describe, expect, test } from "vitest";
import { latestWins } from "../../renderer/state/latest-wins";

/** Calls whose answers the test gives itself. */
function manualCalls() {
  const started: {
    request: number;
    answer: (result: string) => void;
    refuse: (error: Error) => void;
    signal: AbortSignal;
  }[] = [];
  const run = (request: number, signal: AbortSignal): Promise<string> =>
    new Promise((answer, refuse) => started.push({ request, answer, refuse, signal }));
  return { started, run };
}

const settled = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

describe("a queue in which the latest request wins", () => {
  function queue(patienceMs?: number) {
    const { started, run } = manualCalls();
    const delivered: string[] = [];
    const failed: unknown[] = [];
    const queued = latestWins<number, string>({
      ...(patienceMs === undefined ? {} : { patienceMs }),
      run,
      deliver: (result) => delivered.push(result),
      fail: (error) => failed.push(error),
    });
    return { started, delivered, failed, queued };
  }

  test("at most one call is in flight, and of those that wait only the newest is sent", async () => {
    const { started, delivered, queued } = queue();
    for (const request of [1, 2, 3, 4]) queued.ask(request);
    expect(started.map((call) => call.request)).toEqual([1]);
    started[0].answer("one");
    await settled();
    expect(started.map((call) => call.request)).toEqual([1, 4]);
    started[1].answer("four");
    await settled();
    expect(delivered).toEqual(["one", "four"]);
    expect(queued.busy).toBe(false);
  });

  test("a failing call does not block the one that waits", async () => {
    const { started, delivered, failed, queued } = queue();
    queued.ask(1);
    queued.ask(2);
    started[0].refuse(new Error("no"));
    await settled();
    started[1].answer("two");
    await settled();
    expect(failed).toHaveLength(1);
    expect(delivered).toEqual(["two"]);
  });

  test("stopping aborts the call, drops what waits and ignores a late answer", async () => {
    const { started, delivered, failed, queued } = queue();
    queued.ask(1);
    queued.ask(2);
    queued.stop();
    expect(started[0].signal.aborted).toBe(true);
    started[0].answer("late");
    await settled();
    expect(started).toHaveLength(1);
    expect(delivered).toEqual([]);
    expect(failed).toEqual([]);
  });

  test("after a stop a new request starts at once, even while the old call still hangs", async () => {
    const { started, delivered, queued } = queue();
    queued.ask(1);
    queued.stop();
    queued.ask(2);
    expect(started.map((call) => call.request)).toEqual([1, 2]);
    started[0].answer("old");
    started[1].answer("new");
    await settled();
    expect(delivered).toEqual(["new"]);
  });

  test("a request that outlasts the patience is aborted once another waits, and its late answer is not shown", async () => {
    const { started, delivered, failed, queued } = queue(20);
    queued.ask(1);
    await new Promise((resolve) => setTimeout(resolve, 40));
    // Nothing waits: it may take as long as it likes.
    expect(started[0].signal.aborted).toBe(false);
    queued.ask(2);
    await new Promise((resolve) => setTimeout(resolve, 10));
    expect(started[0].signal.aborted).toBe(true);
    expect(started.map((call) => call.request)).toEqual([1, 2]);
    started[0].refuse(new Error("aborted"));
    started[1].answer("two");
    await settled();
    expect(delivered).toEqual(["two"]);
    expect(failed).toEqual([]);
    expect(queued.busy).toBe(false);
  });

  test("a request that is done within the patience is shown although another waits", async () => {
    const { started, delivered, queued } = queue(1000);
    queued.ask(1);
    queued.ask(2);
    started[0].answer("one");
    await settled();
    started[1].answer("two");
    await settled();
    expect(delivered).toEqual(["one", "two"]);
    expect(started[0].signal.aborted).toBe(false);
  });
});
