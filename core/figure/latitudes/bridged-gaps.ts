/**
 * 1 on dates without data in a gap that a filter bridges: no longer than `bridgeDays`, with data on both sides. `hasData[i]`
 * is 1 where date i holds data; dates lie `stepDays` apart.
 */
export function bridgedGaps(hasData: Uint8Array, stepDays: number, bridgeDays: number): Uint8Array {
  const flags = new Uint8Array(hasData.length);
  // The slack keeps a bridge of a whole number of steps whole where the step is no binary fraction.
  const longest = stepDays > 0 ? Math.floor(bridgeDays / stepDays + 1e-9) : 0;
  let last = -1;
  for (let date = 0; date < hasData.length; date++) {
    if (hasData[date] !== 1) continue;
    if (last >= 0 && date - last - 1 <= longest) flags.fill(1, last + 1, date);
    last = date;
  }
  return flags;
}
