import type { Engine, LatitudesResult } from "../../../core/contract/engine";
import type { CallOptions } from "../../../core/contract/job";
import { Fault } from "../../../core/model/errors";
import { studySchema } from "../../../core/study/schema";

export const standInStudy = studySchema.parse({ strake: 1, grids: [{ id: "A", files: ["a.nc"] }] });

/** Typed arrays of each kind a result may hold, some as views into a larger buffer at an odd offset. */
export function standInLatitudes(): LatitudesResult {
  const larger = Float64Array.from({ length: 9 }, (_, index) => index / 3);
  const profile = {
    mean: larger.subarray(1, 4),
    half95: Float64Array.of(Number.NaN, -0, Number.MAX_VALUE),
    effectiveSize: new Float64Array(0),
    dates: Float64Array.of(1, 2, 3),
  };
  const values = Float32Array.from({ length: 7 }, (_, index) => (index === 3 ? Number.NaN : index * 0.1)).subarray(1);
  return {
    choice: { quantity: "u", inBand: true },
    dateIndex: 3,
    map: { rows: 2, columns: 3, values },
    onDate: Float64Array.of(Number.POSITIVE_INFINITY, 2),
    profile,
    latitudeTime: { rows: 1, columns: 1, values: Float32Array.of(7) },
    columnDates: Int32Array.of(-2147483648, 0, 2147483647),
    filterEnd: Uint8Array.of(0, 1, 255),
    limits: [-0.5, 0.5],
    pictureLimits: [-0.25, 0.25],
    error: null,
    response: {
      frequency: Float64Array.of(0.1),
      amplitude: Float64Array.of(1),
      halfWidthSteps: 300,
      daysLostEachEnd: 300,
    },
  };
}

function untilCancelled(options?: CallOptions): Promise<never> {
  return new Promise((_resolve, reject) => {
    // A timer keeps the process of a stand-in alive as real work would.
    const working = setInterval(() => undefined, 1000);
    options?.signal?.addEventListener("abort", () => {
      clearInterval(working);
      reject(new Error("cancelled"));
    });
  });
}

export interface StandIn extends Engine {
  close(): Promise<void>;
  /** Names of the methods called so far, in order. */
  readonly called: string[];
  /** Calls that were told to stop. */
  cancelled(): number;
}

/**
 * An engine without data. `describe` of one path gives it back; of "/throw/fault" throws a Fault, of "/throw/error" an
 * Error, of "/function" gives what no wire carries, of "/die" ends the process. `load` reports `steps` steps of progress;
 * `run` never ends unless cancelled.
 */
export function createStandIn(steps = 3): StandIn {
  const called: string[] = [];
  let cancelled = 0;
  const note = (name: string) => void called.push(name);
  return {
    called,
    cancelled: () => cancelled,
    close: async () => note("close"),
    open: async ({ paths }) => {
      note("open");
      return { study: standInStudy, folder: "/data", path: paths[0] ?? "" };
    },
    describe: async ({ paths }) => {
      note("describe");
      const [path] = paths;
      if (path === "/throw/error") throw new RangeError("out of range");
      if (path === "/die") process.kill(process.pid, "SIGKILL");
      if (path === "/function") return (() => 1) as never;
      const fault = new Fault({
        tag: "file",
        where: path,
        expected: "a whole file",
        got: "half of it",
        advice: "fetch it again",
      });
      if (path === "/throw/fault") throw fault;
      return paths.map((each) => ({ path: each, refused: fault.toData() }));
    },
    check: async ({ study }) => {
      note("check");
      return study as typeof standInStudy;
    },
    load: async (_request, options) => {
      note("load");
      for (let done = 1; done <= steps; done++) options?.onProgress?.({ step: "reading", done, total: steps });
      return {} as never;
    },
    latitudes: async () => {
      note("latitudes");
      return standInLatitudes();
    },
    spectrum: async ({ quantity }) => ({ quantity }) as never,
    velocities: async () => null,
    jets: async () => ({}) as never,
    scales: async () => ({}) as never,
    eddyTest: async () => ({}) as never,
    run: async (_request, options) => {
      note("run");
      return untilCancelled(options).finally(() => {
        cancelled += 1;
      });
    },
    save: async ({ path }) => {
      note("save");
      return { path };
    },
  };
}

export const openStudy = { study: standInStudy, folder: "/data", path: "" } as const;
