import type { Sections } from "./butterworth";
import { cascade, steadyState } from "./zero-phase";

/**
 * One row of the forward-and-back filter written as a matrix: the weight of each sample of a gap-free series of `count`
 * samples in the filtered value at `t`. Its product with a series equals zeroPhaseFilter there, ends and padding included;
 * made by running the transposed steps, so the cost is that of filtering one series.
 */
export function zeroPhaseRow(count: number, t: number, sections: Sections): Float64Array {
  const pad = sections.padSamples;
  const along = new Float64Array(count + 2 * pad);
  along[pad + t] = 1;
  const transient = steadyTransient(along.length, sections);
  transposedPass(along.reverse(), sections, transient);
  transposedPass(along.reverse(), sections, transient);
  return foldedExtension(along, pad, count);
}

/** What a unit first sample adds to a pass through its steady-state start, without any input. */
function steadyTransient(length: number, sections: Sections): Float64Array {
  const out = new Float64Array(length);
  cascade(out, sections, steadyState(sections, 1));
  return out;
}

/** Transpose of a pass: a causal filter run backwards, and the start's share for the first sample. */
function transposedPass(values: Float64Array, sections: Sections, transient: Float64Array): void {
  let start = 0;
  for (let i = 0; i < values.length; i++) start += transient[i] * values[i];
  values.reverse();
  cascade(values, sections, new Float64Array(2 * sections.count));
  values.reverse();
  values[0] += start;
}

/** Transpose of the odd extension: what the padding's weights ask of the samples they are made from. */
function foldedExtension(along: Float64Array, pad: number, count: number): Float64Array {
  const row = along.slice(pad, pad + count);
  for (let k = 1; k <= pad; k++) {
    const before = along[pad - k];
    const after = along[pad + count - 1 + k];
    row[0] += 2 * before;
    row[k] -= before;
    row[count - 1] += 2 * after;
    row[count - 1 - k] -= after;
  }
  return row;
}
