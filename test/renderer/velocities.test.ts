import { describe, expect, test } from "vitest";
import type { Engine, SuppliedVelocityReport } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import { type BenchState, firstState } from "../../renderer/state/bench-state";
import { withBand, withGeostrophy } from "../../renderer/state/edit-study";
import { startHistory } from "../../renderer/state/history";
import { comparisonKey, velocities } from "../../renderer/state/velocities";
import {
  claimText,
  conventionSettings,
  conventionText,
  differenceText,
  isAboutMean,
  isStudysOwn,
} from "../../renderer/views/sources/velocity-text";
import { standInStudy } from "./stand-in-engine";

const open = { study: standInStudy, folder: "/made-up", path: "" };

const numbers = { count: 9, rmsDifference: 0.01, bias: 0.001, correlation: 0.99, rmsOurs: 0.2, rmsSupplied: 0.2 };
const component = { all: numbers, anomalies: { ...numbers, rmsDifference: 0.005 } };
const convention = { stencil: 3, earth: "sphere", radius: 6371000, gravity: 9.81 } as const;
const report: SuppliedVelocityReport = {
  eastward: "ugos",
  northward: "vgos",
  reference: "geoid",
  matchesHeight: true,
  foundBy: "standard name",
  notes: [],
  dates: 12,
  agreement: { u: component, v: component, bands: [], meanShare: 0.5, oursOnly: 0, suppliedOnly: 0 },
  conventions: [{ convention, count: 9, rmsDifference: 0.004, rmsAnomalyDifference: 0.002, rmsSupplied: 0.2 }],
};

describe("comparing supplied velocities", () => {
  function comparer(engineVelocities: Engine["velocities"]) {
    let state: BenchState = { ...firstState, studies: startHistory(open), grid: "A" };
    const failed: unknown[] = [];
    const store = {
      get: () => state,
      set: (change: Partial<BenchState>) => {
        state = { ...state, ...change };
      },
    };
    // Only this method is called.
    const engine = { velocities: engineVelocities } as Engine;
    return { compared: velocities(store, engine, (error) => failed.push(error)), now: () => state, failed };
  }

  test("keeps the report with what it holds for, and progress only while it lasts", async () => {
    const { compared, now } = comparer(async (_, options) => {
      options?.onProgress?.({ step: "Comparing", done: 3, total: 12 });
      expect(now().comparing).toEqual({ step: "Comparing", done: 3, total: 12 });
      return report;
    });
    await compared.compare();
    expect(now().comparison).toEqual({ key: comparisonKey(open, "A"), report });
    expect(now().comparing).toBeNull();
  });

  test("files without velocities are an answer, not a fault", async () => {
    const { compared, now, failed } = comparer(async () => null);
    await compared.compare();
    expect(now().comparison?.report).toBeNull();
    expect(failed).toEqual([]);
  });

  test("a fault is told and leaves no comparison", async () => {
    const { compared, now, failed } = comparer(async () => {
      throw new Fault({ tag: "file", where: "a.nc", expected: "values", got: "none", advice: "try another" });
    });
    await compared.compare();
    expect(failed).toHaveLength(1);
    expect(now()).toMatchObject({ comparison: null, comparing: null });
  });

  test("cancelling aborts the call", async () => {
    let aborted = false;
    const { compared } = comparer(
      (_, options) =>
        new Promise((resolve) => {
          options?.signal?.addEventListener("abort", () => {
            aborted = true;
            resolve(null);
          });
        }),
    );
    const done = compared.compare();
    compared.cancel();
    await done;
    expect(aborted).toBe(true);
  });

  test("a comparison holds for other bands, not for another way of computing currents", () => {
    const key = comparisonKey(open, "A");
    expect(comparisonKey(withBand(open, { ...open.study.band, shortestDays: 30 }), "A")).toBe(key);
    expect(comparisonKey(withGeostrophy(open, { stencil: 3 }), "A")).not.toBe(key);
    expect(comparisonKey(open, "B")).not.toBe(key);
  });
});

describe("a comparison in words", () => {
  test("a convention names its sphere and its gravity", () => {
    expect(conventionText(convention)).toBe("3 points, sphere of 6371 km, gravity 9.81 m s⁻²");
    expect(conventionText({ stencil: 7, earth: "ellipsoid", radius: 6371000, gravity: "latitude" })).toBe(
      "7 points, ellipsoid, gravity by latitude",
    );
  });

  test("taking over a convention makes it the study's own; the radius counts on a sphere only", () => {
    const settings = conventionSettings(convention);
    if (!settings) throw new Error("no settings");
    const { geostrophy } = withGeostrophy(open, settings).study;
    expect(isStudysOwn(convention, open.study.geostrophy)).toBe(false);
    expect(isStudysOwn(convention, geostrophy)).toBe(true);
    expect(isStudysOwn({ ...convention, radius: 6378137 }, geostrophy)).toBe(false);
    const flat = { ...convention, earth: "ellipsoid" };
    expect(isStudysOwn({ ...flat, radius: 1 }, { ...geostrophy, earth: "ellipsoid" })).toBe(true);
    expect(conventionSettings({ ...convention, stencil: 4 })).toBeNull();
  });

  test("the claim is measured against the supplied rms", () => {
    expect(claimText(report)).toMatch(/may be claimed only if .* rms of 20.000 cm s⁻¹; here it is 2.0 %\.$/);
    expect(claimText({ ...report, conventions: [] })).toMatch(/could not be measured here\.$/);
  });

  test("heights of another reference are compared about the mean, where there are dates enough", () => {
    const other = { ...report, matchesHeight: false };
    expect(isAboutMean(other)).toBe(true);
    expect(isAboutMean({ ...other, dates: 1 })).toBe(false);
    expect(claimText(other)).toMatch(/here it is 1.0 %\.$/);
  });

  test("a difference too small to show is said to be so", () => {
    expect(differenceText(5e-9)).toBe("under 0.001");
    expect(differenceText(0.0042)).toBe("0.420");
  });
});
