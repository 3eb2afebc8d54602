/**
 * Zonality (<u²> - <v²>) / (<u²> + <v²>): 1 for zonal flow, 0 isotropic, -1 meridional. Pairs with a NaN are left out;
 * `weights`, if given, holds one weight a pair (areas of cells). NaN without any pair or flow.
 * Ref: Huang et al. 2007, J. Geophys. Res. [from memory].
 */
export function zonality(u: Float64Array, v: Float64Array, weights?: Float64Array): number {
  let zonal = 0;
  let meridional = 0;
  for (let i = 0; i < u.length; i++) {
    const weight = weights ? weights[i] : 1;
    if (!(weight > 0) || Number.isNaN(u[i]) || Number.isNaN(v[i])) continue;
    zonal += weight * u[i] * u[i];
    meridional += weight * v[i] * v[i];
  }
  return (zonal - meridional) / (zonal + meridional);
}

/** Velocity series of some cells, `u[cell * dates + date]`, NaN where missing, and the area (or any weight) of each. */
export interface VelocitySeries {
  readonly u: Float64Array;
  readonly v: Float64Array;
  readonly dates: number;
  readonly weights: Float64Array;
}

/**
 * Zonality of flow averaged over blocks of time, for each block length in dates. Blocks follow one another without overlap
 * and the incomplete last one is left out; a block of a cell counts where at least half of its dates are valid. NaN where
 * no block does.
 */
export function zonalityByAveraging(series: VelocitySeries, blockDates: readonly number[]): Float64Array {
  return Float64Array.from(blockDates, (length) => {
    const cells = series.weights.length;
    const blocks = Math.floor(series.dates / length);
    const u = new Float64Array(cells * blocks);
    const v = new Float64Array(cells * blocks);
    const weights = new Float64Array(cells * blocks);
    for (let cell = 0; cell < cells; cell++) {
      for (let block = 0; block < blocks; block++) {
        const start = cell * series.dates + block * length;
        const i = cell * blocks + block;
        u[i] = meanOfValid(series.u, start, length);
        v[i] = meanOfValid(series.v, start, length);
        weights[i] = series.weights[cell];
      }
    }
    return zonality(u, v, weights);
  });
}

function meanOfValid(values: Float64Array, start: number, length: number): number {
  let sum = 0;
  let valid = 0;
  for (let i = start; i < start + length; i++) {
    if (Number.isNaN(values[i])) continue;
    sum += values[i];
    valid++;
  }
  return 2 * valid >= length ? sum / valid : Number.NaN;
}
