/**
 * Amplitude of an eddy over its life as a share of its full height: rises as sin² over the first `rampShare` of the life,
 * stays, falls as cos² over the last. `age` is 0 at birth and 1 at death; 0 outside. `rampShare` in (0, 0.5].
 */
export function lifeEnvelope(age: number, rampShare: number): number {
  const toEnd = Math.min(age, 1 - age);
  if (!(toEnd > 0)) return 0;
  if (toEnd >= rampShare) return 1;
  const rise = Math.sin((Math.PI / 2) * (toEnd / rampShare));
  return rise * rise;
}

/** Mean over the life of the squared envelope: 1 - 5/4 rampShare. */
export function envelopeMeanSquare(rampShare: number): number {
  return 1 - 1.25 * rampShare;
}

/**
 * Lag, as a share of the life, at which an eddy's height no longer resembles its own by more than 1/e: where the
 * autocorrelation of the envelope falls to it. Midpoint sums over 2,000 steps, bisected.
 */
export function envelopeFoldingShare(rampShare: number): number {
  const overlap = (lag: number) => {
    const count = 2000;
    let sum = 0;
    for (let i = 0; i < count; i++) {
      const age = (i + 0.5) / count;
      sum += lifeEnvelope(age, rampShare) * lifeEnvelope(age + lag, rampShare);
    }
    return sum / count;
  };
  const wanted = overlap(0) / Math.E;
  let [low, high] = [0, 1];
  for (let i = 0; i < 30; i++) {
    const middle = (low + high) / 2;
    if (overlap(middle) > wanted) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
