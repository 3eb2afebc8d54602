import { describe, expect, test } from "vitest";
import { bridgedGaps } from "../../../../core/figure/latitudes/bridged-gaps";
import { bridgedSamples } from "../../../../core/numeric/filters/pieces";

const flags = (text: string) => Uint8Array.from(text, (letter) => Number(letter));

describe("bridged gaps", () => {
  test("a gap is bridged up to its length in days, a longer one not", () => {
    const hasData = flags("1101100111000111");
    expect([...bridgedGaps(hasData, 3, 6)].join("")).toBe("0010011000000000");
    expect([...bridgedGaps(hasData, 3, 9)].join("")).toBe("0010011000111000");
    expect([...bridgedGaps(hasData, 3, 2.9)].join("")).toBe("0000000000000000");
  });

  test("what is missing at either end of the record is never bridged", () => {
    expect([...bridgedGaps(flags("0011010"), 1, 100)].join("")).toBe("0000100");
  });

  test("a step that is no binary fraction loses no bridge", () => {
    expect([...bridgedGaps(flags("1000001"), 0.1, 0.5)].join("")).toBe("0111110");
  });

  test("a record of one date, or of none, has nothing to bridge", () => {
    expect([...bridgedGaps(flags("1"), Number.NaN, 20)]).toEqual([0]);
    expect([...bridgedGaps(flags("000"), 1, 20)]).toEqual([0, 0, 0]);
  });

  test("the same dates are bridged as the study's filters bridge", () => {
    for (let seed = 1; seed <= 40; seed++) {
      const hasData = Uint8Array.from({ length: 60 }, (_, date) => ((date * date * seed + 7 * date) % 5 < 3 ? 1 : 0));
      for (const bridge of [0, 1, 2, 5]) {
        expect(bridgedGaps(hasData, 1, bridge)).toEqual(bridgedSamples(hasData, bridge));
      }
    }
  });
});
