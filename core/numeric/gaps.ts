/**
 * Bridges interior gaps of at most `longest` samples by straight lines; longer gaps and the ends stay NaN. Returns the
 * copy and a flag for every sample that was filled.
 */
export function bridgeGaps(series: Float64Array, longest: number): { values: Float64Array; filled: Uint8Array } {
  const values = series.slice();
  const filled = new Uint8Array(series.length);
  let last = -1;
  for (let i = 0; i < series.length; i++) {
    if (Number.isNaN(series[i])) continue;
    const missing = i - last - 1;
    if (last >= 0 && missing > 0 && missing <= longest) {
      for (let k = 1; k <= missing; k++) {
        values[last + k] = series[last] + ((series[i] - series[last]) * k) / (missing + 1);
        filled[last + k] = 1;
      }
    }
    last = i;
  }
  return { values, filled };
}
