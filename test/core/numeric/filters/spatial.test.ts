import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { bandResponse, filterSeries, lanczosFilter, weightShare } from "../../../../core/numeric/band-filter";
import { meridionalRadiusMetres } from "../../../../core/numeric/ellipsoid";
import { filterMeridional } from "../../../../core/numeric/filters/meridional";
import { FilterRefusal } from "../../../../core/numeric/filters/refusal";
import { kernelAt, type PlaneGeometry } from "../../../../core/numeric/filters/spatial";
import { filterZonal } from "../../../../core/numeric/filters/zonal";
import { removeZonalMean } from "../../../../core/numeric/filters/zonal-mean";
import { expectAllClose, expectClose } from "../../../expect-close";

const radius = 6371000;
const degree = Math.PI / 180;

function sphere(south: number, rows: number, columns: number, step: number, periodic = false): PlaneGeometry {
  const latitudes = Float64Array.from({ length: rows }, (_, row) => (south + row * step) * degree);
  return {
    rows,
    columns,
    northMetres: latitudes.map((latitude) => radius * latitude),
    eastSpacingMetres: latitudes.map((latitude) => radius * Math.cos(latitude) * step * degree),
    periodic,
  };
}

function planeOf({ rows, columns }: PlaneGeometry, value: (row: number, column: number) => number): Float64Array {
  return Float64Array.from({ length: rows * columns }, (_, i) => value(Math.floor(i / columns), i % columns));
}

function known(series: Float64Array): Uint8Array {
  return Uint8Array.from(series, (value) => (Number.isNaN(value) ? 0 : 1));
}

const sameSums = { absolute: 1e-12, because: "the same sums; the outermost weight is a rounded zero" };
const band = { shortestKilometres: 200, longestKilometres: 500 };
const bands = [band, { ...band, longestKilometres: null }, { ...band, shortestKilometres: null }];

describe("zonal filter", () => {
  test("a wave of a given length in kilometres is passed alike at every latitude", () => {
    // 0.25 degree cells at 0 to 70 degrees: 27.8 to 9.5 km; the wavelength is 300 km along each parallel.
    const geometry = sphere(0, 71, 240, 1, false);
    const fine = { ...geometry, eastSpacingMetres: geometry.eastSpacingMetres.map((metres) => metres / 4) };
    const plane = planeOf(fine, (row, column) =>
      Math.cos((2 * Math.PI * (column - 120) * fine.eastSpacingMetres[row]) / 3e5),
    );
    const { values, share } = filterZonal(plane, fine, band);
    for (let row = 0; row < 71; row++) {
      const centre = row * 240 + 120;
      expectClose(share[centre], 1, { absolute: 1e-12, because: "all the weight lies on data" });
      expectClose(values[centre], values[120], {
        absolute: 0.01,
        because: "the kernel is sampled at 18 to 52 points a side",
      });
    }
  });

  test("where cut-offs are whole numbers of cells it is the filter of time", () => {
    const geometry = { ...sphere(10, 3, 120, 0.5), eastSpacingMetres: Float64Array.of(50_000, 25_000, 20_000) };
    const plane = planeOf(geometry, (row, column) => ((column * 7919 + row * 101) % 1009) / 1009);
    plane.fill(Number.NaN, 40, 47).fill(Number.NaN, 160, 163);
    for (const each of bands) {
      const { values, share } = filterZonal(plane, geometry, each);
      for (let row = 0; row < 3; row++) {
        const cells = (km: number | null) => km && (km * 1000) / geometry.eastSpacingMetres[row];
        const filter = lanczosFilter({
          shortestSamples: cells(each.shortestKilometres),
          longestSamples: cells(each.longestKilometres),
        });
        const line = plane.slice(row * 120, (row + 1) * 120);
        const wanted = filterSeries(line, filter);
        expectAllClose(share.subarray(row * 120, (row + 1) * 120), weightShare(filter, known(line)), sameSums);
        expectAllClose(values.subarray(row * 120, (row + 1) * 120), wanted, {
          absolute: 1e-12,
          because: "the same sums; the outermost weight is a rounded zero",
        });
      }
    }
  });

  test("round the turn it equals a direct sum over many turns, gaps included", () => {
    const geometry = sphere(70, 4, 40, 2.25, true);
    const turned = { ...geometry, eastSpacingMetres: geometry.eastSpacingMetres.map((metres) => metres / 8) };
    const plane = planeOf(turned, (row, column) => ((column * 7919 + row * 101) % 1009) / 1009);
    plane.fill(Number.NaN, 45, 52);
    const { values } = filterZonal(plane, turned, band);
    const lowPass = (row: number, column: number, cutoffMetres: number) => {
      let [sum, weight] = [0, 0];
      for (let offset = -2000; offset <= 2000; offset++) {
        const value = plane[row * 40 + ((((column + offset) % 40) + 40) % 40)];
        const kernel = kernelAt({ cutoffMetres, reachMetres: 5e5 }, offset * turned.eastSpacingMetres[row]);
        if (Number.isNaN(value)) continue;
        sum += kernel * value;
        weight += kernel;
      }
      return sum / weight;
    };
    const wanted = planeOf(turned, (row, column) => lowPass(row, column, 2e5) - lowPass(row, column, 5e5));
    expectAllClose(values, wanted, { absolute: 1e-12, because: "the same sums in another order" });
  });

  test("commutes with a turn of the globe", () => {
    const geometry = sphere(-30, 2, 72, 5, true);
    const near = { ...geometry, eastSpacingMetres: geometry.eastSpacingMetres.map((metres) => metres / 10) };
    const plane = planeOf(near, (row, column) => Math.sin(column) + ((column * 37 + row) % 11));
    plane[30] = Number.NaN;
    const turn = (values: Float64Array, by: number) =>
      planeOf(near, (row, column) => values[row * 72 + ((column + by) % 72)]);
    for (const by of [1, 17, 50]) {
      const turned = filterZonal(turn(plane, by), near, band).values;
      expectAllClose(turned, turn(filterZonal(plane, near, band).values, by), { absolute: 1e-12, because: "rounding" });
    }
  });

  test("on a row far shorter than the cut-off a periodic low-pass is the row's mean, an open one gives nothing", () => {
    for (const metres of [200, 6e-12, 0]) {
      const row = { rows: 1, columns: 60, northMetres: Float64Array.of(0), eastSpacingMetres: Float64Array.of(metres) };
      const plane = Float64Array.from({ length: 60 }, (_, column) => 3 + Math.cos((2 * Math.PI * column) / 60));
      const low = { shortestKilometres: 200, longestKilometres: null };
      const round = filterZonal(plane, { ...row, periodic: true }, low).values;
      expectAllClose(round, new Float64Array(60).fill(3), {
        absolute: 1e-12,
        because: "a whole cosine sums to nothing",
      });
      expect(filterZonal(plane, { ...row, periodic: false }, low).values.every(Number.isNaN)).toBe(true);
    }
  });
});

describe("meridional filter", () => {
  test("on an even grid it is the filter of time along each column, ends and gaps included", () => {
    const even = { ...sphere(0, 90, 3, 1), northMetres: Float64Array.from({ length: 90 }, (_, row) => row * 25_000) };
    const plane = planeOf(even, (row, column) => ((row * 7919 + column * 101) % 1009) / 1009);
    for (const hole of [10, 61, 64, 200]) plane[hole] = Number.NaN;
    for (const each of bands) {
      const cells = (km: number | null) => km && km / 25;
      const filter = lanczosFilter({
        shortestSamples: cells(each.shortestKilometres),
        longestSamples: cells(each.longestKilometres),
      });
      const { values, share } = filterMeridional(plane, even, each);
      for (let column = 0; column < 3; column++) {
        const series = Float64Array.from({ length: 90 }, (_, row) => plane[row * 3 + column]);
        const got = Float64Array.from({ length: 90 }, (_, row) => values[row * 3 + column]);
        expectAllClose(got, filterSeries(series, filter), sameSums);
        const shares = Float64Array.from({ length: 90 }, (_, row) => share[row * 3 + column]);
        expectAllClose(shares, weightShare(filter, known(series)), sameSums);
      }
    }
  });

  test("passes a wave in kilometres as its response says, on the ellipsoid and from north to south alike", () => {
    const rows = 160;
    const north = new Float64Array(rows);
    for (let row = 1; row < rows; row++) {
      const middle = (20 + 0.25 * (row - 0.5)) * degree;
      north[row] = north[row - 1] + meridionalRadiusMetres(middle) * 0.25 * degree;
    }
    const geometry = { ...sphere(20, rows, 1, 0.25), northMetres: north };
    const response = lanczosFilter({ shortestSamples: 200, longestSamples: 500 });
    for (const km of [120, 200, 300, 500, 900]) {
      const plane = planeOf(geometry, (row) => Math.cos((2 * Math.PI * (north[row] - north[80])) / (km * 1000)));
      const gain = bandResponse(response, 1 / km);
      const { values } = filterMeridional(plane, geometry, band);
      const because =
        "cells of 27.7 to 27.9 km against a response at one kilometre: the reach is not a whole number of cells";
      for (let row = 60; row < 100; row += 5) expectClose(values[row], gain * plane[row], { absolute: 0.006, because });
      const flipped = filterMeridional(
        plane.slice().reverse(),
        { ...geometry, northMetres: north.slice().reverse() },
        band,
      );
      expectAllClose(flipped.values.reverse(), values, { absolute: 1e-12, because: "rounding" });
    }
  });
});

describe("both axes", () => {
  const geometry = sphere(20, 24, 30, 0.25);
  const axes = [
    ["zonal", filterZonal],
    ["meridional", filterMeridional],
  ] as const;

  test.each(axes)("%s: a constant vanishes from the band, gaps or not", (_, filter) => {
    const plane = planeOf(geometry, () => 0.7);
    plane[12 * 30 + 15] = Number.NaN;
    const out = filter(plane, geometry, band).values;
    expectAllClose(
      out,
      out.map((value) => (Number.isNaN(value) ? value : 0)),
      { absolute: 1e-12, because: "rounding" },
    );
    expect(out.some(Number.isNaN)).toBe(false);
  });

  test("one missing cell changes its own line only, within the reach of 500 km", () => {
    const wide = sphere(20, 60, 70, 0.25);
    const plane = planeOf(wide, (row, column) => Math.sin(row / 3) + Math.cos(column / 5));
    const gappy = plane.slice();
    const [row, column] = [30, 35];
    gappy[row * 70 + column] = Number.NaN;
    for (const [name, filter] of axes) {
      const [a, b] = [plane, gappy].map((each) => filter(each, wide, band).values);
      const touched = [...a.keys()].filter((cell) => a[cell] !== b[cell]);
      expect(touched.length).toBeGreaterThan(20);
      expect(b.some(Number.isNaN)).toBe(false);
      for (const cell of touched) {
        const [down, across] = [Math.floor(cell / 70) - row, (cell % 70) - column];
        expect(name === "zonal" ? down : across).toBe(0);
        const metres =
          name === "zonal"
            ? across * wide.eastSpacingMetres[row]
            : wide.northMetres[row + down] - wide.northMetres[row];
        expect(Math.abs(metres)).toBeLessThan(500_000);
      }
    }
  });

  test.each(axes)("%s: is linear, and gives no value where hardly any data lie", (_, filter) => {
    const value = fc.double({ min: -5, max: 5, noNaN: true });
    const short = { shortestKilometres: 60, longestKilometres: 150 };
    fc.assert(
      fc.property(fc.array(fc.tuple(value, value), { minLength: 720, maxLength: 720 }), value, (both, p) => {
        const [a, b] = [0, 1].map((i) => Float64Array.from(both, (each) => each[i]));
        const [fa, fb] = [filter(a, geometry, short).values, filter(b, geometry, short).values];
        const mixed = filter(
          a.map((each, cell) => p * each + b[cell]),
          geometry,
          short,
        ).values;
        expectAllClose(
          mixed,
          fa.map((each, cell) => p * each + fb[cell]),
          { absolute: 1e-11, because: "rounding" },
        );
      }),
      { numRuns: 8 },
    );
    const lone = planeOf(geometry, () => Number.NaN);
    lone[300] = 1;
    expect(filter(lone, geometry, band).values.every(Number.isNaN)).toBe(true);
  });

  test.each(axes)("%s: refuses a wavelength under two cells and edges out of order", (_, filter) => {
    const plane = planeOf(geometry, () => 1);
    const run = (shortestKilometres: number, longestKilometres: number) => () =>
      filter(plane, geometry, { shortestKilometres, longestKilometres });
    expect(run(40, 500)).toThrow(FilterRefusal);
    expect(run(40, 500)).toThrow("at least two cells");
    expect(run(300, 200)).toThrow("above the shortest of 300 km");
    expect(run(-1, 200)).toThrow("above zero");
  });
});

describe("zonal mean", () => {
  test("a row less its mean sums to nothing over its valid cells, and keeps its gaps", () => {
    const plane = Float64Array.of(1, 2, Number.NaN, 6, 4, 4, 4, 4);
    const out = removeZonalMean(plane, 2, 4, null, 0.5);
    expectAllClose(out, [-2, -1, null, 3, 0, 0, 0, 0], { absolute: 1e-15, because: "whole numbers" });
  });

  test("a row with too few of its ocean cells is blanked, one cell alone as well; land does not count", () => {
    const plane = Float64Array.of(1, Number.NaN, Number.NaN, Number.NaN, 1, 3, Number.NaN, Number.NaN);
    expect(removeZonalMean(plane, 2, 4, null, 0.6).every(Number.isNaN)).toBe(true);
    const ocean = Uint8Array.of(1, 0, 0, 0, 1, 1, 0, 1);
    expectAllClose(removeZonalMean(plane, 2, 4, ocean, 0.6), [null, null, null, null, -1, 1, null, null], {
      absolute: 0,
      because: "whole numbers",
    });
  });
});
