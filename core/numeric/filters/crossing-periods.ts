/** Points of the logarithmic sweep; two crossings closer than 0.5 % in a sweep over a factor of 50 are not told apart. */
const sweepPoints = 801;
const bisections = 60;

/**
 * Periods in samples at which a response (a function of cycles a sample) crosses a level, shortest first, between two
 * periods. Half-amplitude is level 0.5 of an amplitude response, half-power level sqrt(1/2). Found by bisection between
 * neighbours of a logarithmic sweep; a response that only touches the level does not cross it. Where the response is NaN
 * nothing is found.
 */
export function crossingPeriods(
  response: (frequencyPerSample: number) => number,
  level: number,
  fromSamples: number,
  toSamples: number,
): number[] {
  if (!(fromSamples > 0 && toSamples > fromSamples)) return [];
  const off = (period: number) => response(1 / period) - level;
  const found: number[] = [];
  let low = fromSamples;
  let offLow = off(low);
  for (let i = 1; i < sweepPoints; i++) {
    const high = fromSamples * (toSamples / fromSamples) ** (i / (sweepPoints - 1));
    const offHigh = off(high);
    const known = !Number.isNaN(offLow) && !Number.isNaN(offHigh);
    if (known && offLow < 0 !== offHigh < 0) found.push(crossingBetween(off, low, high, offLow < 0));
    low = high;
    offLow = offHigh;
  }
  return found;
}

function crossingBetween(off: (period: number) => number, from: number, to: number, startsBelow: boolean): number {
  let [low, high] = [from, to];
  for (let step = 0; step < bisections; step++) {
    const middle = (low + high) / 2;
    if (off(middle) < 0 === startsBelow) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
