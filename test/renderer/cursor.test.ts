import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fitCursor, nearestIndex, stepLatitude } from "../../renderer/state/cursor";

const rising = Float64Array.from({ length: 81 }, (_, i) => 20 + i * 0.25);
const falling = rising.slice().reverse();

describe("the cursor", () => {
  test("the nearest index equals a search through every value, for rising and falling axes", () => {
    fc.assert(
      fc.property(fc.double({ min: 10, max: 50, noNaN: true }), fc.boolean(), (value, isRising) => {
        const values = isRising ? rising : falling;
        const least = Math.min(...values.map((each) => Math.abs(each - value)));
        expect(Math.abs(values[nearestIndex(values, value)] - value)).toBeCloseTo(least, 12);
      }),
    );
  });

  test("a step up goes north on either axis, a step down undoes it, and the ends hold", () => {
    for (const values of [rising, falling]) {
      expect(stepLatitude(values, 30, 1)).toBe(30.25);
      expect(stepLatitude(values, stepLatitude(values, 30, 1), -1)).toBe(30);
      expect(stepLatitude(values, 40, 5)).toBe(40);
      expect(stepLatitude(values, 20, -5)).toBe(20);
    }
  });

  test("one row is enough", () => {
    expect(nearestIndex([7], 100)).toBe(0);
    expect(stepLatitude([7], 7, 3)).toBe(7);
  });

  test("keeps its latitude and its date, not its index, in a record of other axes", () => {
    const daily = {
      latitude: { values: rising },
      time: { values: Float64Array.from({ length: 300 }, (_, i) => 1000 + i) },
    };
    const tenDays = {
      latitude: { values: falling },
      time: { values: Float64Array.from({ length: 30 }, (_, i) => 1000 + 10 * i) },
    };
    const cursor = { latitude: 31.4, dateIndex: 252 };
    expect(fitCursor(cursor, daily, daily)).toEqual(cursor);
    expect(fitCursor(cursor, daily, tenDays)).toEqual({ latitude: 31.4, dateIndex: 25 });
    expect(fitCursor({ latitude: -60, dateIndex: 299 }, daily, tenDays)).toEqual({ latitude: 30, dateIndex: 29 });
    expect(fitCursor(null, null, daily)).toEqual({ latitude: 30, dateIndex: 150 });
  });
});
