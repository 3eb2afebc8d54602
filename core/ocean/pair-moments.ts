/**
 * Running first and second moments in time of pairs of planes, cell by cell (Welford 1962, Technometrics 4, 419-420 [from
 * memory]): means of ours, the supplied one and their difference, and sums of squares and products about these means.
 */
export interface PairMoments {
  /** Dates on which both have a value. */
  readonly count: Uint32Array;
  readonly ours: Float64Array;
  readonly supplied: Float64Array;
  readonly difference: Float64Array;
  readonly oursSquares: Float64Array;
  readonly suppliedSquares: Float64Array;
  readonly products: Float64Array;
  readonly differenceSquares: Float64Array;
}

export function pairMoments(size: number): PairMoments {
  const plane = () => new Float64Array(size);
  return {
    count: new Uint32Array(size),
    ours: plane(),
    supplied: plane(),
    difference: plane(),
    oursSquares: plane(),
    suppliedSquares: plane(),
    products: plane(),
    differenceSquares: plane(),
  };
}

/** Adds one date; a cell where either plane is NaN is left out. `where`, if given, leaves out cells where it is 0. */
export function addPair(moments: PairMoments, ours: Float64Array, supplied: Float64Array, where?: Uint8Array): void {
  for (let cell = 0; cell < ours.length; cell++) {
    const [x, y] = [ours[cell], supplied[cell]];
    const difference = x - y;
    if (Number.isNaN(difference) || (where && where[cell] === 0)) continue;
    const count = ++moments.count[cell];
    const fromX = x - moments.ours[cell];
    const fromY = y - moments.supplied[cell];
    const fromDifference = difference - moments.difference[cell];
    moments.ours[cell] += fromX / count;
    moments.supplied[cell] += fromY / count;
    moments.difference[cell] += fromDifference / count;
    moments.oursSquares[cell] += fromX * (x - moments.ours[cell]);
    moments.suppliedSquares[cell] += fromY * (y - moments.supplied[cell]);
    moments.products[cell] += fromX * (y - moments.supplied[cell]);
    moments.differenceSquares[cell] += fromDifference * (difference - moments.difference[cell]);
  }
}

/** How two sets of values agree, ours against the supplied. Every value counts the same. NaN where nothing defines it. */
export interface Agreement {
  readonly count: number;
  readonly rmsDifference: number;
  /** Mean of ours minus supplied. */
  readonly bias: number;
  /** Pearson's; NaN where either does not vary. */
  readonly correlation: number;
  readonly rmsOurs: number;
  readonly rmsSupplied: number;
}

/** Agreement over the cells from … to - 1, all their dates together. */
export function pooledAgreement(moments: PairMoments, from: number, to: number): Agreement {
  let [count, ours, supplied, difference] = [0, 0, 0, 0];
  let [oursSquares, suppliedSquares, products, differenceSquares] = [0, 0, 0, 0];
  for (let cell = from; cell < to; cell++) {
    const n = moments.count[cell];
    const [x, y, d] = [moments.ours[cell], moments.supplied[cell], moments.difference[cell]];
    count += n;
    ours += n * x;
    supplied += n * y;
    difference += n * d;
    oursSquares += moments.oursSquares[cell] + n * x * x;
    suppliedSquares += moments.suppliedSquares[cell] + n * y * y;
    products += moments.products[cell] + n * x * y;
    differenceSquares += moments.differenceSquares[cell] + n * d * d;
  }
  const spread = (squares: number, sum: number) => Math.max(0, squares - (sum * sum) / count);
  const norm = Math.sqrt(spread(oursSquares, ours) * spread(suppliedSquares, supplied));
  return {
    count,
    rmsDifference: Math.sqrt(differenceSquares / count),
    bias: difference / count,
    correlation: norm > 0 ? (products - (ours * supplied) / count) / norm : Number.NaN,
    rmsOurs: Math.sqrt(oursSquares / count),
    rmsSupplied: Math.sqrt(suppliedSquares / count),
  };
}

/**
 * The same for each value less its own cell's mean over the dates on which both have one: what is left of a disagreement
 * when one is an anomaly and the other absolute. Cells with fewer than two such dates are left out; the bias is 0 by construction.
 */
export function anomalyAgreement(moments: PairMoments, from: number, to: number): Agreement {
  let [count, oursSquares, suppliedSquares, products, differenceSquares] = [0, 0, 0, 0, 0];
  for (let cell = from; cell < to; cell++) {
    if (moments.count[cell] < 2) continue;
    count += moments.count[cell];
    oursSquares += moments.oursSquares[cell];
    suppliedSquares += moments.suppliedSquares[cell];
    products += moments.products[cell];
    differenceSquares += moments.differenceSquares[cell];
  }
  const norm = Math.sqrt(oursSquares * suppliedSquares);
  return {
    count,
    rmsDifference: Math.sqrt(differenceSquares / count),
    bias: count > 0 ? 0 : Number.NaN,
    correlation: norm > 0 ? products / norm : Number.NaN,
    rmsOurs: Math.sqrt(oursSquares / count),
    rmsSupplied: Math.sqrt(suppliedSquares / count),
  };
}
