import type { GridGeometry } from "../grid-geometry";

/** Planes of one date (or of one weighted sum of dates), row-major rows × columns, SI units. */
export type PlaneLookup = (id: string) => Float64Array;

/**
 * Planes that are given, not computed. "height": the height of the date, or its band. "height-anomaly": height minus the
 * cell's time mean over the period, for quantities that speak of eddies; where no anomaly is given, and in the band (which
 * holds no mean), it is the height itself.
 */
export const basePlanes = ["height", "height-anomaly"] as const;

/** A field derived from height. One file a quantity, one line in the index. */
export interface Quantity {
  readonly id: string;
  readonly title: string;
  /** SI units as CF writes them. */
  readonly units: string;
  /** Empty where CF has no name. */
  readonly standardName: string;
  /** Name in the files that a run writes. */
  readonly variable: string;
  /** A linear function of height, without an offset: may be filtered after reduction. */
  readonly linear: boolean;
  /** Signed quantities get a diverging colour map, others a sequential one. */
  readonly signed: boolean;
  /** Ids of the quantities or base planes it is computed from. */
  readonly inputs: readonly string[];
  /** NaN in any input gives NaN. Must not change its inputs. */
  readonly compute: (plane: PlaneLookup, geometry: GridGeometry) => Float64Array;
}

export function defineQuantity(quantity: Quantity): Quantity {
  return Object.freeze(quantity);
}
