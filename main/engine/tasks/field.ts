import { planeOf } from "../../../core/model/cube";
import type { BandFilter } from "../../../core/numeric/band-filter";
import { type GridGeometry, gridGeometry } from "../../../core/ocean/grid-geometry";
import { planesFrom } from "../../../core/ocean/quantities/evaluate";
import { type Background, bandHeightPlane } from "../../../core/study/band-plane";
import type { HeightRecord } from "../../../core/study/record";
import type { GeostrophySettings } from "../../../core/study/schema";

/** A field of the record: which quantity, as it stands or in the band. */
export interface FieldArguments {
  readonly record: HeightRecord;
  readonly geostrophy: GeostrophySettings;
  readonly background: Background;
  readonly quantity: string;
  readonly inBand: boolean;
  readonly filter: BandFilter | null;
}

export function geometryOf(record: HeightRecord, geostrophy: GeostrophySettings): GridGeometry {
  return gridGeometry(record.axes, geostrophy, "geostrophy");
}

/** Height on one date, as it stands or in the band. Dates without data are NaN everywhere. */
export function heightsOn(args: Omit<FieldArguments, "quantity">, date: number): Float64Array {
  const { record, inBand, filter, background } = args;
  if (!inBand || !record.hasData[date]) return planeOf(record.cube, date);
  return bandHeightPlane(record, date, filter, background);
}

/** The field's plane on one date. */
export function fieldOn(args: FieldArguments, geometry: GridGeometry, date: number): Float64Array {
  return planesFrom(heightsOn(args, date), geometry)(args.quantity);
}
