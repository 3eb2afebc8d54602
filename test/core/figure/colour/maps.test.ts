import { describe, expect, test } from "vitest";
import { linearFromBytes } from "../../../../core/figure/colour/hex";
import { type ColourMap, inkNight, inkPaper, rustTealNight, rustTealPaper } from "../../../../core/figure/colour/maps";
import { okLabFromLinear, type Triple } from "../../../../core/figure/colour/oklab";

function linearEntry(map: ColourMap, entry: number): Triple {
  return linearFromBytes([map.table[4 * entry], map.table[4 * entry + 1], map.table[4 * entry + 2]]);
}

/** Luminance by the sRGB weights: a measure of lightness that owes nothing to OKLab. */
function luminance([red, green, blue]: Triple): number {
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

/** Complete deficiencies as matrices on linear sRGB. Machado, Oliveira and Fernandes 2009, severity 1 [from memory]. */
const deficiencies: readonly (readonly [string, readonly [Triple, Triple, Triple]])[] = [
  [
    "protanopia",
    [
      [0.152286, 1.052583, -0.204868],
      [0.114503, 0.786281, 0.099216],
      [-0.003882, -0.048116, 1.051998],
    ],
  ],
  [
    "deuteranopia",
    [
      [0.367322, 0.860646, -0.227968],
      [0.280085, 0.672501, 0.047413],
      [-0.01182, 0.04294, 0.968881],
    ],
  ],
  [
    "tritanopia",
    [
      [1.255528, -0.076749, -0.178779],
      [-0.078411, 0.930809, 0.147602],
      [0.004733, 0.691367, 0.3039],
    ],
  ],
];

function seenWith(matrix: readonly Triple[], colour: Triple): Triple {
  const row = ([red, green, blue]: Triple) =>
    Math.min(1, Math.max(0, red * colour[0] + green * colour[1] + blue * colour[2]));
  return [row(matrix[0]), row(matrix[1]), row(matrix[2])];
}

function distance(first: Triple, second: Triple): number {
  const a = okLabFromLinear(first);
  const b = okLabFromLinear(second);
  return Math.hypot(a.lightness - b.lightness, a.a - b.a, a.b - b.b);
}

const divergingMaps = [rustTealPaper, rustTealNight];
const sequentialMaps = [inkPaper, inkNight];

/** Lightness from the middle outwards (or from the start), one list an arm. */
function arms(map: ColourMap): number[][] {
  if (map.kind === "sequential") return [Array.from({ length: 256 }, (_, entry) => entry)];
  return [Array.from({ length: 128 }, (_, step) => 127 - step), Array.from({ length: 128 }, (_, step) => 128 + step)];
}

function directionOf(values: readonly number[]): number {
  return Math.sign(values[values.length - 1] - values[0]);
}

/** Steps against the arm's direction, in luminance. */
function worstStepBack(values: readonly number[]): number {
  const direction = directionOf(values);
  return Math.max(...values.slice(1).map((value, index) => direction * (values[index] - value)));
}

describe("colour maps", () => {
  test.each([...divergingMaps, ...sequentialMaps])("$id has 256 opaque entries", (map) => {
    expect(map.table.length).toBe(1024);
    expect(map.table.every((byte, index) => index % 4 !== 3 || byte === 255)).toBe(true);
  });

  test.each([...divergingMaps, ...sequentialMaps])("$id: luminance runs one way along each arm", (map) => {
    for (const arm of arms(map)) {
      const values = arm.map((entry) => luminance(linearEntry(map, entry)));
      // Bytes round: one step of the green byte at full light is 0.006, of the blue one 0.0006.
      expect(worstStepBack(values)).toBeLessThan(0.0015);
      expect(Math.abs(values[values.length - 1] - values[0])).toBeGreaterThan(0.3);
    }
  });

  test.each(divergingMaps)("$id: both arms are equally light at equal distance from the middle", (map) => {
    for (let step = 0; step < 128; step++) {
      const negative = okLabFromLinear(linearEntry(map, 127 - step)).lightness;
      const positive = okLabFromLinear(linearEntry(map, 128 + step)).lightness;
      expect(Math.abs(negative - positive)).toBeLessThan(0.006);
    }
  });

  test.each(divergingMaps)("$id: the middle is neutral", (map) => {
    for (const entry of [127, 128]) {
      const { a, b } = okLabFromLinear(linearEntry(map, entry));
      expect(Math.hypot(a, b)).toBeLessThan(0.01);
    }
  });

  test("rust is the positive end on both grounds, teal the negative one", () => {
    for (const map of divergingMaps) {
      const [redHigh, , blueHigh] = linearEntry(map, 255);
      const [redLow, , blueLow] = linearEntry(map, 0);
      expect(redHigh).toBeGreaterThan(2 * blueHigh);
      expect(blueLow).toBeGreaterThan(2 * redLow);
    }
  });

  test("each row of a deficiency matrix keeps grey grey", () => {
    for (const [, matrix] of deficiencies) {
      for (const row of matrix) expect(row[0] + row[1] + row[2]).toBeCloseTo(1, 4);
    }
  });

  describe.each(deficiencies)("seen with %s", (_name, matrix) => {
    test.each(divergingMaps)("$id: equal magnitudes of opposite sign stay apart", (map) => {
      for (const share of [0.25, 0.5, 0.75, 1]) {
        const step = Math.round(127 * share);
        const negative = seenWith(matrix, linearEntry(map, 127 - step));
        const positive = seenWith(matrix, linearEntry(map, 128 + step));
        // 0.02 is a just noticeable difference in OKLab; five of them are plain to see side by side.
        expect(distance(negative, positive)).toBeGreaterThan(share < 0.5 ? 0.06 : 0.1);
      }
    });

    test.each([...divergingMaps, ...sequentialMaps])("$id: luminance keeps its order along each arm", (map) => {
      for (const arm of arms(map)) {
        // Every eighth entry: finer steps are within the rounding of bytes.
        const values = arm
          .filter((_entry, index) => index % 8 === 0)
          .map((entry) => luminance(seenWith(matrix, linearEntry(map, entry))));
        expect(worstStepBack(values)).toBeLessThan(0);
      }
    });
  });
});
