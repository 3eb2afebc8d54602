import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { planesFrom } from "../../core/ocean/quantities/evaluate";
import { quantities } from "../../core/ocean/quantities/index";
import { timeFilter } from "../../core/study/band";
import { bandHeightPlane } from "../../core/study/band-plane";
import { bandLatitudeTime } from "../../core/study/latitude-time";
import { zonalMeans } from "../../core/study/reduction";
import { bandSettings, type SpaceSettings, spaceSettings } from "../../core/study/schema";
import { spaceFilter } from "../../core/study/space-filter";
import { expectAllClose } from "../expect-close";
import { axes, backgroundOf, cells, columns, dates, geometry, recordOf, rows, time, wandering } from "./made-record";

const bands = (["lanczos", "butterworth", "running-mean"] as const).flatMap((filter) =>
  [
    { shortestDays: 18, longestDays: 90 },
    { shortestDays: 24, longestDays: null },
    { shortestDays: null, longestDays: 90 },
  ].map((edges) => {
    const made = timeFilter(bandSettings.parse({ filter, ...edges, order: 2, bridgeDays: 9 }), time);
    if (!made) throw new Error("no filter");
    return [`${filter} from ${edges.shortestDays} to ${edges.longestDays} days`, made] as const;
  }),
);
const spaces: [string, SpaceSettings][] = [
  ["nothing in space", {}],
  ["bands along both axes", { zonal: { longestKm: 300 }, meridional: { shortestKm: 150, longestKm: 350 } }],
  ["a zonal mean", { removeZonalMean: true }],
  ["a loess surface", { removeSurface: { zonalKm: 200, meridionalKm: 200 } }],
].map(([name, space]) => [name as string, spaceSettings.parse(space)]);

/** Land in a corner, whole dates and single cells missing; the same for every record of a property. */
const holes = fc.record({
  dates: fc.array(fc.integer({ min: 0, max: dates - 1 }), { maxLength: 6 }),
  cells: fc.array(fc.integer({ min: 0, max: dates * cells - 1 }), { maxLength: 60 }),
});
type Holes = typeof holes extends fc.Arbitrary<infer T> ? T : never;

function holed(values: Float64Array, at: Holes): Float64Array {
  const out = values.slice();
  for (const date of at.dates) out.fill(Number.NaN, date * cells, (date + 1) * cells);
  for (const i of at.cells) out[i] = Number.NaN;
  for (let t = 0; t < dates; t++)
    for (const cell of [0, 1, 2, columns, columns + 1]) out[t * cells + cell] = Number.NaN;
  return out;
}

const rounding = "sums of a hundred terms in float64, background and all";
const factor = fc.integer({ min: -200, max: 200 }).map((whole) => whole / 64);
const linear = quantities.filter((quantity) => quantity.linear).map(({ id }) => id);

describe.each(bands)("%s", (_, filter) => {
  test.each(spaces)(
    "background, band, %s, differences and zonal means are linear in height, holes or not",
    (_name, space) => {
      const inSpace = spaceFilter(space, axes, geometry);
      const steps = (values: Float64Array, date: number): Float64Array[] => {
        const record = recordOf(values);
        const planes = planesFrom(inSpace(bandHeightPlane(record, date, filter, backgroundOf(record))), geometry);
        return linear.flatMap((id) => [planes(id), zonalMeans(planes(id), record, null)]);
      };
      const drawn = fc.record({ a: factor, b: factor, at: holes, date: fc.integer({ min: 0, max: dates - 1 }) });
      fc.assert(
        fc.property(drawn, ({ a, b, at, date }) => {
          const [one, two] = [1, 2].map((seed) => holed(wandering(seed), at));
          const both = one.map((value, i) => a * value + b * two[i]);
          const [ofOne, ofTwo, ofBoth] = [one, two, both].map((values) => steps(values, date));
          ofBoth.forEach((got, k) => {
            // Against the planes that entered: a zonal mean may be nothing but what rounding leaves of them.
            const largest = (planes: Float64Array[]) =>
              planes[k - (k % 2)].reduce((most, value) => Math.max(most, Math.abs(value) || 0), 0);
            const absolute = 1e-10 * (Math.abs(a) * largest(ofOne) + Math.abs(b) * largest(ofTwo));
            const wanted = ofOne[k].map((value, i) => a * value + b * ofTwo[k][i]);
            expectAllClose(got, wanted, { absolute, because: rounding }, `${linear[k >> 1]}`);
          });
        }),
        { numRuns: 8 },
      );
    },
  );

  test("the picture of zonal means is linear too", () => {
    const every = Int32Array.from({ length: dates }, (_, t) => t);
    fc.assert(
      fc.property(fc.record({ a: factor, b: factor, at: holes }), ({ a, b, at }) => {
        const [one, two] = [3, 4].map((seed) => holed(wandering(seed), at));
        const both = one.map((value, i) => a * value + b * two[i]);
        const [ofOne, ofTwo, ofBoth] = [one, two, both].map((values) => {
          const record = recordOf(values);
          const zonal = new Float64Array(rows * dates);
          for (let t = 0; t < dates; t++) {
            const means = zonalMeans(values.slice(t * cells, (t + 1) * cells), record, null);
            means.forEach((mean, row) => {
              zonal[row * dates + t] = mean;
            });
          }
          return bandLatitudeTime(zonal, rows, filter, backgroundOf(record).basis, record.hasData, every);
        });
        const wanted = ofOne.map((value, i) => a * value + b * ofTwo[i]);
        expectAllClose(ofBoth, wanted, { absolute: 1e-10, because: rounding });
      }),
      { numRuns: 15 },
    );
  });
});

test.each(spaces)("filtering in time and in space (%s) may change places", (_, space) => {
  const inSpace = spaceFilter(space, axes, geometry);
  const record = recordOf(holed(wandering(5), { dates: [7, 30], cells: [] }));
  const { values } = record.cube;
  const spaceFirst = new Float64Array(dates * cells);
  for (let t = 0; t < dates; t++)
    spaceFirst.set(inSpace(Float64Array.from(values.slice(t * cells, (t + 1) * cells))), t * cells);
  const [, filter] = bands[0];
  const first = recordOf(spaceFirst);
  for (const date of [3, 45, 80]) {
    const timeFirst = inSpace(bandHeightPlane(record, date, filter, backgroundOf(record)));
    const spaceThenTime = bandHeightPlane(first, date, filter, backgroundOf(first));
    expectAllClose(timeFirst, spaceThenTime, { relative: 1e-9, because: "the same sums in another order" }, `${date}`);
    expect(timeFirst.some(Number.isFinite)).toBe(true);
  }
});
