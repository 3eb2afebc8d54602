import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { quantities } from "../../core/ocean/quantities/index";
import { type BandSettings, bandSettings, geostrophySettings, spaceSettings } from "../../core/study/schema";
import { fieldSource } from "../../main/engine/tasks/field";
import { backgroundOf, cells, columns, dates, recordOf, rows, wandering } from "./made-record";

const settings: [string, BandSettings][] = (["lanczos", "butterworth", "running-mean"] as const).flatMap((filter) =>
  [0, 9, 30].map((bridgeDays): [string, BandSettings] => [
    `${filter}, gaps of up to ${bridgeDays} days bridged`,
    bandSettings.parse({ filter, shortestDays: 18, longestDays: 60, order: 1, bridgeDays }),
  ]),
);
/** Runs of dates missing from the whole map or from a block of cells. */
const gap = fc.record({
  from: fc.integer({ min: 0, max: dates - 1 }),
  length: fc.integer({ min: 1, max: 14 }),
  row: fc.integer({ min: -4, max: rows - 1 }),
  column: fc.integer({ min: 0, max: columns - 2 }),
});
const spaces = [
  {},
  { meridional: { longestKm: 400 }, removeZonalMean: true },
  { removeSurface: { zonalKm: 200, meridionalKm: 200 } },
];

describe.each(settings)("%s", (_, band) => {
  test("no quantity has a value where the height has none, in the band or not, whatever the filter in space", () => {
    fc.assert(
      fc.property(fc.array(gap, { minLength: 1, maxLength: 5 }), fc.constantFrom(...spaces), (gaps, space) => {
        const values = wandering(6);
        for (const { from, length, row, column } of gaps) {
          for (let t = from; t < Math.min(dates, from + length); t++) {
            // A negative row stands for the whole map.
            if (row < 0) values.fill(Number.NaN, t * cells, (t + 1) * cells);
            else values.fill(Number.NaN, t * cells + row * columns + column, t * cells + row * columns + column + 2);
          }
        }
        const record = recordOf(values);
        if (!record.hasData.includes(1)) return;
        const shared = { geostrophy: geostrophySettings.parse({}), space: spaceSettings.parse(space), band };
        for (const inBand of [false, true]) {
          const source = fieldSource({ ...shared, record, background: backgroundOf(record), inBand });
          for (const { from, length } of gaps) {
            const date = Math.min(dates - 1, from + (length >> 1));
            const planes = source.on(date);
            for (const { id } of quantities) {
              const plane = planes(id);
              const wrong = plane.findIndex((value, cell) => {
                const isMissing = Number.isNaN(values[date * cells + cell]);
                return isMissing ? !Number.isNaN(value) : Math.abs(value) === Number.POSITIVE_INFINITY;
              });
              expect(wrong, `${id}: a cell on date ${date}`).toBe(-1);
            }
          }
        }
      }),
      { numRuns: 10 },
    );
  });
});
