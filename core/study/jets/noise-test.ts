import { redNoiseTest } from "../../jets/eddy-test/red-noise";
import type { JetsResult } from "../../model/jets-result";
import { falseDiscovery } from "../../numeric/statistics/false-discovery";

/** Share of latitudes that may be held wrongly. */
const level = 0.05;

/**
 * Each latitude's series against red noise: `whole` with its background off, `banded` through the filter; both
 * `[row * dates + t]`. Held latitudes are those left after false-discovery control over latitudes.
 */
export function redNoiseByLatitude(
  whole: Float64Array,
  banded: Float64Array,
  rows: number,
  response: (cyclesPerSample: number) => number,
): Pick<JetsResult, "redNoise" | "redNoiseHeld"> {
  const dates = whole.length / rows;
  // Every latitude asks for the same frequencies.
  const known = new Map<number, number>();
  const remembered = (frequency: number): number => {
    const value = known.get(frequency) ?? response(frequency);
    known.set(frequency, value);
    return value;
  };
  const bandP = new Float64Array(rows);
  const meanP = new Float64Array(rows);
  for (let row = 0; row < rows; row++) {
    const own = (matrix: Float64Array) => matrix.slice(row * dates, (row + 1) * dates);
    const result = redNoiseTest(own(whole), own(banded), remembered);
    bandP[row] = result.bandP;
    meanP[row] = result.meanP;
  }
  return { redNoise: { bandP, meanP }, redNoiseHeld: { band: held(bandP), mean: held(meanP) } };
}

function held(p: Float64Array): Uint8Array {
  const { rejections, threshold } = falseDiscovery(p, level);
  return Uint8Array.from(p, (value) => (rejections > 0 && value <= threshold ? 1 : 0));
}
