import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Engine, OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { EddyTestResult, JetsResult } from "../../core/model/jets-result";
import { type BenchState, firstState } from "../../renderer/state/bench-state";
import { recordKey } from "../../renderer/state/edit-study";
import { startHistory } from "../../renderer/state/history";
import { jets } from "../../renderer/state/jets";
import { testStanding, withEddyTest } from "../../renderer/state/jets-state";
import { madeJet, madeJets, madeTest, madeVerdict } from "./made-jets";
import { standInEngine, standInStudy } from "./stand-in-engine";

const open: OpenStudy = { study: standInStudy, folder: "/made-up", path: "" };

function withShortest(shortestDays: number, filter: "lanczos" | "none" = "lanczos"): OpenStudy {
  return { ...open, study: { ...open.study, band: { ...open.study.band, shortestDays, filter } } };
}

interface Asked<Result> {
  readonly open: OpenStudy;
  readonly signal?: { readonly aborted: boolean };
  readonly answer: (result: Result) => void;
  readonly refuse: (error: unknown) => void;
}

const record = await standInEngine().load({ open, grid: "A" });

/** A store without a window and an engine whose answers the test gives itself. */
function bench() {
  const asked: Asked<JetsResult>[] = [];
  const tests: Asked<EddyTestResult>[] = [];
  const engine: Engine = {
    ...standInEngine(),
    jets: (request, options) =>
      new Promise((answer, refuse) =>
        asked.push({ open: request.open, signal: options?.signal ?? { aborted: false }, answer, refuse }),
      ),
    eddyTest: (request) => new Promise((answer, refuse) => tests.push({ open: request.open, answer, refuse })),
  };
  let state: BenchState = {
    ...firstState,
    link: "ready",
    studies: startHistory(open),
    grid: "A",
    record,
    recordFor: recordKey(open, "A"),
    cursor: { latitude: 30, dateIndex: 5 },
  };
  const store = {
    get: () => state,
    set(change: Partial<BenchState>) {
      state = { ...state, ...change };
      made.refresh();
    },
  };
  const made = jets(store, engine);
  const edit = (next: OpenStudy, gesture: string | null = null): void =>
    store.set({ studies: { ...startHistory(next), gesture } });
  made.refresh();
  return { made, asked, tests, edit, set: store.set, state: () => state };
}

const settle = async (): Promise<void> => {
  await vi.advanceTimersByTimeAsync(0);
};
const two = (key: string) =>
  madeJets(key, [madeJet({ id: 1, meanLatitude: 26 }), madeJet({ id: 2, meanLatitude: 31 })]);

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe("finding jets", () => {
  test("begins when the record is there, and again at once when a setting is changed", async () => {
    const { asked, edit, state } = bench();
    await settle();
    expect(asked.length).toBe(1);
    expect(state().jets.finding).toBe(true);
    asked[0].answer(two("one"));
    await settle();
    expect(state().jets.finding).toBe(false);
    expect(state().jets.found?.result.key).toBe("one");
    edit(withShortest(60));
    await settle();
    expect(asked[1].open.study.band.shortestDays).toBe(60);
  });

  test("waits for stillness while an edge is dragged, and does not wait once it is let go", async () => {
    const { asked, edit } = bench();
    await settle();
    asked[0].answer(two("one"));
    await settle();
    for (let days = 89; days > 59; days--) {
      edit(withShortest(days), "edge");
      await vi.advanceTimersByTimeAsync(30);
    }
    expect(asked.length).toBe(1);
    edit(withShortest(60));
    await settle();
    expect(asked.map(({ open: { study } }) => study.band.shortestDays)).toEqual([90, 60]);
    edit(withShortest(50), "edge");
    await vi.advanceTimersByTimeAsync(400);
    expect(asked.length).toBe(3);
  });

  test("for settings that have gone is broken off, and its answer is not shown", async () => {
    const { asked, edit, state } = bench();
    await settle();
    edit(withShortest(60));
    await settle();
    expect(asked[0].signal?.aborted).toBe(true);
    asked[0].answer(two("late"));
    asked[1].answer(two("new"));
    await settle();
    expect(state().jets.found?.result.key).toBe("new");
  });

  test("asks for nothing in the field as it stands, without a filter, or while another record is read", async () => {
    const { asked, edit, set } = bench();
    await settle();
    asked[0].answer(two("one"));
    await settle();
    set({ choice: { quantity: "u", inBand: false } });
    edit(withShortest(60));
    await settle();
    set({ choice: { quantity: "u", inBand: true }, loading: { step: "Reading", done: 0, total: 0 } });
    await settle();
    edit(withShortest(60, "none"));
    set({ loading: null });
    await settle();
    expect(asked.length).toBe(1);
  });

  test("that fails leaves a sentence in the panel and no notice", async () => {
    const { asked, state } = bench();
    await settle();
    asked[0].refuse(
      new Fault({
        tag: "period",
        where: "jets",
        expected: "8 dates",
        got: "3 dates",
        advice: "choose a longer period",
      }),
    );
    await settle();
    expect(state().jets.fault).toBe("jets: expected 8 dates, got 3 dates. Choose a longer period.");
    expect(state().notices).toEqual([]);
    expect(asked.length).toBe(1);
  });
});

describe("picking a jet", () => {
  test("lights it and moves the cursor to its latitude on the date", async () => {
    const { made, asked, state } = bench();
    await settle();
    asked[0].answer(two("one"));
    await settle();
    made.pick(2);
    expect(state().selectedJet).toBe(2);
    expect(state().cursor).toEqual({ latitude: 31, dateIndex: 5 });
    made.pick(null);
    expect(state().selectedJet).toBeNull();
  });

  test("holds when jets are found anew: the nearest of its direction is lit", async () => {
    const { made, asked, edit, state } = bench();
    await settle();
    asked[0].answer(two("one"));
    await settle();
    made.pick(2);
    edit(withShortest(60));
    await settle();
    asked[1].answer(madeJets("two", [madeJet({ id: 9, meanLatitude: 31.2 })]));
    await settle();
    expect(state().selectedJet).toBe(9);
  });
});

describe("the eddy test", () => {
  test("stays with the jets it was made for: stale for others, current when they are back", async () => {
    const { made, asked, tests, edit, state } = bench();
    await settle();
    asked[0].answer(two("one"));
    await settle();
    const done = made.test();
    expect(state().jets.testing).not.toBeNull();
    tests[0].answer(madeTest("one", [madeVerdict(1, 0.01)]));
    await done;
    const standing = () => {
      const { studies, jets: now } = state();
      return studies ? testStanding(now.found, now.tested, studies.present.study.eddyTest) : null;
    };
    expect(state().jets.testing).toBeNull();
    expect(standing()).toBe("current");
    edit(withShortest(60));
    await settle();
    asked[1].answer(two("two"));
    await settle();
    expect(standing()).toBe("stale");
    edit(open);
    await settle();
    asked[2].answer(two("one"));
    await settle();
    expect(standing()).toBe("current");
    edit(withEddyTest(open, { seed: 3 }));
    expect(standing()).toBe("stale");
    expect(asked.length).toBe(3);
  });

  test("that is cancelled says nothing; one that cannot be made says why, in the panel", async () => {
    const { made, tests, state } = bench();
    const cancelled = made.test();
    tests[0].refuse(new Fault({ tag: "cancelled", where: "eddyTest", expected: "", got: "", advice: "" }));
    await cancelled;
    expect(state().jets.testFault).toBe("");
    const failed = made.test();
    tests[1].refuse(
      new Fault({ tag: "region", where: "eddyTest", expected: "eddies", got: "none", advice: "widen it" }),
    );
    await failed;
    expect(state().jets.testFault).toMatch(/expected eddies, got none\. Widen it\./);
    expect(state().jets.testing).toBeNull();
    expect(state().notices).toEqual([]);
  });
});
