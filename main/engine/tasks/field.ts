import { planeOf } from "../../../core/model/cube";
import type { GridGeometry } from "../../../core/ocean/grid-geometry";
import type { PlaneLookup } from "../../../core/ocean/quantities/define";
import { planesFrom } from "../../../core/ocean/quantities/evaluate";
import { timeFilter } from "../../../core/study/band";
import { type Background, bandHeightPlane } from "../../../core/study/band-plane";
import { geometryOf } from "../../../core/study/geometry";
import type { HeightRecord } from "../../../core/study/record";
import type { Study } from "../../../core/study/schema";
import { spaceFilter } from "../../../core/study/space-filter";

/** The part of a study that decides what a field is. */
export type FieldSettings = Pick<Study, "geostrophy" | "space" | "band">;

export function fieldSettings({ geostrophy, space, band }: Study): FieldSettings {
  return { geostrophy, space, band };
}

/** What fields of a record are made from, as they stand or in the band. Plain data: goes to the workers. */
export interface FieldArguments extends FieldSettings {
  readonly record: HeightRecord;
  readonly background: Background;
  readonly inBand: boolean;
}

/** Fields of a record, date by date. */
export interface FieldSource {
  readonly geometry: GridGeometry;
  /** Every quantity on one date; NaN everywhere on a date without data. */
  readonly on: (date: number) => PlaneLookup;
}

/** Designs geometry and filters once for the dates of a task. Space filters act on height, before anything is derived. */
export function fieldSource({ record, geostrophy, space, background, band, inBand }: FieldArguments): FieldSource {
  const geometry = geometryOf(record.axes, geostrophy);
  const filter = inBand ? timeFilter(band, record.time) : null;
  const inSpace = spaceFilter(space, record.axes, geometry);
  return {
    geometry,
    on: (date) => {
      const isFiltered = inBand && record.hasData[date] === 1;
      const heights = isFiltered ? bandHeightPlane(record, date, filter, background) : planeOf(record.cube, date);
      const hasMean = !isFiltered || !takesMean(background);
      const anomaly = () => inSpace(hasMean ? heights.map((value, cell) => value - record.mean[cell]) : heights);
      return planesFrom(inSpace(heights), geometry, anomaly);
    },
  };
}

/** Whether the mean is among what the background takes off. */
function takesMean({ basis }: Background): boolean {
  return basis.names.some((name, term) => name === "mean" && basis.removed[term] === 1);
}
