import { describe, expect, test } from "vitest";
import type { Engine } from "../../core/contract/engine";
import type { CallOptions } from "../../core/contract/job";
import { Fault } from "../../core/model/errors";
import type { BenchState, BenchStore } from "../../renderer/state/bench-state";
import { firstState } from "../../renderer/state/bench-state";
import { recordKey, withBand, withErrors, withGeostrophy } from "../../renderer/state/edit-study";
import { startHistory } from "../../renderer/state/history";
import { scales, scalesKey } from "../../renderer/state/scales";
import { partFor, sceneSize } from "../../renderer/views/scales/scales-parts";
import { scalesReadout } from "../../renderer/views/scales/scales-readout";
import { persistenceTable, scalesTables } from "../../renderer/views/scales/scales-tables";
import { madeLongitude, madeScales } from "../core/figure/scales/made-scales";
import { standInEngine, standInStudy } from "./stand-in-engine";

const open = { study: standInStudy, folder: "/made-up", path: "/made-up/basin.study.json" };

interface Call {
  readonly request: Parameters<Engine["scales"]>[0];
  readonly options: CallOptions | undefined;
  answer(): void;
  refuse(error: unknown): void;
}

/** Scales on an engine whose answers the test gives by hand. */
async function bench() {
  const record = await standInEngine().load({ open, grid: "A" });
  let state: BenchState = {
    ...firstState,
    link: "ready",
    studies: startHistory(open),
    grid: "A",
    record,
    recordFor: recordKey(open, "A"),
  };
  const store: BenchStore = {
    get: () => state,
    set: (change) => {
      state = { ...state, ...change };
    },
  };
  const calls: Call[] = [];
  const engine = {
    scales: (request: Call["request"], options?: CallOptions) =>
      new Promise((resolve, reject) => {
        calls.push({ request, options, answer: () => resolve(madeScales()), refuse: reject });
      }),
  } as unknown as Engine;
  const made = scales(store, engine);
  const settle = () => new Promise((resolve) => setTimeout(resolve));
  const edit = (next: typeof open) => store.set({ studies: startHistory(next) });
  return { made, calls, settle, edit, store, now: () => made.store.getState() };
}

describe("scales", () => {
  test("are asked for once for the same settings, and once more when settings change", async () => {
    const { made, calls, settle, edit, now } = await bench();
    made.refresh();
    made.refresh();
    expect(calls).toHaveLength(1);
    calls[0].answer();
    await settle();
    made.refresh();
    expect(calls).toHaveLength(1);
    expect(now().picture?.key).toBe(now().wanted);
    edit({ ...open, study: withBand(open, { ...open.study.band, shortestDays: 60 }).study });
    made.refresh();
    expect(calls).toHaveLength(2);
    expect(now().picture?.key).not.toBe(now().wanted);
  });

  test("of overtaken settings are aborted and their answer is not shown", async () => {
    const { made, calls, settle, edit, now } = await bench();
    made.refresh();
    edit({ ...open, study: withGeostrophy(open, { stencil: 3 }).study });
    made.refresh();
    expect(calls[0].options?.signal?.aborted).toBe(true);
    calls[0].answer();
    await settle();
    expect(now().picture).toBe(null);
    calls[1].answer();
    await settle();
    expect(now().picture?.open.study.geostrophy.stencil).toBe(3);
    expect(now().progress).toBe(null);
  });

  test("going back to the settings that are drawn aborts what was under way", async () => {
    const { made, calls, settle, edit, now } = await bench();
    made.refresh();
    calls[0].answer();
    await settle();
    edit({ ...open, study: withGeostrophy(open, { stencil: 3 }).study });
    made.refresh();
    edit(open);
    made.refresh();
    expect(calls).toHaveLength(2);
    expect(calls[1].options?.signal?.aborted).toBe(true);
    expect(now()).toMatchObject({ progress: null, fault: "" });
    expect(now().picture?.key).toBe(now().wanted);
  });

  test("stay stopped when the person has stopped them, until asked again", async () => {
    const { made, calls, now } = await bench();
    made.refresh();
    made.cancel();
    made.refresh();
    expect(calls).toHaveLength(1);
    expect(now().fault).toBe("The computation was stopped.");
    made.again();
    expect(calls).toHaveLength(2);
    expect(now().fault).toBe("");
  });

  test("tell a fault in sentences and do not try again by themselves", async () => {
    const { made, calls, settle, now } = await bench();
    made.refresh();
    const fault = {
      tag: "file",
      where: "radii.csv",
      expected: "two columns",
      got: "one",
      advice: "mend the file",
    } as const;
    calls[0].refuse(new Fault(fault));
    await settle();
    made.refresh();
    expect(calls).toHaveLength(1);
    expect(now().fault).toBe("radii.csv: expected two columns, got one. Mend the file.");
  });

  test("carry the latitude asked for; one outside another region is dropped", async () => {
    const { made, calls, store } = await bench();
    made.setLatitude(33.5);
    expect(calls[0].request.latitude).toBe(33.5);
    const { record } = store.get();
    if (!record) throw new Error("no record");
    const south = { ...record.latitude, values: record.latitude.values.slice(0, 10) };
    store.set({ record: { ...record, latitude: south } });
    made.refresh();
    expect(calls[1].request.latitude).toBeUndefined();
  });

  test("wait for a record of the present settings and for the engine", async () => {
    const { made, calls, store } = await bench();
    store.set({ link: "lost" });
    made.refresh();
    store.set({ link: "ready", recordFor: "another" });
    made.refresh();
    expect(calls).toHaveLength(0);
  });

  test("depend on currents, band and errors, not on the title or what is written", () => {
    const key = scalesKey(open, "A", null);
    expect(scalesKey({ ...open, study: { ...open.study, title: "Another" } }, "A", null)).toBe(key);
    expect(scalesKey(withErrors(open, { heightMetres: 0.02 }), "A", null)).not.toBe(key);
    expect(scalesKey(open, "A", 30)).not.toBe(key);
  });
});

describe("pages", () => {
  test("all panels are shown where there is room for them, else the first page", () => {
    expect(partFor({ width: 1440, height: 780 })).toBe("all");
    expect(partFor({ width: 1100, height: 570 })).toBe("lengths");
  });

  test("a scene fills its pane, and is no smaller than its panels need", () => {
    expect(sceneSize({ width: 1440, height: 780 }, "all")).toEqual({ width: 1440, height: 780 });
    expect(sceneSize({ width: 1000, height: 500 }, "all")).toEqual({ width: 1240, height: 700 });
  });
});

describe("numbers", () => {
  const result = madeScales();
  const record = { time: { calendar: "standard" }, longitude: { values: madeLongitude } };
  const picture = { key: "", open, grid: "A", result, record } as never;

  test.each([
    ["mean-flow", 0, 20.2, " cm s⁻¹", "20.13° N"],
    ["zonality", 28, 0, "0.20", "averages over 30 days"],
    ["energy", 0, 0, "1 of the peak", "zonal ∞, meridional ∞"],
    ["drift-across", 22_344.4, 25.13, " cm s⁻¹", "25.13° N, 6 March 2031"],
  ])("under the pointer in %s at %d, %d", (panel, across, up, value, place) => {
    const shown = scalesReadout(picture, panel, across, up);
    expect(shown?.place).toBe(place);
    expect(shown?.value).toContain(value);
  });

  test("the mean flow under the pointer is the nearest row's, in cm s⁻¹", () => {
    const value = Number(scalesReadout(picture, "mean-flow", 0, 20.2)?.value.replace("−", "-").split(" ")[0]);
    expect(value).toBeCloseTo(100 * result.forcing.meanFlow[0], 2);
  });

  test("persistence under the pointer is the nearest cell's and the nearest row's", () => {
    const { share, byLatitude } = result.persistence;
    const cell = scalesReadout(picture, "persistence", -140.1, 22.1);
    // The 40th column lies at 140.125 W, the 9th row at 22.125 N (counted from one).
    expect(cell?.place).toBe("22.13° N, 140.13° W");
    expect(cell?.value).toContain(`${Math.round(100 * share.values[8 * share.columns + 39])} % of dates `);
    const row = scalesReadout(picture, "longest-run", 100, 22.1);
    expect(row?.value).toContain(`longest run ${Math.round(byLatitude.longestDays[8])} days`);
    expect(scalesReadout(picture, "persistence", -126, 40.6)?.value).toBe("no values");
  });

  test("persistence in a table has a row for each latitude, the northernmost first", () => {
    const { heads, rows } = persistenceTable(result);
    const { share, longestDays } = result.persistence.byLatitude;
    expect(rows).toHaveLength(result.latitude.length);
    expect(rows.every((row) => row.length === heads.length)).toBe(true);
    expect(rows[0][0]).toBe("40.88° N");
    expect(rows[83].slice(2)).toEqual([`${Math.round(100 * share[0])} %`, `${Math.round(longestDays[0])} days`]);
  });

  test("nothing is told where there is no panel", () => {
    expect(scalesReadout(picture, "elsewhere", 0, 0)).toBe(null);
  });

  test("in tables carry limits where there are any, and every name once", () => {
    const tables = scalesTables(result);
    const rows = tables.flatMap(({ rows: each }) => each);
    expect(rows.find(({ name }) => name === "Peak of each map's u")).toMatchObject({
      value: "240 km",
      limits: "228 to 252 km",
    });
    expect(rows.find(({ name }) => name === "Jets of the mean")).toMatchObject({ value: "232 km", limits: "–" });
    expect(new Set(rows.map(({ name }) => name)).size).toBe(rows.length);
    expect(rows.every(({ value }) => !/NaN|undefined/.test(value))).toBe(true);
  });
});
