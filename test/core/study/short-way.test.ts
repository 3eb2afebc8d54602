import { describe, test } from "vitest";
import { planeOf } from "../../../core/model/cube";
import { type BackgroundBasis, backgroundBasis, removeBackground } from "../../../core/numeric/background";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { planesFrom } from "../../../core/ocean/quantities/evaluate";
import { backgroundPlanes } from "../../../core/study/background-planes";
import { timeFilter } from "../../../core/study/band";
import { bandHeightPlane } from "../../../core/study/band-plane";
import { bandLatitudeTime } from "../../../core/study/latitude-time";
import { type HeightRecord, surveyValidity } from "../../../core/study/record";
import { zonalMeans } from "../../../core/study/reduction";
import { bandSettings } from "../../../core/study/schema";
import type { TimeFilter } from "../../../core/study/time-filter";
import { expectAllClose } from "../../expect-close";
import { evenAxes, sphere } from "../ocean/grids";

const [rows, columns, dates] = [14, 18, 160];
const cells = rows * columns;
const axes = evenAxes({ west: -150, south: 25, step: 0.5, columns, rows });
const geometry = gridGeometry(axes, sphere, "test");
const days = Float64Array.from({ length: dates }, (_, t) => 22000 + 3 * t);
const time = { kind: "time", values: days, step: 3, even: true, periodic: false, calendar: "standard" } as const;
const filters = (["lanczos", "butterworth", "running-mean"] as const).map((kind) => {
  const filter = timeFilter(bandSettings.parse({ filter: kind, shortestDays: 30, longestDays: 180, order: 2 }), time);
  if (!filter) throw new Error("no filter");
  return [kind, filter] as const;
});

/** Moving waves, an annual cycle, land in one corner; `holes` decides what else is missing. */
function makeRecord(holes: (t: number, cell: number) => boolean): HeightRecord {
  const values = new Float64Array(dates * cells);
  for (let t = 0; t < dates; t++) {
    for (let cell = 0; cell < cells; cell++) {
      const [row, column] = [Math.floor(cell / columns), cell % columns];
      const land = row < 4 && column > 13;
      const wave =
        0.1 * Math.sin(row / 2 + column / 3 - t / 7) +
        0.05 * Math.cos(row - t / 23) +
        0.01 * ((t * 37 + cell * 11) % 17);
      const slow = 0.04 * Math.cos((2 * Math.PI * days[t]) / 365.2425) + 1e-4 * t * row;
      values[t * cells + cell] = land || holes(t, cell) ? Number.NaN : 0.6 + wave + slow;
    }
  }
  const cube = { dates, rows, columns, values };
  return { cube, axes, time, ...surveyValidity(cube) };
}

function backgroundOf(record: HeightRecord): { basis: BackgroundBasis; coefficients: Float64Array } {
  const basis = backgroundBasis(days, { mean: true, trend: true, annual: true, semiannual: true }, 365.2425);
  const coefficients = new Float64Array(basis.names.length * cells);
  backgroundPlanes(record, basis, [0, 5], coefficients, () => {});
  backgroundPlanes(record, basis, [5, rows], coefficients, () => {});
  return { basis, coefficients };
}

/** The long way: background off and filter along every cell of a cube of planes. */
function filteredCube(planes: Float64Array[], basis: BackgroundBasis, filter: TimeFilter): Float64Array[] {
  const out = planes.map(() => new Float64Array(cells));
  for (let cell = 0; cell < cells; cell++) {
    const series = Float64Array.from(planes, (plane) => plane[cell]);
    const filtered = filter.apply(removeBackground(series, basis));
    out.forEach((plane, t) => {
      plane[cell] = filtered[t];
    });
  }
  return out;
}

describe.each(filters)("reducing first and filtering last, %s", (_kind, filter) => {
  const missingDates = (t: number) => t === 0 || (t > 60 && t < 66) || t === 120;

  test.each([
    ["without gaps", () => false],
    ["with whole dates missing", missingDates],
  ] as const)("band-passed maps equal the band-passed cube of velocities, %s", (_, holes) => {
    const record = makeRecord(holes);
    const background = backgroundOf(record);
    const every = Array.from({ length: dates }, (_, t) => planeOf(record.cube, t));
    for (const id of ["height", "u", "v", "vorticity", "rossby-number"]) {
      const long = filteredCube(
        every.map((plane) => planesFrom(plane, geometry)(id)),
        background.basis,
        filter,
      );
      for (const t of [2, 80, 159]) {
        const short = planesFrom(bandHeightPlane(record, t, filter, background), geometry)(id);
        expectAllClose(
          short,
          long[t],
          { relative: 1e-6, because: "the promise of the linear shortcut" },
          `${id} on ${t}`,
        );
      }
    }
  });

  test.each([
    ["without gaps", () => false],
    ["with whole dates missing", missingDates],
  ] as const)("the band-passed latitude–time picture equals zonal means of band-passed maps, %s", (_, holes) => {
    const record = makeRecord(holes);
    const background = backgroundOf(record);
    const zonal = new Float64Array(rows * dates);
    for (let t = 0; t < dates; t++) {
      zonalMeans(planesFrom(planeOf(record.cube, t), geometry)("u"), record, null).forEach((mean, row) => {
        zonal[row * dates + t] = mean;
      });
    }
    const at = Int32Array.from([3, 70, 100, 150]);
    const short = bandLatitudeTime(zonal, rows, filter, background.basis, record.hasData, at);
    at.forEach((t, i) => {
      const map = planesFrom(bandHeightPlane(record, t, filter, background), geometry)("u");
      const long = zonalMeans(map, record, null);
      const own = Float64Array.from({ length: rows }, (_, row) => short[row * at.length + i]);
      expectAllClose(own, long, { relative: 1e-6, because: "the promise of the linear shortcut" }, `date ${t}`);
    });
  });

  test("band-passed heights equal each cell's own filtered series when single cells are missing, and are missing with them", () => {
    const record = makeRecord((t, cell) => (t * 7 + cell * 3) % 29 === 0 || (cell === 77 && t > 40 && t < 70));
    const background = backgroundOf(record);
    const every = Array.from({ length: dates }, (_, t) => planeOf(record.cube, t));
    const long = filteredCube(every, background.basis, filter);
    for (const t of [0, 55, 90, 159]) {
      const short = bandHeightPlane(record, t, filter, background);
      expectAllClose(
        short,
        long[t].map((value, cell) => (Number.isNaN(every[t][cell]) ? Number.NaN : value)),
        { relative: 1e-6, because: "same weighted means, summed in another order" },
        `date ${t}`,
      );
    }
  });
});
