import type { OpenStudy } from "../../core/contract/engine";
import { cutSectors } from "../../core/jets/ridges/sectors";
import { Fault } from "../../core/model/errors";
import type { JetsResult } from "../../core/model/jets-result";
import { thinnedDates } from "../../core/study/latitude-time";
import type { Job } from "./job";
import { fieldArguments, fieldStages } from "./latitudes";
import type { Workspace } from "./workspace";

/** Dates on which sectors are looked at, evenly over the record. */
const sectorDates = 300;
/** Fewest dates and rows in which jets can be followed. */
const fewestDates = 8;
const fewestRows = 5;

/** Finds the jets of a record in the study's band. Errors: too few dates or rows, and what band and background say. */
export async function jetsResult(workspace: Workspace, open: OpenStudy, grid: string, job: Job): Promise<JetsResult> {
  const { study } = open;
  const stages = await fieldStages(workspace, open, grid, { quantity: "u", inBand: true }, job);
  const { record, reduction, background } = stages;
  requireEnough(record.cube.dates, record.cube.rows);
  requireBand(study.band.filter);
  const sectors = cutSectors(record.axes.longitude.values, study.jets.sectorDegrees);
  const dates = thinnedDates(record.cube.dates, sectorDates);
  const parts = await job.step("Looking at longitude sectors", dates.length, () =>
    workspace.pool.share(
      "sectorSeries",
      dates.length,
      ([from, to]) => ({ ...fieldArguments(stages, study, true), sectors, dates: dates.subarray(from, to) }),
      job,
    ),
  );
  const sectorMeans = new Float64Array(parts.reduce((sum, part) => sum + part.length, 0));
  let start = 0;
  for (const part of parts) {
    sectorMeans.set(part, start);
    start += part.length;
  }
  const { axes, time, hasData } = record;
  const result = await workspace.pool.run(
    "jets",
    {
      record: { axes, time, hasData },
      settings: { band: study.band, jets: study.jets, geostrophy: study.geostrophy },
      zonal: reduction.zonal,
      basis: background.basis,
      sectors,
      sectorDates: dates,
      sectorMeans,
    },
    job,
  );
  return { key: await jetsKey(workspace, open, grid, job), ...result };
}

function requireBand(filter: OpenStudy["study"]["band"]["filter"]): void {
  if (filter !== "none") return;
  throw new Fault({
    tag: "band",
    where: "jets",
    expected: "a band to look for jets in",
    got: 'the filter "none"',
    advice: "choose a filter; leave the long side open to keep standing jets",
  });
}

/** Names the record and every setting that jets depend on. */
export async function jetsKey(workspace: Workspace, open: OpenStudy, grid: string, job: Job): Promise<string> {
  const { files } = await workspace.index(open, grid, job);
  const { region, period, geostrophy, space, background, band, jets } = open.study;
  const input = files.map(({ path, bytes, modifiedMs }) => [path, bytes, modifiedMs]);
  return JSON.stringify([grid, input, region ?? null, period ?? null, geostrophy, space, background, band, jets]);
}

function requireEnough(dates: number, rows: number): void {
  if (dates >= fewestDates && rows >= fewestRows) return;
  throw new Fault({
    tag: dates < fewestDates ? "period" : "region",
    where: "jets",
    expected: `at least ${fewestDates} dates and ${fewestRows} latitudes to follow jets in`,
    got: `${dates} dates and ${rows} latitudes`,
    advice: dates < fewestDates ? "choose a longer period" : "widen the region in latitude",
  });
}
