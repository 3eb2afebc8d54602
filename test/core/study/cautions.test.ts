import { describe, expect, test } from "vitest";
import type { Axis, TimeAxis } from "../../../core/model/axis";
import { cautionsFor } from "../../../core/study/cautions";
import { readStudy } from "../../../core/study/read";
import { type HeightRecord, surveyValidity } from "../../../core/study/record";
import { shortScaleChange } from "../../../core/study/scales/short-scale-change";
import { expectClose } from "../../expect-close";

const [dates, rows, columns] = [120, 6, 80];

function axis(kind: Axis["kind"], first: number, step: number, count: number): Axis {
  const values = Float64Array.from({ length: count }, (_, i) => first + i * step);
  return { kind, values, step, even: true, periodic: false };
}

/** Waves of 3000 km and of 120 km along rows at 30 degrees north, the short ones with an amplitude by date. */
function record(shortAmplitude: (date: number) => number): HeightRecord {
  const values = Float64Array.from({ length: dates * rows * columns }, (_, i) => {
    const date = Math.floor(i / (rows * columns));
    const kilometres = (i % columns) * 0.25 * 96.5;
    const phase = 2 * Math.PI * kilometres;
    return Math.sin(phase / 3000) + shortAmplitude(date) * Math.sin(phase / 120 + date);
  });
  const cube = { dates, rows, columns, values };
  const time: TimeAxis = { ...axis("time", 20_000, 10, dates), kind: "time", calendar: "standard" };
  const axes = { latitude: axis("latitude", 30, 0.25, rows), longitude: axis("longitude", -150, 0.25, columns) };
  const { coverage: _, ...survey } = surveyValidity(cube);
  return { cube, axes, time, ...survey };
}

const study = (changes: object) => readStudy({ strake: 1, grids: [{ id: "A", files: ["a.nc"] }], ...changes }, "made");
const even = record(() => 0.1);
const texts = (changes: object, of = even) =>
  Object.fromEntries(cautionsFor(study(changes), of).map(({ id, text }) => [id, text]));

describe("maps from unlike data", () => {
  test("are seen by short scales that hold twice the variance in the last third", () => {
    const grown = record((date) => (date < 60 ? 0.1 : 0.1 * Math.SQRT2));
    expectClose(shortScaleChange(grown), 2, { relative: 0.1, because: "what 3000 km leaves after its running mean" });
    expect(texts({}, grown).unlikeMaps).toMatch(/2\.0 times more variance in the last third/);
    const shrunk = record((date) => (date < 60 ? 0.1 * Math.SQRT2 : 0.1));
    expect(texts({}, shrunk).unlikeMaps).toMatch(/2\.0 times less variance/);
  });

  test("are not seen where nothing changes, nor where large scales alone grow", () => {
    expect(texts({}).unlikeMaps).toBeUndefined();
    expectClose(shortScaleChange(even), 1, { relative: 0.1, because: "waves of other phases" });
  });

  test("dates without data leave no mark", () => {
    const gappy = record(() => 0.1);
    const values = gappy.cube.values.map((value, i) =>
      Math.floor(i / (rows * columns)) % 4 === 1 ? Number.NaN : value,
    );
    const { coverage: _, ...survey } = surveyValidity({ ...gappy.cube, values });
    expectClose(shortScaleChange({ ...gappy, cube: { ...gappy.cube, values }, ...survey }), 1, {
      relative: 0.1,
      because: "waves of other phases",
    });
  });
});

describe("cautions on what the band holds", () => {
  test("tides that alias into it are named with their periods", () => {
    const { tides } = texts({});
    expect(tides).toMatch(/K1 173\.\d \(repeat 9\.92\)/);
    expect(tides).toMatch(/M2 94\.5 \(repeat 35\)/);
    expect(tides).not.toMatch(/S2/);
  });

  test("without repeats, without a band, or with a band that no alias meets there is none", () => {
    expect(texts({ scales: { repeatDays: [] } }).tides).toBeUndefined();
    expect(texts({ band: { filter: "none" } }).tides).toBeUndefined();
    expect(texts({ band: { shortestDays: 200, longestDays: 300 } }).tides).toBeUndefined();
  });

  test("a band below what the study says is resolved is cautioned, in time and in space", () => {
    expect(texts({}).resolution).toBeUndefined();
    expect(texts({ scales: { resolvedDays: 100, resolvedKm: 250 } }).resolution).toMatch(
      /below about 100 days and 250 km/,
    );
    const space = { meridional: { shortestKm: 120, longestKm: 600 } };
    expect(texts({ space }).resolutionInSpace).toMatch(/from 120 km; the mapping resolves about 180 km/);
    expect(texts({ space, scales: { resolvedKm: 100 } }).resolutionInSpace).toBeUndefined();
  });

  test("a record shorter than ten longest periods is cautioned", () => {
    expect(texts({}).shortRecord).toMatch(/2\.2 of the longest period/);
    expect(texts({ band: { shortestDays: 40, longestDays: 110 } }).shortRecord).toBeUndefined();
  });
});
