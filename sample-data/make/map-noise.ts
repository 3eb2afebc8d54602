import type { HalfPlane } from "../model/half-plane";
import { seededRandom } from "../model/random";
import type { SmoothMap } from "./map-smoothing";
import type { MapProduct } from "./scenario";

/**
 * Mapping error of a product as coefficients of a height field in metres, one a date: a first-order Markov chain in time,
 * covariance exp(−r²/2L²) in space, the product's standard deviation everywhere.
 */
export function* mapNoise(plane: HalfPlane, product: MapProduct, seed: number): Generator<SmoothMap> {
  const random = seededRandom(seed);
  const spread = new Float64Array(plane.count);
  let variance = 0;
  for (const index of plane.keptIndices) {
    if (plane.waveX[index] === 0) continue;
    // The spectrum of the covariance above; its square root scales an amplitude.
    spread[index] = Math.exp(-0.25 * plane.squared[index] * product.noiseLengthMetres ** 2);
    // A coefficient with unit-variance parts, and its mirror image, add 4 to the variance of the field.
    variance += 4 * spread[index] ** 2;
  }
  const scale = product.noiseMetres / Math.sqrt(variance);
  const memory = Math.exp(-product.everyDays / product.noiseDays);
  const fresh = Math.sqrt(1 - memory * memory);
  const re = new Float64Array(plane.count);
  const im = new Float64Array(plane.count);
  for (let date = 0; date < product.dates; date++) {
    for (const index of plane.keptIndices) {
      const innovation = (date === 0 ? 1 : fresh) * scale * spread[index];
      const carried = date === 0 ? 0 : memory;
      re[index] = carried * re[index] + innovation * random.normal();
      im[index] = carried * im[index] + innovation * random.normal();
    }
    yield { re, im };
  }
}
