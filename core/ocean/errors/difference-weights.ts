import type { DifferencePlan } from "../../numeric/differences";
import { eastwardDerivative, northwardDerivative } from "../gradients";
import type { GridGeometry } from "../grid-geometry";

/** The differences that were taken of one plane in one direction, cell by cell. */
export interface TakenDifferences {
  readonly plane: Float64Array;
  /** The derivative itself, per metre. */
  readonly slopes: Float64Array;
  readonly plan: DifferencePlan;
  /** Points used at each cell, as `differentiateLine` reports them. */
  readonly widths: Int8Array;
  readonly columns: number;
  readonly direction: "east" | "north";
  /** 1 / metres per radian, one a row. */
  readonly perMetre: Float64Array;
}

/** On an even axis the centre's weight is 0 but for rounding: it must not ask for the error there. */
const roundingShare = 1e-12;

/** Differences the plane as the quantities do and keeps which stencil each cell got, gaps and edges included. */
export function takeDifferences(
  plane: Float64Array,
  geometry: GridGeometry,
  direction: "east" | "north",
): TakenDifferences {
  const widths = new Int8Array(plane.length);
  const derivative = direction === "east" ? eastwardDerivative : northwardDerivative;
  const slopes = derivative(plane, geometry, new Float64Array(plane.length), widths);
  return {
    plane,
    slopes,
    plan: direction === "east" ? geometry.alongRow : geometry.alongColumn,
    widths,
    columns: geometry.columns,
    direction,
    perMetre: geometry[direction].map((metres) => 1 / metres),
  };
}

/**
 * Hands the weights of the derivative at `cell` (m-1) to `visit` with the cells they belong to; on a short periodic axis
 * a cell may come twice. Nothing where no difference fits.
 */
export function visitDifference(
  taken: TakenDifferences,
  cell: number,
  visit: (cell: number, weight: number) => void,
): void {
  const width = taken.widths[cell];
  if (width === 0) return;
  const { plan, columns, direction } = taken;
  const row = Math.floor(cell / columns);
  const column = cell - row * columns;
  const [index, stride] = direction === "east" ? [column, 1] : [row, columns];
  const start = cell - index * stride;
  const scale = taken.perMetre[row];
  const cellAt = (position: number) => start + ((position + plan.count) % plan.count) * stride;
  if (width > 0) {
    const reach = (width - 1) / 2;
    const weights = plan.centred[reach];
    const centre = index * width + reach;
    const negligible = roundingShare * Math.abs(weights[centre + 1]);
    for (let j = -reach; j <= reach; j++) {
      const weight = weights[centre + j];
      if (j !== 0 || Math.abs(weight) > negligible) visit(cellAt(index + j), weight * scale);
    }
    return;
  }
  // One-sided: forward is tried first, so backward was taken only where forward leaves the axis or meets a gap.
  const isForward =
    !Number.isNaN(plan.forward[index * 3]) &&
    !Number.isNaN(taken.plane[cellAt(index + 1)]) &&
    !Number.isNaN(taken.plane[cellAt(index + 2)]);
  const weights = isForward ? plan.forward : plan.backward;
  const side = isForward ? 1 : -1;
  for (let j = 0; j < 3; j++) visit(cellAt(index + side * j), weights[index * 3 + j] * scale);
}
