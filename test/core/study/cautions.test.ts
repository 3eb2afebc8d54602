import { describe, expect, test } from "vitest";
import { cautionsFor } from "../../../core/study/cautions";
import { readStudy } from "../../../core/study/read";
import { type HeightRecord, surveyValidity } from "../../../core/study/record";
import { evenAxes } from "../ocean/grids";

const [rows, columns, dates] = [6, 8, 158];

/** Weekly maps of a gentle wave; no data on the dates named. */
function record(isMissing: (t: number) => boolean): HeightRecord {
  const cells = rows * columns;
  const values = Float64Array.from({ length: dates * cells }, (_, i) => {
    const t = Math.floor(i / cells);
    return isMissing(t) ? Number.NaN : 0.1 * Math.sin((i % cells) / 3 + t / 9);
  });
  const cube = { dates, rows, columns, values };
  const days = Float64Array.from({ length: dates }, (_, t) => 20000 + 7 * t);
  const time = { kind: "time", values: days, step: 7, even: true, periodic: false, calendar: "standard" } as const;
  return { cube, axes: evenAxes({ west: 170, south: -40, step: 1, rows, columns }), time, ...surveyValidity(cube) };
}

const study = (band: object) => readStudy({ strake: 1, grids: [{ id: "A", files: ["a.nc"] }], band }, "test");
const textOf = (id: string, band: object, made: HeightRecord) =>
  cautionsFor(study(band), made).find((caution) => caution.id === id)?.text ?? "";

describe("cautions about gaps", () => {
  const long = record((t) => t >= 70 && t < 79);
  const short = record((t) => t === 40);

  test("a short gap is said to be bridged, a long one to stop the filter", () => {
    expect(textOf("gaps", {}, short)).toMatch(/1 of 158 dates have no data .* the filter bridges them\./);
    expect(textOf("gaps", {}, long)).toMatch(/9 of 158 dates .* the filter stops at them\./);
    expect(textOf("gaps", { filter: "none" }, long)).toMatch(/they stay blank\.$/);
  });

  test("dates in a stretch too short for the filter are counted and told, and not where the filter fits", () => {
    expect(textOf("unfiltered", { longestDays: 540 }, long)).toMatch(
      /^70 of 149 dates with data have no value in the band/,
    );
    expect(textOf("unfiltered", { shortestDays: 60, longestDays: 200 }, long)).toBe("");
    expect(textOf("unfiltered", {}, short)).toBe("");
  });
});
