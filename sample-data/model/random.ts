/** A seeded source of random numbers: the same seed gives the same numbers on every machine. */
export interface RandomSource {
  /** Uniform on [0, 1), 32 bits. */
  uniform(): number;
  /** Standard normal deviate. */
  normal(): number;
}

/**
 * xoshiro128** (Blackman & Vigna 2021, ACM Trans. Math. Softw. 47, 36), its four words filled from a 32-bit seed by
 * Weyl steps through the murmur3 finaliser; normal deviates by the Box–Muller transform.
 */
export function seededRandom(seed: number): RandomSource {
  let weyl = seed >>> 0;
  const nextSeedWord = (): number => {
    weyl = (weyl + 0x9e3779b9) >>> 0;
    let z = weyl;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return (z ^ (z >>> 16)) >>> 0;
  };
  let a = nextSeedWord();
  let b = nextSeedWord();
  let c = nextSeedWord();
  let d = nextSeedWord();
  let spare = Number.NaN;

  const uniform = (): number => {
    const product = Math.imul(b, 5);
    const result = Math.imul((product << 7) | (product >>> 25), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = (d << 11) | (d >>> 21);
    return result / 4294967296;
  };

  const normal = (): number => {
    if (!Number.isNaN(spare)) {
      const kept = spare;
      spare = Number.NaN;
      return kept;
    }
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };

  return { uniform, normal };
}
