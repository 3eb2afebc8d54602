/** A stream of random numbers; every call moves it on. */
export interface RandomStream {
  /** Even over [0, 1), 53 bits. */
  uniform(): number;
  /** Standard normal. */
  normal(): number;
  /** Even over the whole numbers 0 … count - 1, count at most 2^32. */
  below(count: number): number;
  /** The generator's own 32 bits. */
  word(): number;
}

/**
 * The stream number `index` of a seed (whole numbers below 2^32). Streams of one seed start from unlike states, so work that
 * takes its stream by index (a resample, an ocean) gives the same numbers however it is shared out. Not for secrets.
 */
export function randomStream(seed: number, index = 0): RandomStream {
  const state = Uint32Array.from({ length: 4 }, (_, word) =>
    scrambled(scrambled(seed + Math.imul(word + 1, goldenWord)) + Math.imul(index, goldenWord)),
  );
  if (state.every((word) => word === 0)) state[0] = 1;
  return streamFromState(state);
}

/** 2^32 over the golden ratio, made odd: the step of Weyl sequences (Steele et al. 2014, OOPSLA). */
const goldenWord = 0x9e3779b9;

/** MurmurHash3's 32-bit finaliser (Appleby, public domain): one-to-one, every bit depends on every other. */
function scrambled(word: number): number {
  let h = word | 0;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}

/** xoshiro128** from a state of four words, not all zero; the state is changed. Ref: Blackman & Vigna 2021, ACM TOMS 47(4). */
export function streamFromState(state: Uint32Array): RandomStream {
  let spare = Number.NaN;
  const word = (): number => {
    const result = Math.imul(rotated(Math.imul(state[1], 5), 7), 9) >>> 0;
    const shifted = state[1] << 9;
    state[2] ^= state[0];
    state[3] ^= state[1];
    state[1] ^= state[2];
    state[0] ^= state[3];
    state[2] ^= shifted;
    state[3] = rotated(state[3], 11);
    return result;
  };
  const uniform = (): number => ((word() >>> 5) * 2 ** 26 + (word() >>> 6)) / 2 ** 53;
  const normal = (): number => {
    if (!Number.isNaN(spare)) {
      const kept = spare;
      spare = Number.NaN;
      return kept;
    }
    // Box & Muller 1958, Ann. Math. Stat. 29, 610-611; 1 - uniform is never zero.
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
  const below = (count: number): number => {
    // Words from the incomplete last round of `count` would favour small numbers.
    const limit = 2 ** 32 - (2 ** 32 % count);
    let drawn = word();
    while (drawn >= limit) drawn = word();
    return drawn % count;
  };
  return { uniform, normal, below, word };
}

function rotated(value: number, bits: number): number {
  return (value << bits) | (value >>> (32 - bits));
}
