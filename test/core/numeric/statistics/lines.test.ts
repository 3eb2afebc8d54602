import { describe, expect, test } from "vitest";
import { meanAndDeviation } from "../../../../core/numeric/serial-correlation";
import { compensatedSum } from "../../../../core/numeric/statistics/compensated-sum";
import { fitLine } from "../../../../core/numeric/statistics/linear-regression";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { expectClose } from "../../../expect-close";

/** NIST StRD linear regression set Norris, data and certified values [from memory]; a slip in either would not agree. */
const norris = {
  y: [
    0.1, 338.8, 118.1, 888.0, 9.2, 228.1, 668.5, 998.5, 449.1, 778.9, 559.2, 0.3, 0.1, 778.1, 668.8, 339.3, 448.9, 10.8,
    557.7, 228.3, 998.0, 888.8, 119.6, 0.3, 0.6, 557.6, 339.3, 888.0, 998.5, 778.9, 10.2, 117.6, 228.9, 668.4, 449.2,
    0.2,
  ],
  x: [
    0.2, 337.4, 118.2, 884.6, 10.1, 226.5, 666.3, 996.3, 448.6, 777.0, 558.2, 0.4, 0.6, 775.5, 666.9, 338.0, 447.5,
    11.6, 556.0, 228.1, 995.8, 887.6, 120.2, 0.3, 0.3, 556.8, 339.1, 887.2, 999.0, 779.0, 11.1, 118.3, 229.2, 669.1,
    448.9, 0.5,
  ],
};

describe("straight lines by least squares", () => {
  test("the certified Norris line: slope, intercept and the slope's standard error", () => {
    const got = fitLine(Float64Array.from(norris.x), Float64Array.from(norris.y), 0.95, 36);
    const close = { relative: 1e-12, because: "certified to 15 digits, float64 sums" };
    expectClose(got.slope, 1.00211681802045, close, "slope");
    expectClose(got.intercept, -0.262323073774029, { relative: 1e-11, because: "a difference of means" }, "intercept");
    expectClose(got.slopeError, 0.429796848199937e-3, { relative: 1e-10, because: "residuals cancel" }, "error");
  });

  test("with gaps the line is that of the samples that are there; a perfect line has no spread", () => {
    const x = Float64Array.from({ length: 12 }, (_, i) => i * 5);
    const y = x.map((value) => 2 - 0.25 * value);
    y[3] = Number.NaN;
    const got = fitLine(x, y);
    expectClose(got.slope, -0.25, { relative: 1e-14, because: "exact line" });
    expectClose(got.intercept, 2, { relative: 1e-14, because: "exact line" });
    expect([got.slopeError, got.low, got.high, got.effectiveSize]).toEqual([0, -0.25, -0.25, 11]);
    expect(got.residuals[3]).toBeNaN();
  });

  test("two samples have a slope and no limits", () => {
    const got = fitLine(Float64Array.of(0, 2), Float64Array.of(1, 5));
    expect(got.slope).toBe(2);
    expect(got.low).toBeNaN();
    expect(got.pValue).toBeNaN();
  });

  test("no trend in red noise of r = .6 is rejected at 5 %, plain limits reject five times as often", () => {
    const [records, count] = [1500, 300];
    const x = Float64Array.from({ length: count }, (_, i) => i);
    let [rejected, naive] = [0, 0];
    for (let record = 0; record < records; record++) {
      const random = randomStream(2000, record);
      let last = random.normal() / 0.8;
      const y = x.map(() => {
        last = 0.6 * last + random.normal();
        return last;
      });
      if (fitLine(x, y).pValue < 0.05) rejected++;
      if (fitLine(x, y, 0.95, count).pValue < 0.05) naive++;
    }
    const because = "1500 records have 0.6 %; r is estimated from residuals, a little low";
    expectClose(rejected / records, 0.05, { absolute: 0.025, because });
    expect(naive / records).toBeGreaterThan(0.2);
  });
});

describe("sums", () => {
  test("keep what single additions lose", () => {
    expect(compensatedSum([1, 1e100, 1, -1e100])).toBe(2);
    expect(compensatedSum([])).toBe(0);
    expect(compensatedSum([1, Number.NaN])).toBeNaN();
    expect(compensatedSum([1, Number.POSITIVE_INFINITY])).toBe(Number.POSITIVE_INFINITY);
  });

  test("the mean of 2^18 ones is 1, that of as many tenths keeps all its digits", () => {
    const ones = new Float64Array(2 ** 18).fill(1);
    expect(meanAndDeviation(ones)).toEqual({ mean: 1, deviation: 0, count: 2 ** 18 });
    expect(meanAndDeviation(ones.fill(0.1)).mean).toBe(0.1);
    expect(meanAndDeviation(new Float64Array(3).fill(Number.NaN))).toEqual({
      mean: Number.NaN,
      deviation: Number.NaN,
      count: 0,
    });
  });
});
