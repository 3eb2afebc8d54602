import { describe, expect, test } from "vitest";
import type { HeightAnomalies } from "../../../../core/jets/eddy-test/drift";
import { drawEddies, type PassingEddy } from "../../../../core/jets/eddy-test/eddy-ocean";
import { estimatePopulation, longRossbySpeed } from "../../../../core/jets/eddy-test/estimate-population";
import { defaultEddySearch, findEddies } from "../../../../core/jets/eddy-test/find-eddies";
import { localGrid } from "../../../../core/jets/eddy-test/local-grid";
import {
  matchEnergy,
  northwardVariance,
  populationNorthwardVariance,
} from "../../../../core/jets/eddy-test/match-energy";
import { planOceans } from "../../../../core/jets/eddy-test/ocean-plan";
import { uniformPopulation } from "../../../../core/jets/eddy-test/population";
import { meanSquare, quantileAt } from "../../../../core/jets/eddy-test/quantile-table";
import { Fault } from "../../../../core/model/errors";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { gridGeometry } from "../../../../core/ocean/grid-geometry";
import { expectClose } from "../../../expect-close";
import { earth, heightField, seaOf } from "./made-seas";

const sea = seaOf({ south: 22, west: -150, step: 0.25, rows: 48, columns: 96, dates: 150, stepDays: 6 });
const axes = { latitude: sea.latitude, longitude: sea.longitude };
const grid = localGrid(axes, earth);
const truth = uniformPopulation({
  amplitudeMetres: 0.12,
  radiusMetres: 6e4,
  densityPerMillionKm2: 5,
  lifetimeDays: 150,
  speedMetresPerSecond: -0.04,
});

/** Anomalies about the record's mean of a sea of passing eddies, with a standing pattern added. */
function madeSea(standing: (latitude: number) => number): HeightAnomalies {
  const eddies = drawEddies(planOceans(truth, sea), randomStream(21, 0));
  const planes = Array.from(sea.days, (day) => heightField(eddies, truth, sea, day));
  const mean = planes[0].map((_, cell) => planes.reduce((sum, plane) => sum + plane[cell], 0) / planes.length);
  const plane = (date: number) =>
    planes[date].map((height, cell) => height - mean[cell] + standing(sea.latitude.values[Math.floor(cell / 96)]));
  return { dates: sea.days.length, stepDays: 6, hasData: sea.hasData, plane };
}

const heights = madeSea(() => 0);
const estimate = estimatePopulation(heights, axes, earth);

describe("eddies on a single map", () => {
  const alone = (eddy: Partial<PassingEddy>) =>
    heightField(
      [
        {
          amplitudeMetres: 0.1,
          radiusMetres: 6e4,
          longitude: -138,
          latitude: 28,
          middleDay: 0,
          speedMetresPerSecond: 0,
          ...eddy,
        },
      ],
      truth,
      sea,
      0,
    );

  test.each([
    [0.1, 5e4],
    [-0.2, 6e4],
    [0.05, 9e4],
  ])("a lone eddy of %f m and %f m radius is found with both within 4 %", (amplitudeMetres, radiusMetres) => {
    const { eddies } = findEddies(alone({ amplitudeMetres, radiusMetres }), grid, defaultEddySearch);
    const strongest = [...eddies].sort((a, b) => Math.abs(b.amplitudeMetres) - Math.abs(a.amplitudeMetres))[0];
    const close = { relative: 0.04, because: "the zonal mean, some 5 % of the eddy at its own latitude, is off" };
    expectClose(strongest.radiusMetres, radiusMetres, close, "radius");
    expectClose(strongest.amplitudeMetres, amplitudeMetres, { ...close, relative: 0.08 }, "amplitude");
    expect(grid.longitudeDegrees[strongest.column]).toBe(-138);
    expect(grid.latitudeDegrees[strongest.row]).toBe(28);
  });

  test("a zonal jet is no eddy", () => {
    const jet = Float64Array.from(
      { length: 48 * 96 },
      (_, i) => 0.3 * Math.tanh((sea.latitude.values[Math.floor(i / 96)] - 28) / 1),
    );
    expect(findEddies(jet, grid, defaultEddySearch).eddies).toEqual([]);
  });

  test("nothing is found, or counted as searched, within two cells of land or gaps", () => {
    const plane = alone({});
    const whole = findEddies(plane, grid, defaultEddySearch).searchedKm2;
    const centre = findEddies(plane, grid, defaultEddySearch).eddies[0];
    plane[(centre.row + 2) * 96 + centre.column] = Number.NaN;
    const left = findEddies(plane, grid, defaultEddySearch);
    expect(left.eddies.some(({ row, column }) => row === centre.row && column === centre.column)).toBe(false);
    const lost = 25 * grid.cellKm2[centre.row];
    expectClose(whole - left.searchedKm2, lost, { relative: 0.03, because: "cells narrow northward" });
  });
});

describe("a population estimated from a made sea", () => {
  test("has the sizes, the number, the speed and the lifetime it was made with", () => {
    const because = "what a simple estimate can do among overlapping, growing and decaying eddies";
    expectClose(quantileAt(estimate.amplitudeMetres, 0.5), 0.12, { relative: 0.15, because }, "amplitude");
    expectClose(quantileAt(estimate.radiusMetres, 0.5), 6e4, { relative: 0.08, because }, "radius");
    expectClose(
      estimate.densityPerMillionKm2,
      5,
      { relative: 0.4, because: "weak and crowded eddies are missed" },
      "number",
    );
    for (const speed of estimate.speedMetresPerSecond.values) {
      expectClose(speed, -0.04, { relative: 0.1, because }, "speed");
    }
    expectClose(estimate.lifetimeDays, 150, { relative: 0.12, because }, "lifetime");
    expectClose(estimate.shareHigh, 0.5, { absolute: 0.12, because: "few independent eddies" }, "share of hills");
    expect(estimate.notes.lifetime).toMatch(/resembles itself by 1\/e after [\d.]+ days/);
  });

  test("matched in energy, number times squared amplitude is the truth's", () => {
    const geometry = gridGeometry(axes, { ...earth, stencil: 9, equatorDegrees: 5 }, "test");
    const dates = Array.from({ length: 50 }, (_, i) => i * 3);
    const variance = northwardVariance(heights.plane, dates, geometry);
    const matched = matchEnergy(estimate, variance, geometry);
    const product = matched.densityPerMillionKm2 * meanSquare(matched.amplitudeMetres);
    expectClose(product, 5 * 0.12 ** 2, {
      relative: 0.15,
      because: "some 60 eddies in the whole record set the truth",
    });
    const rows = [...geometry.latitude.keys()];
    const model = rows.reduce((sum, row) => {
      const ratio = geometry.gravity[row] / geometry.coriolis[row];
      return sum + populationNorthwardVariance(matched, geometry.latitude[row], ratio);
    }, 0);
    const data = variance.reduce((sum, value) => sum + value, 0);
    expectClose(model, data, { relative: 0.02, because: "belts joined by straight lines" });
  });

  test("a standing jet of 15 cm changes neither speed nor lifetime nor energy", () => {
    const striped = madeSea((latitude) => 0.15 * Math.sin((2 * Math.PI * latitude) / 4));
    const other = estimatePopulation(striped, axes, earth);
    const because = "zonal means are taken off to rounding";
    expectClose(other.lifetimeDays, estimate.lifetimeDays, { relative: 1e-9, because });
    expectClose(other.densityPerMillionKm2, estimate.densityPerMillionKm2, { relative: 1e-9, because });
    const geometry = gridGeometry(axes, { ...earth, stencil: 7, equatorDegrees: 5 }, "test");
    const [withJet, without] = [striped, heights].map(({ plane }) => northwardVariance(plane, [40, 90], geometry));
    expectClose(withJet[20], without[20], { relative: 1e-9, because: "a jet has no northward current" });
  });

  test("a sea without eddies is refused with what to do", () => {
    const calm = { ...heights, plane: () => new Float64Array(48 * 96) };
    expect(() => estimatePopulation(calm, axes, earth)).toThrow(Fault);
    expect(() => estimatePopulation(calm, axes, earth)).toThrow(/set the eddies by hand/);
  });

  test("a cancelled estimate stops", () => {
    const stop = () => {
      throw new Fault({ tag: "cancelled", where: "", expected: "", got: "", advice: "" });
    };
    expect(() => estimatePopulation(heights, axes, earth, undefined, stop)).toThrow(Fault);
  });

  test("where nothing can be followed the long Rossby speed stands in", () => {
    // Each date another sea: nothing resembles itself later.
    const restless = {
      ...heights,
      plane: (date: number) => heightField(drawEddies(planOceans(truth, sea), randomStream(40, date)), truth, sea, 450),
    };
    const { speedMetresPerSecond, notes } = estimatePopulation(restless, axes, earth);
    expect(notes.speed).toMatch(/long Rossby speed in \d+ of \d+ belts/);
    const last = speedMetresPerSecond.latitudesDegrees.length - 1;
    const values = speedMetresPerSecond.values.map(
      (speed, i) => speed - longRossbySpeed(speedMetresPerSecond.latitudesDegrees[i], earth, 2.7),
    );
    expect(values.filter((difference) => difference === 0).length).toBeGreaterThan(last / 2);
    // 40 km at 30 degrees: -3.172 cm/s, with c = 40 km times f.
    const wave = 4e4 * 7.292115e-5;
    expectClose(longRossbySpeed(30, earth, wave), -0.03172, { relative: 1e-3, because: "four digits" });
  });
});
