import { describe, expect, test } from "vitest";
import type { Engine } from "../../core/contract/engine";
import { memoryPortPair } from "../../core/contract/memory-port";
import type { Port } from "../../core/contract/port";
import { type Served, serveEngine } from "../../core/contract/server";
import { Fault } from "../../core/model/errors";
import { engineLink } from "../../renderer/bridge/engine-link";
import { createBench } from "../../renderer/state/bench";
import type { BenchState } from "../../renderer/state/bench-state";
import { drafts } from "../../renderer/state/draft";
import { withErrors, withExtent, withGeostrophy, withSpace } from "../../renderer/state/edit-study";
import { standInEngine, standInStudy } from "./stand-in-engine";

const region = { west: -140, east: -130, south: 25, north: 35 };

/** A bench on an engine in this process, as a window would have it. */
function makeBench(change: (engine: Engine) => Partial<Engine> = () => ({})) {
  const calls: string[] = [];
  const made = standInEngine(calls);
  const engine = { ...made, ...change(made) };
  const served: Served[] = [];
  const ports: Port[] = [];
  const link = engineLink({
    connect: async () => {
      const [page, other] = memoryPortPair();
      ports.push(other);
      setTimeout(() =>
        served.push(serveEngine(engine, other, { welcome: { door: "web", paths: ["/made-up/basin.study.json"] } })),
      );
      return page;
    },
  });
  const bench = createBench(link, drafts(null));
  const until = (test: (state: BenchState) => boolean): Promise<void> =>
    new Promise((resolve, reject) => {
      const timer = setTimeout(() => reject(new Error("the bench never came to that state")), 5000);
      const look = (): void => {
        if (!test(bench.store.getState())) return;
        clearTimeout(timer);
        stop();
        resolve();
      };
      const stop = bench.store.subscribe(look);
      queueMicrotask(look);
    });
  const state = () => bench.store.getState();
  const atRest = () => until((now) => now.picture !== null && !now.computing && now.loading === null);
  return { bench, calls, served, ports, state, until, atRest };
}

describe("the bench", () => {
  test("opens what it was started with and shows it, cursor in the middle", async () => {
    const { state, atRest } = makeBench();
    await atRest();
    expect(state().studies?.present.study.title).toBe(standInStudy.title);
    expect(state().cursor).toEqual({ latitude: 30.5, dateIndex: 150 });
    expect(state().picture?.result.dateIndex).toBe(150);
    expect(state().notices).toEqual([]);
  });

  test("a drag asks for far fewer pictures than it has moves, ends on the last one, and is one undo", async () => {
    const { bench, calls, state, atRest } = makeBench();
    await atRest();
    calls.length = 0;
    for (let days = 91; days <= 190; days++) {
      bench.setEdge("shortestDays", days, "edge");
      if (days % 10 === 0) await new Promise((resolve) => setTimeout(resolve, 5));
    }
    bench.endGesture();
    await atRest();
    expect(calls.filter((call) => call === "latitudes").length).toBeLessThan(20);
    expect(state().picture?.open.study.band.shortestDays).toBe(190);
    expect(state().studies?.past).toHaveLength(1);
    bench.undo();
    await atRest();
    expect(state().picture?.open.study.band.shortestDays).toBe(90);
  });

  test("moving the latitude asks the engine for nothing", async () => {
    const { bench, calls, atRest } = makeBench();
    await atRest();
    calls.length = 0;
    for (let step = 0; step < 50; step++) bench.stepLatitude(1);
    await new Promise((resolve) => setTimeout(resolve, 50));
    expect(calls).toEqual([]);
  });

  test("while another region is being read nothing is computed on the axes of the old one", async () => {
    const asked: { region: unknown; loadedRegion: unknown }[] = [];
    let loadedRegion: unknown;
    const { bench, state, until, atRest } = makeBench((engine) => ({
      load: async (request, options) => {
        const record = await engine.load(request, options);
        loadedRegion = request.open.study.region;
        return record;
      },
      latitudes: (request, options) => {
        asked.push({ region: request.open.study.region, loadedRegion });
        return engine.latitudes(request, options);
      },
    }));
    await atRest();
    const open = state().studies?.present;
    if (!open) throw new Error("no study is open");
    bench.edit(withExtent(open, region, undefined));
    bench.setEdge("shortestDays", 120);
    bench.chooseField({ inBand: false });
    await until((now) => now.picture?.open.study.region?.west === -140 && !now.computing);
    for (const each of asked) expect(each.region).toEqual(each.loadedRegion);
    expect(state().picture?.open.study.band.shortestDays).toBe(120);
  });

  test("a record that cannot be read leaves a notice, and undo brings the old one back", async () => {
    const { bench, state, until, atRest } = makeBench((engine) => ({
      load: async (request, options) => {
        if (request.open.study.region) {
          throw new Fault({
            tag: "region",
            where: "region",
            expected: "cells in it",
            got: "none",
            advice: "choose a larger one",
          });
        }
        return engine.load(request, options);
      },
    }));
    await atRest();
    const open = state().studies?.present;
    if (!open) throw new Error("no study is open");
    bench.edit(withExtent(open, region, undefined));
    await until((now) => now.loadFault !== null && now.loading === null);
    expect(state().notices.map((notice) => notice.kind)).toEqual(["error"]);
    bench.undo();
    await atRest();
    expect(state().loadFault).toBeNull();
  });

  test("a region taken back while it is being read is not put in place afterwards", async () => {
    const { bench, state, atRest } = makeBench();
    await atRest();
    const { record, studies } = state();
    if (!studies) throw new Error("no study is open");
    bench.edit(withExtent(studies.present, region, undefined));
    expect(state().loading).not.toBeNull();
    bench.undo();
    expect(state().loading).toBeNull();
    // Longer than the stand-in takes to read.
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(state().record).toBe(record);
    expect(state().notices).toEqual([]);
  });

  test("an engine started anew has the study reopened, settings and cursor kept, and the window is told", async () => {
    const { bench, calls, served, state, until, atRest } = makeBench();
    await atRest();
    bench.setEdge("shortestDays", 120);
    bench.setDate(40);
    await atRest();
    calls.length = 0;
    served[0].greet();
    await until((now) => now.notices.some((notice) => notice.heading === "The engine was started again"));
    await atRest();
    expect(calls[0]).toBe("load");
    expect(state().studies?.present.study.band.shortestDays).toBe(120);
    expect(state().cursor?.dateIndex).toBe(40);
  });

  test("a lost connection is made again by itself", async () => {
    const { ports, state, until, atRest } = makeBench();
    await atRest();
    ports[0].close();
    await until((now) => now.link === "lost");
    expect(state().notices.map((notice) => notice.heading)).toEqual(["The engine stopped"]);
    await until((now) => now.notices.some((notice) => notice.heading === "The engine was started again"));
    expect(state().link).toBe("ready");
    expect(state().notices.map((notice) => notice.heading)).not.toContain("The engine stopped");
  });

  test("cautions follow a changed setting once the gesture has ended", async () => {
    const { bench, state, until, atRest } = makeBench((engine) => ({
      load: async (request, options) => {
        const { geostrophy } = request.open.study;
        return {
          ...(await engine.load(request, options)),
          cautions: [{ id: "stencil", text: `${geostrophy.stencil} points` }],
        };
      },
    }));
    await atRest();
    const open = state().studies?.present;
    if (!open) throw new Error("no study is open");
    bench.edit(withGeostrophy(open, { stencil: 3 }));
    await until((now) => now.cautions[0]?.text === "3 points");
  });

  test("a record without a spectrum is told in its panel, not as a fault, and is not asked again for every date", async () => {
    const { bench, calls, state, until, atRest } = makeBench((engine) => ({
      spectrum: async () => {
        calls.push("spectrum");
        throw new Fault({
          tag: "period",
          where: "spectrum",
          expected: "at least 16 dates an even step apart",
          got: "1 date",
          advice: "choose a longer period",
        });
      },
      latitudes: engine.latitudes,
    }));
    await until((now) => now.noSpectrum !== "");
    await atRest();
    expect(state().noSpectrum).toBe("No spectrum: it takes at least 16 dates an even step apart.");
    bench.stepDate(1);
    await atRest();
    expect(calls.filter((call) => call === "spectrum")).toHaveLength(1);
    expect(state().notices).toEqual([]);
  });

  test("a spectrum of which no segment is whole counts as none", async () => {
    const { state, until } = makeBench((engine) => ({
      spectrum: async (request, options) => ({ ...(await engine.spectrum(request, options)), segments: 0 }),
    }));
    await until((now) => now.noSpectrum !== "");
    expect(state().noSpectrum).toBe("No spectrum: gaps leave no 300 days in a row.");
    expect(state().spectrum).toBeNull();
  });

  test("filters in space ask for another spectrum, errors do not", async () => {
    const { bench, calls, state, until, atRest } = makeBench((engine) => ({
      spectrum: async (request, options) => {
        calls.push("spectrum");
        return engine.spectrum(request, options);
      },
    }));
    await until((now) => now.spectrum !== null);
    await atRest();
    const present = () => {
      const open = state().studies?.present;
      if (!open) throw new Error("no study is open");
      return open;
    };
    const count = () => calls.filter((call) => call === "spectrum").length;
    bench.edit(withErrors(present(), { heightMetres: 0.02 }));
    await atRest();
    expect(count()).toBe(1);
    bench.edit(withSpace(present(), { removeZonalMean: true }));
    await atRest();
    expect(count()).toBe(2);
  });

  test("rows of the equatorial blend follow the settings", async () => {
    const { bench, state, until, atRest } = makeBench((engine) => ({
      load: async (request, options) => {
        const record = await engine.load(request, options);
        const isBlend = request.open.study.geostrophy.equator === "blend";
        return { ...record, blendedRows: record.blendedRows.map(() => (isBlend ? 1 : 0)) };
      },
    }));
    await atRest();
    expect(state().blendedRows).not.toContain(1);
    const open = state().studies?.present;
    if (!open) throw new Error("no study is open");
    bench.edit(withGeostrophy(open, { equator: "blend" }));
    await until((now) => now.blendedRows?.[0] === 1);
  });

  test("playing goes through every date in order and stops at the last", async () => {
    const { bench, state, until, atRest } = makeBench();
    await atRest();
    bench.setDate(296);
    const seen: number[] = [];
    bench.store.subscribe((now) => {
      const shown = now.picture?.result.dateIndex;
      if (shown !== undefined && shown !== seen.at(-1)) seen.push(shown);
    });
    bench.togglePlay();
    await until((now) => !now.playing && now.cursor?.dateIndex === 299);
    await atRest();
    expect(seen.slice(-4)).toEqual([296, 297, 298, 299]);
    expect(state().playing).toBe(false);
  });

  test("results are never changed in place", async () => {
    const { bench, state, atRest } = makeBench();
    await atRest();
    const first = state().picture;
    const copy = structuredClone(first);
    bench.setEdge("shortestDays", 200);
    bench.stepDate(5);
    await atRest();
    expect(first).toEqual(copy);
    expect(state().picture).not.toBe(first);
  });
});
