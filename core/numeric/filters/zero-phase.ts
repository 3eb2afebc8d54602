import { trustedWeightShare } from "../band-filter";
import type { Sections } from "./butterworth";
import { FilterRefusal } from "./refusal";

/** Impulse responses are followed until the slowest mode has decayed to this. */
const forgotten = 1e-5;

/** Fewest samples the forward-and-back filter takes: one more than its padding. */
export function fewestSamples(sections: Sections): number {
  return sections.padSamples + 1;
}

/**
 * The filter run forward and back over one gap-free series: no phase shift, amplitude response |H|^2. Each end is extended
 * by `padSamples` of the series turned about its end point, and each pass starts in the steady state of its first sample,
 * so that a constant stays constant to the ends (low-pass) or vanishes (high- and band-pass). Errors (FilterRefusal): a
 * series no longer than the padding, a NaN (it would wipe out the rest). Ref: Gustafsson 1996, IEEE Trans. Signal Process. 44,
 * 988 [from memory] discusses the start; the padding follows scipy.signal.sosfiltfilt.
 */
export function zeroPhaseFilter(series: Float64Array, sections: Sections): Float64Array {
  const pad = sections.padSamples;
  const count = series.length;
  if (count <= pad) {
    throw new FilterRefusal(
      "band",
      `at least ${pad + 1} samples for this filter's padding`,
      `${count} samples`,
      "choose a lower order, a longer period or another filter",
    );
  }
  if (series.some(Number.isNaN)) {
    throw new FilterRefusal("band", "a series without gaps", "missing samples", "split the series at its gaps first");
  }
  const extended = oddExtension(series, pad);
  runSections(extended, sections);
  extended.reverse();
  runSections(extended, sections);
  extended.reverse();
  return extended.slice(pad, pad + count);
}

/**
 * Samples at each end whose values rest on the padding: the weight beyond the end is more than 10 % of the filter's
 * absolute weight there. Computed from the forward-and-back impulse response.
 */
export function paddingReach(sections: Sections): number {
  const weights = zeroPhaseWeights(sections);
  let total = Math.abs(weights[0]);
  for (let k = 1; k < weights.length; k++) total += 2 * Math.abs(weights[k]);
  let beyond = 0;
  for (let k = weights.length - 1; k > 0; k--) {
    beyond += Math.abs(weights[k]);
    if (beyond > (1 - trustedWeightShare) * total) return k;
  }
  return 0;
}

/** Weights of the forward-and-back filter at lags 0, 1, 2 … until they are forgotten; the filter is symmetric. */
export function zeroPhaseWeights(sections: Sections): Float64Array {
  const length = memorySamples(sections);
  const response = new Float64Array(2 * length + 1);
  response[length] = 1;
  const rest = new Float64Array(2 * sections.count);
  cascade(response, sections, rest);
  response.reverse();
  cascade(response, sections, rest.fill(0));
  // The second pass sums h[m] h[m - k] at length + k, the lag k of the impulse response with itself.
  return response.subarray(length);
}

/** Samples after which the slowest mode has decayed to a hundred-thousandth. */
function memorySamples({ count, coefficients }: Sections): number {
  let radius = 0;
  for (let s = 0; s < count; s++) {
    const [a1, a2] = coefficients.subarray(5 * s + 3, 5 * s + 5);
    const inside = a1 * a1 - 4 * a2;
    const largest = inside < 0 ? Math.sqrt(a2) : (Math.abs(a1) + Math.sqrt(inside)) / 2;
    radius = Math.max(radius, largest);
  }
  return Math.max(8, Math.ceil((2 * Math.log(forgotten)) / Math.log(Math.max(radius, 1e-3))));
}

/** 2 x[0] - x[pad … 1], the series, 2 x[n-1] - x[n-2 … n-1-pad]. */
function oddExtension(series: Float64Array, pad: number): Float64Array {
  const count = series.length;
  const extended = new Float64Array(count + 2 * pad);
  extended.set(series, pad);
  for (let k = 1; k <= pad; k++) {
    extended[pad - k] = 2 * series[0] - series[k];
    extended[pad + count - 1 + k] = 2 * series[count - 1] - series[count - 1 - k];
  }
  return extended;
}

/** Filters in place, from the steady state of a constant equal to the first sample. */
function runSections(values: Float64Array, sections: Sections): void {
  cascade(values, sections, steadyState(sections, values[0]));
}

/**
 * States (two a section) in which the cascade holds a constant input. Transposed direct form II: with gain G at zero
 * frequency, state 1 is G - b0 and state 2 is b2 - a2 G.
 */
export function steadyState({ count, coefficients }: Sections, input: number): Float64Array {
  const states = new Float64Array(2 * count);
  let level = input;
  for (let s = 0; s < count; s++) {
    const [b0, b1, b2, a1, a2] = coefficients.subarray(5 * s, 5 * s + 5);
    const gain = (b0 + b1 + b2) / (1 + a1 + a2);
    states[2 * s] = (gain - b0) * level;
    states[2 * s + 1] = (b2 - a2 * gain) * level;
    level *= gain;
  }
  return states;
}

export function cascade(values: Float64Array, { count, coefficients }: Sections, states: Float64Array): void {
  for (let s = 0; s < count; s++) {
    const [b0, b1, b2, a1, a2] = coefficients.subarray(5 * s, 5 * s + 5);
    let first = states[2 * s];
    let second = states[2 * s + 1];
    for (let i = 0; i < values.length; i++) {
      const input = values[i];
      const output = b0 * input + first;
      first = b1 * input - a1 * output + second;
      second = b2 * input - a2 * output;
      values[i] = output;
    }
  }
}
