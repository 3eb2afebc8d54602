import type { VelocityPlanes } from "./geostrophy";
import {
  type Agreement,
  addPair,
  anomalyAgreement,
  type PairMoments,
  pairMoments,
  pooledAgreement,
} from "./pair-moments";

/** Running comparison of our velocities with those that the files supply. */
export interface VelocityComparison {
  readonly latitude: Float64Array;
  readonly columns: number;
  readonly u: PairMoments;
  readonly v: PairMoments;
  /** Cells with a value in one of the two only, all dates and components together. */
  oursOnly: number;
  suppliedOnly: number;
}

/** An empty comparison for planes of rows at `latitude` (degrees, monotonic) and `columns` columns. Holds 15 values a cell. */
export function velocityComparison(latitude: Float64Array, columns: number): VelocityComparison {
  const size = latitude.length * columns;
  return { latitude, columns, u: pairMoments(size), v: pairMoments(size), oursOnly: 0, suppliedOnly: 0 };
}

/**
 * Adds one date: planes in m s-1, row-major; cells where either is NaN are left out of the statistics. `where`, if given,
 * leaves out all cells where it is 0, e.g. those beside gaps (`completeStencilCells`), where suppliers' rules differ most.
 */
export function addVelocities(
  comparison: VelocityComparison,
  ours: VelocityPlanes,
  supplied: VelocityPlanes,
  where?: Uint8Array,
): void {
  for (const name of ["u", "v"] as const) {
    addPair(comparison[name], ours[name], supplied[name], where);
    for (let cell = 0; cell < ours[name].length; cell++) {
      if (where && where[cell] === 0) continue;
      const [hasOurs, hasSupplied] = [!Number.isNaN(ours[name][cell]), !Number.isNaN(supplied[name][cell])];
      if (hasOurs && !hasSupplied) comparison.oursOnly++;
      else if (hasSupplied && !hasOurs) comparison.suppliedOnly++;
    }
  }
}

export interface ComponentAgreement {
  readonly all: Agreement;
  /** Of the departures from each one's mean in time, cell by cell. */
  readonly anomalies: Agreement;
}

export interface BandAgreement {
  /** Degrees; the band holds its southern edge and not its northern one. */
  readonly south: number;
  readonly north: number;
  readonly u: ComponentAgreement;
  readonly v: ComponentAgreement;
}

export interface VelocityAgreement {
  readonly u: ComponentAgreement;
  readonly v: ComponentAgreement;
  /** From south to north; bands without a pair of values are left out. */
  readonly bands: readonly BandAgreement[];
  /** Mean over the compared dates of ours minus supplied, m s-1, NaN where never compared. */
  readonly meanDifference: VelocityPlanes;
  /** Share of the mean square difference that is that constant field: near 1 where only the mean flow is missing. */
  readonly meanShare: number;
  readonly oursOnly: number;
  readonly suppliedOnly: number;
}

/** The comparison so far: overall and by latitude bands of `bandDegrees` that start at multiples of it. Not area-weighted. */
export function velocityAgreement(comparison: VelocityComparison, bandDegrees = 5): VelocityAgreement {
  const { latitude, columns, u, v } = comparison;
  const over = (moments: PairMoments, from: number, to: number): ComponentAgreement => ({
    all: pooledAgreement(moments, from * columns, to * columns),
    anomalies: anomalyAgreement(moments, from * columns, to * columns),
  });
  const bandOf = (row: number) => Math.floor(latitude[row] / bandDegrees + 1e-9);
  const bands: BandAgreement[] = [];
  for (let from = 0, to = 1; from < latitude.length; from = to, to++) {
    while (to < latitude.length && bandOf(to) === bandOf(from)) to++;
    const south = bandOf(from) * bandDegrees;
    const band = { south, north: south + bandDegrees, u: over(u, from, to), v: over(v, from, to) };
    if (band.u.all.count + band.v.all.count > 0) bands.push(band);
  }
  const masked = ({ difference, count }: PairMoments) =>
    difference.map((value, cell) => (count[cell] > 0 ? value : Number.NaN));
  return {
    u: over(u, 0, latitude.length),
    v: over(v, 0, latitude.length),
    bands: bands.sort((a, b) => a.south - b.south),
    meanDifference: { u: masked(u), v: masked(v) },
    meanShare: meanShare([u, v]),
    oursOnly: comparison.oursOnly,
    suppliedOnly: comparison.suppliedOnly,
  };
}

function meanShare(components: readonly PairMoments[]): number {
  let [ofMean, about] = [0, 0];
  for (const { count, difference, differenceSquares } of components) {
    for (let cell = 0; cell < count.length; cell++) {
      ofMean += count[cell] * difference[cell] ** 2;
      about += differenceSquares[cell];
    }
  }
  return ofMean / (ofMean + about);
}
