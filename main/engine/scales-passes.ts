import { persistenceByLatitude } from "../../core/jets/persistence";
import type { PersistenceResult } from "../../core/model/scales-result";
import { thinnedDates } from "../../core/study/latitude-time";
import type { Job } from "./job";
import type { WorkerPool } from "./pool";
import { sharedFloat32, sharedFloat64 } from "./shared-memory";
import type { FieldArguments } from "./tasks/field";
import { addMoments, type Moments } from "./tasks/moments";

/** Pieces that passes over dates are cut into: fixed, so that sums do not depend on the number of workers. */
const flowPieces = 16;
/** Most maps whose signs are counted; a map in the band costs the whole filter. */
const mostSignMaps = 1000;
const mostBandSignMaps = 400;
/** In the band, maps this many to its shortest period: no reversal of sign falls between them. */
const mapsAPeriod = 8;

/** What a pass over every date leaves: see FlowTarget. */
export interface FlowPass {
  readonly moments: Moments;
  readonly flux: Float64Array;
  readonly alongRow: Float64Array;
  readonly samples: Float32Array;
}

/** One pass over every date: moments of u and v, momentum flux by row and date, v along a row and in sampled cells. */
export async function flowPass(
  pool: WorkerPool,
  field: FieldArguments,
  row: number,
  sampleCells: Int32Array,
  job: Job,
): Promise<FlowPass> {
  const { dates, rows, columns } = field.record.cube;
  const target = {
    row,
    flux: sharedFloat64(rows * dates),
    alongRow: sharedFloat64(columns * dates),
    sampleCells,
    samples: sharedFloat32(sampleCells.length * dates),
  };
  const blocks = await job.step("Adding up currents and momentum fluxes", dates, () =>
    pool.share("scaleFlow", dates, (range) => ({ ...field, dates: range, target }), job, flowPieces),
  );
  const { flux, alongRow, samples } = target;
  return { moments: addMoments(blocks), flux, alongRow, samples };
}

/** How lastingly u keeps its sign: maps thinned in time, and the zonal means `zonal[row * dates + date]` on every date. */
export async function persistencePass(
  pool: WorkerPool,
  field: FieldArguments,
  zonal: Float64Array,
  job: Job,
): Promise<PersistenceResult> {
  const { cube, time } = field.record;
  const { dates, rows, columns } = cube;
  const cells = rows * columns;
  const bridge = (stepDays: number) => Math.floor(field.band.bridgeDays / stepDays + 1e-9) || 0;
  const fine = Math.max(1, Math.floor((field.band.shortestDays ?? 0) / mapsAPeriod / time.step) || 1);
  const chosen = field.inBand
    ? thinnedDates(dates, Math.min(mostBandSignMaps, Math.ceil(dates / fine)))
    : thinnedDates(dates, mostSignMaps);
  const signs = new Int8Array(new SharedArrayBuffer(chosen.length * cells));
  await job.step("Following the sign of the flow", chosen.length, () =>
    pool.share("scaleSigns", chosen.length, (range) => ({ ...field, chosen, range, signs }), job),
  );
  const stepDays = (chosen.length > 1 ? chosen[1] - chosen[0] : 1) * (dates > 1 ? time.step : 1);
  const counts = { signs, cells, stepDays, bridgedDates: bridge(stepDays) };
  const parts = await pool.share("scalePersistence", cells, (range) => ({ ...counts, range }), job);
  const byRow = persistenceByLatitude(zonal, rows, dates > 1 ? time.step : 1, bridge(time.step));
  const joined = (pick: (part: (typeof parts)[number]) => Iterable<number>) =>
    Float32Array.from(parts.flatMap((part) => Array.from(pick(part))));
  // Land has no run at all, which is not a run of no days.
  const unknown = joined((part) => part.share).map((value) => (Number.isNaN(value) ? Number.NaN : 0));
  return {
    inBand: field.inBand,
    stepDays,
    share: { rows, columns, values: joined((part) => part.share) },
    longestDays: { rows, columns, values: joined((part) => part.longestDays).map((value, i) => value + unknown[i]) },
    sign: Int8Array.from(joined((part) => part.prevailingSign)),
    byLatitude: {
      share: byRow.share,
      longestDays: byRow.longestDays.map((value, row) => (byRow.validDates[row] > 0 ? value : Number.NaN)),
      sign: byRow.prevailingSign,
    },
  };
}
