import { planeOf } from "../../../core/model/cube";
import type { GridWindow } from "../../../core/model/source";
import { type ConventionAgreement, type ConventionSample, compareConventions } from "../../../core/ocean/conventions";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { addVelocities, velocityAgreement, velocityComparison } from "../../../core/ocean/supplied-velocity";
import { geometryOf } from "../../../core/study/geometry";
import type { HeightRecord } from "../../../core/study/record";
import type { GeostrophySettings } from "../../../core/study/schema";
import type { GridIndex } from "../../readers/joined-grid";
import { readHeights } from "../../readers/read-heights";
import type { JobFlags } from "../job";

export type VelocityTaskResult = {
  readonly agreement: Omit<ReturnType<typeof velocityAgreement>, "meanDifference">;
  readonly conventions: readonly ConventionAgreement[];
};

/**
 * Compares supplied velocities with ours on a few dates of the record, under the study's conventions and under the offered
 * ones. `dates` are indices into the record; the window's first date is the record's date 0. Counts one a date.
 */
export async function velocitiesTask(
  args: {
    readonly record: HeightRecord;
    readonly eastward: GridIndex;
    readonly northward: GridIndex;
    readonly window: GridWindow;
    readonly dates: readonly number[];
    readonly geostrophy: GeostrophySettings;
    readonly about: "zero" | "mean";
  },
  job: JobFlags,
): Promise<VelocityTaskResult> {
  const { record, window, geostrophy } = args;
  const geometry = geometryOf(record.axes, geostrophy);
  const comparison = velocityComparison(record.axes.latitude.values, record.cube.columns);
  const samples: ConventionSample[] = [];
  const planeAt = async (index: GridIndex, date: number): Promise<Float64Array> => {
    const at = window.time[0] + date;
    let found = new Float64Array(record.cube.rows * record.cube.columns).fill(Number.NaN);
    await readHeights(index, { ...window, time: [at, at + 1] }, (_, plane) => {
      found = plane.slice();
    });
    return found;
  };
  for (const date of args.dates) {
    job.poll();
    const supplied = { u: await planeAt(args.eastward, date), v: await planeAt(args.northward, date) };
    const height = planeOf(record.cube, date);
    addVelocities(comparison, geostrophicVelocity(height, geometry), supplied);
    if (samples.length < 4) samples.push({ height, supplied });
    job.count();
  }
  const { meanDifference: _, ...agreement } = velocityAgreement(comparison);
  return { agreement, conventions: compareConventions(samples, record.axes, geostrophy, undefined, args.about) };
}
