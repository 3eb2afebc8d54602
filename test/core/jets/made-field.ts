import { type RandomStream, randomStream } from "../../../core/numeric/statistics/random";

export interface MadeJet {
  /** Latitude of the core on day 0, degrees north. */
  readonly latitude: number;
  readonly driftDegreesPerYear: number;
  /** Speed at the core, m s-1, eastward positive. */
  readonly speed: number;
  /** Standard deviation of the Gaussian core in degrees. */
  readonly spread: number;
  /** First and last date on which it flows. */
  readonly from: number;
  readonly to: number;
}

export interface MadeField {
  readonly latitude: Float64Array;
  readonly days: Float64Array;
  readonly matrix: Float64Array;
}

export const yearDays = 365.25;

/**
 * Latitude-time matrix of Gaussian jets, weekly, 20 to 40 degrees north by a quarter degree: noise of `noise` m s-1
 * that is smooth over half a degree, as in mapped fields, and new every week, and cores that wander about their line as AR(1) (0.9 from week to week) with a deviation of `wander` degrees.
 */
export function madeField(
  jets: readonly MadeJet[],
  dates: number,
  noise: number,
  wander: number,
  seed: number,
): MadeField {
  const latitude = Float64Array.from({ length: 81 }, (_, i) => 20 + i * 0.25);
  const days = Float64Array.from({ length: dates }, (_, i) => 7 * i);
  const matrix = new Float64Array(latitude.length * dates);
  jets.forEach((jet, index) => {
    const random = randomStream(seed, index + 1);
    let off = random.normal() * wander;
    for (let date = 0; date < dates; date++) {
      off = 0.9 * off + Math.sqrt(1 - 0.81) * wander * random.normal();
      if (date < jet.from || date > jet.to) continue;
      const core = jet.latitude + (jet.driftDegreesPerYear * days[date]) / yearDays + off;
      latitude.forEach((at, row) => {
        matrix[row * dates + date] += jet.speed * Math.exp(-((at - core) ** 2) / (2 * jet.spread ** 2));
      });
    }
  });
  const random = randomStream(seed);
  for (let date = 0; date < dates; date++) {
    smoothNoise(latitude.length, random).forEach((value, row) => {
      matrix[row * dates + date] += noise * value;
    });
  }
  return { latitude, days, matrix };
}

/** Gaussian noise of unit deviation, smoothed along the rows by a Gaussian two rows wide. */
function smoothNoise(rows: number, random: RandomStream): Float64Array {
  const reach = 8;
  const kernel = Float64Array.from({ length: 2 * reach + 1 }, (_, i) => Math.exp(-((i - reach) ** 2) / 8));
  const scale = 1 / Math.sqrt(kernel.reduce((sum, weight) => sum + weight * weight, 0));
  const white = Float64Array.from({ length: rows + 2 * reach }, () => random.normal());
  return Float64Array.from({ length: rows }, (_, row) =>
    kernel.reduce((sum, weight, i) => sum + scale * weight * white[row + i], 0),
  );
}
