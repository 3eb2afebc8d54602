import { describe, expect, test } from "vitest";
import { normalCumulative } from "../../../../core/numeric/distributions";
import { randomStream, streamFromState } from "../../../../core/numeric/statistics/random";
import { expectClose } from "../../../expect-close";

/** xoshiro128** in arbitrary-precision whole numbers, from its published definition. */
function* slowWords(seed: readonly bigint[]): Generator<bigint> {
  const state = [...seed];
  const cut = (value: bigint) => BigInt.asUintN(32, value);
  const turn = (value: bigint, bits: bigint) => cut(value << bits) | (value >> (32n - bits));
  for (;;) {
    yield cut(turn(cut(state[1] * 5n), 7n) * 9n);
    const shifted = cut(state[1] << 9n);
    state[2] ^= state[0];
    state[3] ^= state[1];
    state[1] ^= state[2];
    state[0] ^= state[3];
    state[2] ^= shifted;
    state[3] = turn(state[3], 11n);
  }
}

describe("random streams", () => {
  test("give the words of xoshiro128** computed in arbitrary precision; by hand, 11520 and 0 after the state 1, 2, 3, 4", () => {
    for (const state of [
      [1, 2, 3, 4],
      [0xffffffff, 0x80000000, 0x12345678, 0x9abcdef0],
    ]) {
      const stream = streamFromState(Uint32Array.from(state));
      const slow = slowWords(state.map(BigInt));
      for (let i = 0; i < 1000; i++) expect(stream.word()).toBe(Number(slow.next().value));
    }
    const stream = streamFromState(Uint32Array.of(1, 2, 3, 4));
    expect([stream.word(), stream.word()]).toEqual([11520, 0]);
  });

  test("the same seed and index give the same numbers, others unlike ones", () => {
    const first = (seed: number, index: number) => randomStream(seed, index).word();
    expect(first(7, 3)).toBe(first(7, 3));
    const seen = new Set<number>();
    for (let seed = 0; seed < 40; seed++) for (let index = 0; index < 40; index++) seen.add(first(seed, index));
    expect(seen.size).toBe(1600);
  });

  test("streams of neighbouring indices are uncorrelated", () => {
    const count = 20000;
    for (const index of [0, 1, 17]) {
      const [a, b] = [randomStream(1, index), randomStream(1, index + 1)];
      let sum = 0;
      for (let i = 0; i < count; i++) sum += a.normal() * b.normal();
      expectClose(sum / count, 0, { absolute: 4 / Math.sqrt(count), because: "four standard errors" });
    }
  });

  test("uniform numbers and normal ones through their distribution fill all tenths alike", () => {
    const random = randomStream(4);
    const draws: Record<string, () => number> = {
      uniform: random.uniform,
      normal: () => normalCumulative(random.normal()),
      below: () => (random.below(10) + 0.5) / 10,
    };
    for (const [name, draw] of Object.entries(draws)) {
      const counts = new Float64Array(10);
      for (let i = 0; i < 20000; i++) counts[Math.floor(draw() * 10)]++;
      const chi = counts.reduce((sum, value) => sum + (value - 2000) ** 2 / 2000, 0);
      // 27.88 is chi-squared's 99.9 % point at nine degrees (standard tables).
      expect(chi, name).toBeLessThan(27.88);
    }
  });

  test("whole numbers stay below their bound, also where it does not divide the words", () => {
    const random = randomStream(9);
    const bound = 3 * 2 ** 30;
    let above = 0;
    for (let i = 0; i < 3000; i++) {
      const drawn = random.below(bound);
      expect(drawn).toBeLessThan(bound);
      if (drawn >= 2 ** 30) above++;
    }
    // Words taken modulo the bound would leave only half of them above 2^30 instead of two thirds.
    expectClose(above / 3000, 2 / 3, { absolute: 0.04, because: "four standard errors" });
    expect(random.below(1)).toBe(0);
  });
});
