import { describe, expect, test } from "vitest";
import { describeJet } from "../../../core/jets/describe-jet";
import type { FollowedJet } from "../../../core/jets/follow/jet-lines";
import { memoryOf } from "../../../core/jets/memory";
import { studentQuantile } from "../../../core/numeric/distributions";
import { meanAndDeviation } from "../../../core/numeric/serial-correlation";
import { randomStream } from "../../../core/numeric/statistics/random";
import { expectClose } from "../../expect-close";
import { sphere } from "./earths";

const rounding = { relative: 1e-9, because: "float64 rounding" };

function jetOn(
  dates: readonly number[],
  latitude: (date: number) => number,
  speed: (date: number) => number,
): FollowedJet {
  return {
    id: 4,
    sign: -1,
    dates: Int32Array.from(dates),
    days: Float64Array.from(dates, (date) => 7 * date),
    latitudes: Float64Array.from(dates, latitude),
    speeds: Float64Array.from(dates, speed),
    widthsKm: new Float64Array(dates.length).fill(150),
    beginning: { kind: "birth" },
    ending: { kind: "end" },
  };
}

describe("the summary of a westward jet that drifts half a degree a year", () => {
  const hasData = Uint8Array.from({ length: 60 }, (_, date) => (date === 20 ? 0 : 1));
  const dates = Array.from({ length: 60 }, (_, date) => date).filter((date) => date >= 5 && date % 10 !== 0);
  const extent = { sectorsWithData: 5, tiltDegreesPerDegree: 0.01, tilt: 0.012, tiltAngleDegrees: 0.7 };
  const summary = describeJet(
    jetOn(
      dates,
      (date) => 30 + (0.5 * 7 * date) / 365,
      (date) => (date === 33 ? -0.2 : -0.1),
    ),
    {
      hasData,
      stepDays: 7,
      yearDays: 365,
      earth: sphere,
      extents: [
        { ...extent, share: 0.6 },
        { ...extent, share: 1 },
      ],
    },
  );

  test("has its range, its strongest speed with its sign, and its life with both ends included", () => {
    expectClose(summary.southernmost, 30 + 17.5 / 365, rounding);
    expectClose(summary.northernmost, 30 + (0.5 * 7 * 59) / 365, rounding);
    expect(summary.peakSpeed).toBe(-0.2);
    expect(summary.lifetimeDays).toBe(55 * 7);
    expectClose(summary.zonalExtent, 0.8, rounding);
    expectClose(summary.tilt, 0.012, rounding);
  });

  test("counts the days it is present among the days with data during its life", () => {
    expect(summary.datesFound).toBe(50);
    expectClose(summary.shareOfDaysPresent, 50 / 54, rounding);
  });

  test("has its drift in degrees a year and in metres a second", () => {
    expectClose(summary.driftDegreesPerYear.value, 0.5, rounding);
    const metres = (0.5 * Math.PI * 6371000) / 180 / (365 * 86400);
    expectClose(summary.driftMetresPerSecond.value, metres, rounding);
  });
});

test("a jet seen once lives one step and has no drift", () => {
  const jet = jetOn(
    [3],
    () => 30,
    () => -0.1,
  );
  const hasData = new Uint8Array(9).fill(1);
  const summary = describeJet(jet, { hasData, stepDays: 7, yearDays: 365, earth: sphere, extents: [] });
  expect(summary).toMatchObject({ lifetimeDays: 7, shareOfDaysPresent: 1, zonalExtent: Number.NaN });
  expect(summary.driftDegreesPerYear.value).toBeNaN();
});

describe("memory of AR(1) series", () => {
  test.each([
    [0.5, 200],
    [0.9, 200],
    [0.8, 60],
  ])("r = %f over %i dates: limits of a mean by its effective size hold for at least 85 of 100 seeds", (r, length) => {
    let held = 0;
    for (let seed = 0; seed < 200; seed++) {
      const random = randomStream(seed);
      let value = random.normal();
      const series = Float64Array.from({ length }, () => {
        const now = value;
        value = r * value + Math.sqrt(1 - r * r) * random.normal();
        return now;
      });
      const { effectiveSize } = memoryOf(series, 7, 1);
      const { mean, deviation } = meanAndDeviation(series);
      const half = (studentQuantile(0.975, Math.max(1, effectiveSize - 1)) * deviation) / Math.sqrt(effectiveSize);
      if (Math.abs(mean) <= half) held++;
    }
    // Ten independent values tell too little of their own memory for the full 95: deviation and integral come out low together.
    expect(held).toBeGreaterThanOrEqual(170);
  });

  test("of known r = 0.8 and great length is (1 + r) / (1 - r) steps long and falls to 1/e in -1 / ln r", () => {
    const random = randomStream(11);
    let value = 0;
    const series = Float64Array.from({ length: 20000 }, () => {
      value = 0.8 * value + 0.6 * random.normal();
      return value;
    });
    const memory = memoryOf(series, 7, 1);
    expectClose(memory.eFoldingDays, -7 / Math.log(0.8), { relative: 0.1, because: "sampled correlations" });
    expectClose(memory.integralDays, 7 * 9, { relative: 0.2, because: "sampled correlations up to the first zero" });
  });

  test("a series that does not vary counts every value", () => {
    expect(memoryOf(new Float64Array(9).fill(2), 1, 1).effectiveSize).toBe(9);
  });
});
