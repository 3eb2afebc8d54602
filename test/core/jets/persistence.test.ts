import { describe, expect, test } from "vitest";
import { countPersistence, persistenceByLatitude } from "../../../core/jets/persistence";

const gap = Number.NaN;

function of(series: readonly number[], bridged = 0) {
  const { share, prevailingSign, longestDays, longestSign, validDates } = persistenceByLatitude(
    Float64Array.from(series),
    1,
    7,
    bridged,
  );
  return {
    share: share[0],
    prevailing: prevailingSign[0],
    longest: longestDays[0],
    sign: longestSign[0],
    valid: validDates[0],
  };
}

describe("persistence", () => {
  test("is the share of valid dates with the prevailing sign, and the longest run of either sign in days", () => {
    expect(of([1, 1, 1, -1, -1, -1, -1, 1, 1])).toEqual({
      share: 5 / 9,
      prevailing: 1,
      longest: 28,
      sign: -1,
      valid: 9,
    });
  });

  test("a missing date ends a run unless it is bridged; it never enters the share", () => {
    const series = [1, 1, gap, 1, 1, gap, gap, 1];
    expect(of(series)).toMatchObject({ share: 1, longest: 14, valid: 5 });
    expect(of(series, 1)).toMatchObject({ share: 1, longest: 35 });
    expect(of(series, 2)).toMatchObject({ share: 1, longest: 56 });
  });

  test("a bridge does not join two signs", () => {
    expect(of([1, gap, -1, -1], 3)).toMatchObject({ longest: 14, sign: -1 });
  });

  test("zero ends a run and counts for neither sign", () => {
    expect(of([1, 0, 1])).toEqual({ share: 2 / 3, prevailing: 1, longest: 7, sign: 1, valid: 3 });
  });

  test("missing dates before the first value are no part of a run", () => {
    expect(of([gap, gap, 1], 5)).toMatchObject({ longest: 7 });
  });

  test("nothing valid gives NaN share and no run", () => {
    expect(of([gap, gap])).toEqual({ share: Number.NaN, prevailing: 0, longest: 0, sign: 0, valid: 0 });
  });

  test("planes and the rows of a matrix give the same", () => {
    const matrix = Float64Array.from([1, 1, -1, gap, -1, -1, 1, 1]);
    const planes = countPersistence(2, 7, 0);
    for (let date = 0; date < 4; date++) planes.add(Float64Array.from([matrix[date], matrix[4 + date]]));
    expect(planes.result()).toEqual(persistenceByLatitude(matrix, 2, 7, 0));
  });
});
