import { describe, expect, test } from "vitest";
import { averagingBlocks } from "../../../../core/study/scales/averaging";
import { blockMeans } from "../../../../core/study/scales/block-means";
import { flowSpeeds, meanPlane } from "../../../../core/study/scales/flow-speeds";
import { latitudePositions, longitudePositions } from "../../../../core/study/scales/positions";
import { meanSpacing, meanSpacingOfDates } from "../../../../core/study/scales/spacing";
import { expectAllClose, expectClose } from "../../../expect-close";

const earth = { earth: "sphere", radius: 6371000, gravity: 9.81, omega: 7.292115e-5 } as const;
const metresPerDegree = (6371000 * Math.PI) / 180;
const latitude = Float64Array.from({ length: 81 }, (_, i) => 20 + i / 4);
const jets = (degrees: number, amplitude = 0.1, mean = 0) =>
  latitude.map((value) => mean + amplitude * Math.cos((2 * Math.PI * (value - 20)) / degrees));

describe("spacing of jets", () => {
  test("is the wavelength of a cosine, whatever mean flow carries it", () => {
    const wanted = 4 * metresPerDegree;
    for (const mean of [0, 0.5, -0.5]) {
      const because = "a parabola at the crests";
      expectClose(meanSpacing(jets(4, 0.1, mean), latitude, "auto", earth), wanted, { relative: 1e-3, because });
    }
  });

  test("is unknown for one jet, for no flow and for ripples below the prominence asked for", () => {
    expect(meanSpacing(jets(30), latitude, "auto", earth)).toBeNaN();
    expect(
      meanSpacing(
        latitude.map(() => Number.NaN),
        latitude,
        "auto",
        earth,
      ),
    ).toBeNaN();
    expect(meanSpacing(jets(4, 0.1), latitude, 0.5, earth)).toBeNaN();
  });

  test("over dates is the mean over all their neighbours, blank dates left out", () => {
    const [a, b] = [jets(4), jets(2.5)];
    const matrix = Float64Array.from(latitude, () => 0);
    const three = new Float64Array(3 * latitude.length);
    for (let row = 0; row < latitude.length; row++) three.set([a[row], Number.NaN, b[row]], 3 * row);
    const between = meanSpacingOfDates(three, latitude, "auto", earth) / metresPerDegree;
    expect(between).toBeGreaterThan(2.5);
    expect(between).toBeLessThan(4);
    expect(meanSpacingOfDates(matrix, latitude, "auto", earth)).toBeNaN();
  });
});

describe("speeds of the flow", () => {
  // Two rows of two cells, four dates: u = 1 + (-1, 1, -1, 1), v = 0 in the south; one cell of the north is land.
  const sums = {
    sum: [Float64Array.of(4, 4, 8, 0), new Float64Array(4)],
    squares: [Float64Array.of(8, 8, 16, 0), Float64Array.of(0, 0, 4, 0)],
    count: [Int32Array.of(4, 4, 4, 0), Int32Array.of(4, 4, 4, 0)],
  };

  test("split into mean and eddies by row and over the region with the rows' weights", () => {
    const speeds = flowSpeeds(sums, Float64Array.of(2, 1));
    expectAllClose(speeds.totalByRow, [Math.sqrt(2), Math.sqrt(5)], { relative: 1e-15, because: "arithmetic" });
    expectAllClose(speeds.eddyByRow, [1, 1], { relative: 1e-15, because: "arithmetic" });
    expectClose(speeds.total, Math.sqrt((2 * 4 + 5) / 5), { relative: 1e-15, because: "arithmetic" });
    expect(Array.from(meanPlane(sums, 0))).toEqual([1, 1, 2, Number.NaN]);
  });

  test("of the eddies are unknown, not zero, with one date, which leaves the whole flow known", () => {
    const one = {
      sum: [Float64Array.of(1, 1), Float64Array.of(0, 0)],
      squares: [Float64Array.of(1, 1), Float64Array.of(0, 0)],
      count: [Int32Array.of(1, 1), Int32Array.of(1, 1)],
    };
    const speeds = flowSpeeds(one, Float64Array.of(1, 1));
    expect([speeds.total, speeds.eddy, ...speeds.eddyByRow]).toEqual([1, Number.NaN, Number.NaN, Number.NaN]);
  });
});

test("block means keep a straight line, count what is valid and drop the incomplete block", () => {
  const days = Float64Array.from({ length: 11 }, (_, i) => 100 + 3 * i);
  const values = Float64Array.from([...days, ...days.map((day, i) => (i < 5 ? Number.NaN : day))]);
  const blocks = blockMeans(values, 2, days, 3);
  expect(blocks.datesInBlock).toBe(4);
  expect(Array.from(blocks.days)).toEqual([104.5, 116.5]);
  expect(Array.from(blocks.values)).toEqual([104.5, 116.5, Number.NaN, 118]);
  expect(Array.from(blockMeans(values, 2, days, 20).values)).toEqual(Array.from(values));
});

test("averaging times rise, each once, and fit twice into the record", () => {
  expect(averagingBlocks(300, 3)).toEqual([1, 3, 10, 30, 60, 150]);
  expect(averagingBlocks(40, 30)).toEqual([1, 3, 6, 15]);
  expect(averagingBlocks(1, Number.NaN)).toEqual([]);
});

test("positions are metres from the first along parallel and meridian", () => {
  const along = longitudePositions(Float64Array.of(-150, -149, -147), metresPerDegree * (180 / Math.PI) * 0.5);
  expectAllClose(along.metres, [0, metresPerDegree / 2, 1.5 * metresPerDegree], {
    relative: 1e-12,
    because: "arithmetic",
  });
  const up = latitudePositions(Float64Array.of(20, 21, 23), new Float64Array(3).fill(6371000));
  expectAllClose(up.metres, [0, metresPerDegree, 3 * metresPerDegree], { relative: 1e-12, because: "arithmetic" });
});
