import { describe, expect, it } from "vitest";
import { makeAxis, makeTimeAxis } from "../../../core/model/axis";
import type { Region } from "../../../core/study/schema";
import { selectPeriod, selectRegion } from "../../../main/readers/select";

const steps = (first: number, step: number, count: number) => Array.from({ length: count }, (_, i) => first + i * step);
const axes = (longitudes: readonly number[], latitudes: readonly number[] = steps(-80, 10, 17)) => ({
  latitude: makeAxis("latitude", latitudes, "latitude"),
  longitude: makeAxis("longitude", longitudes, "longitude"),
});
const box = (west: number, east: number): Region => ({ west, east, south: 20, north: 41 });
const from0 = axes(steps(0, 10, 36));
const from180 = axes(steps(-180, 10, 36));

describe.each([
  ["0", from0],
  ["-180", from180],
] as const)("on a globe from %s", (_, globe) => {
  it.each([
    [350, 10, [350, 360, 370]],
    [-10, 10, [-10, 0, 10]],
    [170, -170, [170, 180, 190]],
    [170, 190, [170, 180, 190]],
    [-190, -170, [-190, -180, -170]],
    [530, 550, [530, 540, 550]],
    [-150, -125, [-150, -140, -130]],
    [210, 235, [210, 220, 230]],
  ])("west %d, east %d is one run of longitudes %j", (west, east, expected) => {
    const selected = selectRegion(globe, box(west, east), "region");
    expect([...selected.axes.longitude.values]).toEqual(expected);
    const cells = selected.longitude.flatMap(([from, to]) => [...globe.longitude.values.slice(from, to)]);
    expect(cells.map((value) => ((value % 360) + 360) % 360)).toEqual(
      expected.map((value) => ((value % 360) + 360) % 360),
    );
    expect([...selected.axes.latitude.values]).toEqual([20, 30, 40]);
    expect(selected.axes.longitude.periodic).toBe(false);
  });

  it("a full turn starts in the west, holds each meridian once and stays periodic", () => {
    const { longitude } = selectRegion(globe, box(-180, 180), "region").axes;
    expect([...longitude.values]).toEqual(steps(-180, 10, 36));
    expect(longitude.periodic).toBe(true);
  });
});

it("edges count as inside, also where a float32 coordinate falls just outside", () => {
  const nearly = axes([209.9999999, 210.1, 210.2000003]);
  expect(selectRegion(nearly, box(210, 210.2), "region").longitude).toEqual([[0, 3]]);
});

it("without a region everything is selected", () => {
  const all = selectRegion(from0, undefined, "region");
  expect(all).toMatchObject({ latitude: [0, 17], longitude: [[0, 36]] });
});

it("a region without cells is refused with the data's extent", () => {
  const pacific = axes(steps(150, 10, 10));
  expect(() => selectRegion(pacific, box(0, 20), "region")).toThrow(
    /region: expected cells within latitude -80 to 80, longitude 150 to 240, got none in west 0, east 20/,
  );
  expect(() => selectRegion(pacific, { ...box(160, 170), south: 81, north: 85 }, "region")).toThrow(
    /none in .*south 81/,
  );
  expect(() => selectRegion(pacific, { ...box(160, 170), south: 41, north: 20 }, "region")).toThrow(/none in/);
});

it("a region that holds two separate parts of regional data is refused, a full turn gives all of it", () => {
  const pacific = axes(steps(110, 10, 19));
  expect(() => selectRegion(pacific, box(250, 150), "region")).toThrow(
    /a region in one piece.*250 to 290 and 110 to 150/,
  );
  expect(selectRegion(pacific, box(-180, 180), "region").longitude).toEqual([[0, 19]]);
});

it("a period holds its first and its last day whole", () => {
  const time = makeTimeAxis(steps(22340.5, 0.5, 20), "standard", "time");
  expect(selectPeriod(time, { from: "2031-03-03", to: "2031-03-03" }, "period")).toEqual([1, 3]);
  expect(selectPeriod(time, undefined, "period")).toEqual([0, 20]);
});

it("an empty period is refused with the data's extent, a day that does not exist by its key", () => {
  const time = makeTimeAxis(steps(22340, 1, 20), "360_day", "time");
  expect(() => selectPeriod(time, { from: "1999-01-01", to: "1999-12-30" }, "period")).toThrow(
    /expected dates within 2032-01-21 to/,
  );
  expect(() => selectPeriod(time, { from: "2032-01-31", to: "2032-02-30" }, "period")).toThrow(
    /period\.from: expected a day of the 360_day/,
  );
});
