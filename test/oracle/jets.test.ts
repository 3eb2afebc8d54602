import { describe, expect, test } from "vitest";
import { describeJet } from "../../core/jets/describe-jet";
import { leastCostAssignment } from "../../core/jets/follow/assignment";
import type { FollowedJet } from "../../core/jets/follow/jet-lines";
import { lineVarianceShare } from "../../core/jets/radon/line-means";
import { prominentPeaks } from "../../core/jets/ridges/prominence";
import { sphere } from "../core/jets/earths";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson } from "../reference-json";

interface Reference {
  readonly peaks: {
    readonly values: number[];
    readonly index: number[];
    readonly prominence: number[];
    readonly left: number[];
    readonly right: number[];
  }[];
  readonly assignments: {
    readonly rows: number;
    readonly columns: number;
    readonly costs: number[];
    readonly total: number;
  }[];
  readonly lines: {
    readonly position: number[];
    readonly time: number[];
    readonly value: number[];
    readonly positionStep: number;
    readonly timeStep: number;
    readonly angles: number[];
    readonly share: number[];
  }[];
  readonly drifts: {
    readonly latitude: number[];
    readonly stepDays: number;
    readonly yearDays: number;
    readonly slope: number;
  }[];
}

const reference = referenceJson<Reference>("jets");
const rounding = { relative: 1e-12, absolute: 1e-13, because: "float64 rounding" };

test.each(reference.peaks.map((each, i) => [i, each] as const))("peaks of profile %i are scipy's", (_, each) => {
  const peaks = prominentPeaks(Float64Array.from(each.values), 0);
  expect(peaks.map(({ index }) => index)).toEqual(each.index);
  for (const key of ["prominence", "left", "right"] as const) {
    expectAllClose(
      peaks.map((peak) => peak[key]),
      each[key],
      rounding,
      key,
    );
  }
});

test.each(reference.assignments)("the least cost of $rows rows in $columns columns is scipy's", (each) => {
  const columns = leastCostAssignment(Float64Array.from(each.costs), each.rows, each.columns);
  expect(new Set(columns).size).toBe(each.rows);
  const total = columns.reduce((sum, column, row) => sum + each.costs[row * each.columns + column], 0);
  expectClose(total, each.total, rounding);
});

describe("shares of variance between lines", () => {
  test.each(reference.lines.map((each, i) => [i, each] as const))("picture %i agrees with direct sums", (_, each) => {
    const points = {
      ...each,
      position: Float64Array.from(each.position),
      time: Float64Array.from(each.time),
      value: Float64Array.from(each.value),
    };
    const shares = each.angles.map((angle) => lineVarianceShare(points, angle));
    expectAllClose(shares, each.share, { absolute: 1e-11, because: "points on a line's edge round either way" });
  });
});

test.each(reference.drifts)("drift of a followed jet is scipy's Theil-Sen slope, $slope degrees a year", (each) => {
  const count = each.latitude.length;
  const jet: FollowedJet = {
    id: 1,
    sign: 1,
    dates: Int32Array.from({ length: count }, (_, i) => i),
    days: Float64Array.from({ length: count }, (_, i) => i * each.stepDays),
    latitudes: Float64Array.from(each.latitude),
    speeds: new Float64Array(count).fill(0.1),
    widthsKm: new Float64Array(count).fill(100),
    beginning: { kind: "record start" },
    ending: { kind: "record end" },
  };
  const summary = describeJet(jet, {
    hasData: new Uint8Array(count).fill(1),
    stepDays: each.stepDays,
    yearDays: each.yearDays,
    earth: sphere,
    extents: [],
  });
  expectClose(summary.driftDegreesPerYear.value, each.slope, { relative: 1e-10, because: "float64 differences" });
});
