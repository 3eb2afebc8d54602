import type { LatitudesInput } from "../../../core/figure/latitudes-figure";
import { boxText, errorSourceText, gridText } from "../../../core/figure/record-text";
import { bandText } from "../../../core/figure/scales/band-text";
import type { ScalesInput } from "../../../core/figure/scales-figure";
import { formatDate } from "../../../core/figure/time-ticks";
import { blendedRows } from "../../../core/ocean/equator";
import { quantityById } from "../../../core/ocean/quantities/evaluate";
import { geometryOf } from "../../../core/study/geometry";
import type { Job } from "../job";
import { latitudesResult } from "../latitudes";
import type { Workspace } from "../workspace";
import type { Analysis } from "./analysis";

/** What the latitude row of a run is drawn from: u in the band, its map on the date with data nearest the middle. */
export async function latitudesInput(analysis: Analysis, workspace: Workspace, job: Job): Promise<LatitudesInput> {
  const { study } = analysis.open;
  const { record } = analysis.stages;
  const result = await latitudesResult(
    workspace,
    {
      open: analysis.open,
      grid: analysis.grid,
      choice: { quantity: "u", inBand: analysis.band !== null },
      dateIndex: middleDate(record.hasData),
      columns: record.cube.dates,
    },
    job,
  );
  const u = quantityById("u");
  const axes = {
    ...record.axes,
    time: record.time,
    hasData: record.hasData,
    ocean: record.ocean,
    coverage: analysis.loaded.coverage,
    blendedRows: blendedRows(geometryOf(record.axes, study.geostrophy)),
  };
  return {
    record: axes,
    result,
    ...(analysis.spectrum ? { spectrum: analysis.spectrum } : {}),
    quantity: { title: u.title, units: u.units, signed: u.signed },
    band: study.band,
    ...(analysis.band && analysis.jets.jets ? { jets: analysis.jets.jets.jets } : {}),
    errorSource: errorSourceText(study.errors),
    region: boxText(axes),
    grid: gridText(gridLabel(analysis), axes),
    date: formatDate(record.time.calendar, record.time.values[result.dateIndex]),
  };
}

/** What the figure of scales is drawn from. */
export function scalesInput(analysis: Analysis): ScalesInput {
  const { open, scales, stages } = analysis;
  const axes = { ...stages.record.axes, time: stages.record.time };
  return {
    result: scales,
    longitude: axes.longitude.values,
    ocean: stages.record.ocean,
    calendar: axes.time.calendar,
    region: boxText(axes),
    grid: gridText(gridLabel(analysis), axes),
    band: bandText(open.study.band),
  };
}

function gridLabel({ open, grid }: Analysis): string {
  return open.study.grids.find(({ id }) => id === grid)?.label || `Grid ${grid}`;
}

/** The date with data nearest the middle of the record. */
function middleDate(hasData: Uint8Array): number {
  const middle = Math.floor((hasData.length - 1) / 2);
  for (let distance = 0; distance < hasData.length; distance++) {
    if (hasData[middle + distance]) return middle + distance;
    if (hasData[middle - distance]) return middle - distance;
  }
  return middle;
}
