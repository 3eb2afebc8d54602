import type { Engine, OpenStudy, RecordOverview } from "../../core/contract/engine";
import type { Axis, TimeAxis } from "../../core/model/axis";
import { Fault } from "../../core/model/errors";
import { type Study, studySchema } from "../../core/study/schema";
import { madeJet, madeJets, madeTest, madeVerdict } from "./made-jets";

/** Size of the made-up ocean: half a degree, three-day maps. */
export const standInSize = { rows: 43, columns: 51, dates: 300 };

const { rows, columns, dates } = standInSize;
const firstDay = 22_340;
const stepDays = 3;

export const standInStudy: Study = studySchema.parse({
  strake: 1,
  title: "Made-up basin",
  grids: [{ id: "A", label: "Grid A", files: ["made-up.nc"] }],
  band: { shortestDays: 90, longestDays: 540 },
});

function axis(kind: Axis["kind"], first: number, step: number, count: number): Axis {
  return {
    kind,
    values: Float64Array.from({ length: count }, (_, i) => first + i * step),
    step,
    even: true,
    periodic: false,
  };
}

const latitude = axis("latitude", 20, 0.5, rows);
const longitude = axis("longitude", -150, 0.5, columns);
const time: TimeAxis = { ...axis("time", firstDay, stepDays, dates), kind: "time", calendar: "standard" };
const hasData = Uint8Array.from({ length: dates }, (_, date) => (date > 120 && date < 126 ? 0 : 1));
const ocean = Uint8Array.from({ length: rows * columns }, (_, cell) => {
  const [y, x] = [Math.floor(cell / columns) - 34, (cell % columns) - 42];
  return y * y + 2 * x * x < 60 ? 0 : 1;
});

const record: RecordOverview = {
  latitude,
  longitude,
  time,
  hasData,
  coverage: Float64Array.from(hasData, (has, date) => has * (0.9 + 0.1 * Math.sin(date / 9))),
  ocean,
  timeDeviationDays: 0,
  blendedRows: new Uint8Array(rows),
  cautions: [{ id: "land", text: "2.1 % of cells lie within 50 km of land and are left out." }],
  bytes: 4 * rows * columns * dates,
};

/** Jets that wander slowly, waves that a band pass weakens the more the shorter the band's long end. */
function value(row: number, column: number, date: number, share: number): number {
  const jets = Math.sin(row / 2.4 + 0.8 * Math.sin(date / 40));
  const waves = Math.sin(column / 3 + date / 7 + row / 2) * Math.cos(row / 3.1 - date / 23);
  return 0.08 * (jets + share * waves);
}

function zonalMean(row: number, date: number, share: number): number {
  let sum = 0;
  for (let column = 0; column < columns; column++) sum += value(row, column, date, share);
  return sum / columns;
}

function response(band: Study["band"]): { frequency: Float64Array; amplitude: Float64Array } {
  const frequency = Float64Array.from({ length: 150 }, (_, i) => (i + 1) / (dates * stepDays));
  const amplitude = frequency.map((f) =>
    f >= 1 / (band.longestDays ?? Infinity) && f <= 1 / (band.shortestDays ?? 0) ? 1 : 0,
  );
  return { frequency, amplitude };
}

const pause = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

/** An Engine that makes its own ocean, so that the window can be drawn and tested without files. */
export function standInEngine(calls: string[] = []): Engine {
  const open: OpenStudy = { study: standInStudy, folder: "/made-up", path: "/made-up/basin.study.json" };
  return {
    async open({ paths }) {
      calls.push("open");
      if (paths[0]?.includes("missing")) {
        throw new Fault({
          tag: "file",
          where: paths[0],
          expected: "a file",
          got: "nothing there",
          advice: "check the spelling",
        });
      }
      return open;
    },
    async describe({ paths }) {
      return paths.map((path) => ({
        path,
        refused: {
          tag: "file",
          where: path,
          expected: "a grid",
          got: "a made-up ocean",
          advice: "open a real file",
        } as const,
      }));
    },
    check: async ({ study }) => studySchema.parse(study),
    async load(_request, options) {
      calls.push("load");
      for (let done = 0; done < 3; done++) {
        options?.onProgress?.({ step: "Reading heights", done, total: 3 });
        await pause(30);
      }
      return record;
    },
    async latitudes({ open: { study }, choice, dateIndex }) {
      calls.push("latitudes");
      await pause(20);
      const share = choice.inBand ? Math.min(1, 60 / (study.band.shortestDays ?? 60)) : 1.5;
      const map = Float32Array.from({ length: rows * columns }, (_, cell) =>
        ocean[cell] === 0 ? Number.NaN : value(Math.floor(cell / columns), cell % columns, dateIndex, share),
      );
      const latitudeTime = Float32Array.from({ length: rows * dates }, (_, cell) =>
        hasData[cell % dates] === 0 ? Number.NaN : zonalMean(Math.floor(cell / dates), cell % dates, share),
      );
      const column = (make: (row: number) => number): Float64Array =>
        Float64Array.from({ length: rows }, (_, row) => make(row));
      return {
        choice,
        dateIndex,
        map: { rows, columns, values: map },
        onDate: column((row) => zonalMean(row, dateIndex, share)),
        profile: {
          mean: column((row) => 0.03 * Math.sin(row / 2.4)),
          half95: column((row) => 0.01 + 0.005 * Math.cos(row / 4)),
          effectiveSize: column(() => 24),
          dates: column(() => dates - 5),
        },
        latitudeTime: { rows, columns: dates, values: latitudeTime },
        columnDates: Int32Array.from({ length: dates }, (_, date) => date),
        filterEnd: Uint8Array.from({ length: dates }, (_, date) => (date < 40 || date > dates - 40 ? 1 : 0)),
        limits: [-0.16, 0.16],
        pictureLimits: [-0.1, 0.1],
        error: null,
        response: { ...response(study.band), halfWidthSteps: 40, daysLostEachEnd: 120 },
      };
    },
    velocities: async () => null,
    async jets({ open: { study } }) {
      calls.push("jets");
      await pause(20);
      return madeJets(JSON.stringify(study.band), [
        madeJet({ id: 1, sign: 1, meanLatitude: 26 }),
        madeJet({ id: 2, sign: -1, meanLatitude: 31 }),
      ]);
    },
    scales: async () => ({}) as never,
    async eddyTest({ open: { study } }, options) {
      for (let done = 0; done < 3; done++) {
        options?.onProgress?.({ step: "Drawing oceans of eddies", done, total: 3 });
        await pause(30);
      }
      return madeTest(JSON.stringify(study.band), [madeVerdict(1, 0.004), madeVerdict(2, 0.3)]);
    },
    async spectrum({ quantity }) {
      await pause(20);
      const frequency = Float64Array.from({ length: 150 }, (_, i) => (i + 1) / (dates * stepDays));
      const density = frequency.map((f) => 0.02 / (1 + (f * 120) ** 3));
      return { quantity, frequency, density, segments: 5, segmentDays: 300, window: "hann", units: "m2 s-2 day" };
    },
    run: async ({ folder }, options) => {
      options?.onProgress?.({ step: "Writing", done: 1, total: 2 });
      await pause(50);
      return { folder, files: ["summary.json"] };
    },
    save: async ({ path }) => ({ path }),
  };
}
