import { randomStream } from "../../../../core/numeric/statistics/random";

/** Standard normal noise of a seed. */
export function noise(count: number, seed: number): Float64Array {
  const random = randomStream(seed);
  return Float64Array.from({ length: count }, () => random.normal());
}
