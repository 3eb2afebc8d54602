/** Average of one-sided densities on a common axis, built up line by line. */
export interface LineAverage {
  /** Samples and spacing of the line that the common axis belongs to. */
  readonly length: number;
  readonly spacing: number;
  /** Variance by bin, weighted and summed. */
  readonly variance: Float64Array;
  weight: number;
  lines: number;
}

/** An empty average on the axis k / (length spacing), k = 0 … floor(length / 2). */
export function emptyLineAverage(length: number, spacing: number): LineAverage {
  return { length, spacing, variance: new Float64Array(Math.floor(length / 2) + 1), weight: 0, lines: 0 };
}

/**
 * Adds one line's density to an average. A line of another length or spacing is laid onto the common axis by sharing out
 * each bin's variance over the bins it overlaps, so that none is lost. The line's shortest wave must not be shorter than
 * the axis's. Linear sharing: common practice, no source.
 */
export function addLine(
  into: LineAverage,
  density: Float64Array,
  length: number,
  spacing: number,
  weight: number,
): void {
  into.weight += weight;
  into.lines++;
  const last = into.variance.length - 1;
  let target = 0;
  for (let k = 0; k < density.length; k++) {
    const variance = (weight * density[k]) / (length * spacing);
    if (length === into.length && spacing === into.spacing) {
      into.variance[k] += variance;
      continue;
    }
    let from = lowerEdge(k, length, spacing);
    const to = upperEdge(k, length, spacing);
    const width = to - from;
    while (target < last && upperEdge(target, into.length, into.spacing) < to) {
      const edge = Math.max(from, upperEdge(target, into.length, into.spacing));
      into.variance[target] += (variance * (edge - from)) / width;
      from = edge;
      target++;
    }
    into.variance[target] += (variance * (to - from)) / width;
  }
}

/** The averaged density: its sum times the axis's step is the weighted mean of the lines' variances. NaN without lines. */
export function averagedDensity(average: LineAverage): Float64Array {
  const extent = average.length * average.spacing;
  return average.variance.map((value) => (value * extent) / average.weight);
}

function lowerEdge(k: number, length: number, spacing: number): number {
  return Math.max(0, (k - 0.5) / (length * spacing));
}

function upperEdge(k: number, length: number, spacing: number): number {
  return Math.min((k + 0.5) / (length * spacing), 1 / (2 * spacing));
}
