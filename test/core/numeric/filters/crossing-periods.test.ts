import { describe, expect, test } from "vitest";
import { crossingPeriods } from "../../../../core/numeric/filters/crossing-periods";
import { expectClose } from "../../../expect-close";

describe("crossing periods", () => {
  test("every crossing of a known response is found, shortest first", () => {
    // cos(2 pi f 30) is zero at f = (2k + 1) / 120, i.e. periods 120, 40, 24.
    const found = crossingPeriods((f) => Math.cos(2 * Math.PI * f * 30), 0, 20, 200);
    [24, 40, 120].forEach((period, i) => {
      expectClose(found[i], period, { relative: 1e-12, because: "sixty bisections" });
    });
    expect(found).toHaveLength(3);
  });

  test("a level met exactly on a point of the sweep is found once", () => {
    expect(crossingPeriods((f) => 1 / f - 10, 0, 10, 1000)).toHaveLength(0);
    const middle = crossingPeriods((f) => Math.log(1 / f), Math.log(100), 10, 1000);
    expect(middle).toHaveLength(1);
    expectClose(middle[0], 100, { relative: 1e-12, because: "sixty bisections" });
  });

  test("a level never met, a NaN response and an empty range give none", () => {
    expect(crossingPeriods(() => 1, 0.5, 2, 100)).toEqual([]);
    expect(crossingPeriods(() => Number.NaN, 0.5, 2, 100)).toEqual([]);
    expect(crossingPeriods((f) => f, 0.1, 20, 20)).toEqual([]);
  });
});
