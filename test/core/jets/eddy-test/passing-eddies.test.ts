import { describe, expect, test } from "vitest";
import { drawEddies, eddyOcean, zonalMeanOf } from "../../../../core/jets/eddy-test/eddy-ocean";
import { crossingMeanPeak, mappedEddy, zonalMeanCurrent } from "../../../../core/jets/eddy-test/gaussian-eddy";
import { populationNorthwardVariance } from "../../../../core/jets/eddy-test/match-energy";
import { planOceans } from "../../../../core/jets/eddy-test/ocean-plan";
import { type EddyPopulation, overridePopulation, uniformPopulation } from "../../../../core/jets/eddy-test/population";
import { meanSquare, quantileAt, quantilesOf } from "../../../../core/jets/eddy-test/quantile-table";
import { Fault } from "../../../../core/model/errors";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { coriolisParameter } from "../../../../core/ocean/earth";
import { geostrophicVelocity } from "../../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../../core/ocean/grid-geometry";
import { expectAllClose, expectClose } from "../../../expect-close";
import { earth, heightField, meanWithError, seaOf } from "./made-seas";

const small = { south: 26, west: -150, step: 0.5, rows: 17, columns: 20, dates: 30, stepDays: 10 };
const usual = uniformPopulation({
  amplitudeMetres: 0.1,
  radiusMetres: 6e4,
  densityPerMillionKm2: 8,
  lifetimeDays: 120,
  speedMetresPerSecond: -0.04,
});
const ratioAt = (latitude: number) => 9.81 / coriolisParameter(latitude, earth.omega);

describe("one passing eddy", () => {
  test("crossing a meridian in 200 weeks leaves 3.382 mm/s at 30 degrees, one radius from its path", () => {
    const sector = seaOf({ south: 30, west: -140, step: 0.02, rows: 1, columns: 1, dates: 1401, stepDays: 1 });
    const radiusMetres = 6e4;
    // All amplitude for all the record: a life so long that its plateau outlasts it.
    const population = { ...usual, lifetimeDays: 1e5 };
    const middle = 30 - radiusMetres / ((earth.radius * Math.PI) / 180);
    const eddy = {
      amplitudeMetres: 0.1,
      radiusMetres,
      longitude: -140,
      latitude: middle,
      middleDay: 700,
      speedMetresPerSecond: -0.05,
    };
    const current = zonalMeanOf([eddy], planOceans(population, sector));
    const mean = current.reduce((sum, value) => sum + value, 0) / 1400;
    expectClose(mean, 3.382e-3, { relative: 0.01, because: "asked: 1 %" });
    expectClose(crossingMeanPeak(ratioAt(30), 0.1, 0.05, 1400), mean, { relative: 1e-3, because: "a sector of 2 km" });
  });

  test("a hill runs eastward on its poleward side, in both hemispheres", () => {
    for (const [latitude, poleward] of [
      [30, 5e4],
      [-30, -5e4],
    ]) {
      const shape = mappedEddy(0.1, 6e4, 0, { metres: 0, days: 0 });
      const place = { westMetres: -2e5, eastMetres: 2e5, northMetres: poleward };
      expect(zonalMeanCurrent(shape, place, ratioAt(latitude))).toBeGreaterThan(0);
    }
  });
});

describe("an ocean of passing eddies", () => {
  test("its zonal means are those of its height field, differenced and averaged", () => {
    const sea = seaOf({ south: 26, west: -150, step: 0.125, rows: 65, columns: 80, dates: 6, stepDays: 25 });
    const plan = planOceans(usual, sea);
    const eddies = drawEddies(plan, randomStream(3, 0));
    const closed = zonalMeanOf(eddies, plan);
    const axes = { latitude: sea.latitude, longitude: sea.longitude };
    const geometry = gridGeometry(axes, { ...earth, stencil: 7, equatorDegrees: 5 }, "test");
    // The ends of the columns are differenced one-sidedly.
    const [got, slow]: [number[], number[]] = [[], []];
    for (let t = 0; t < 6; t++) {
      const { u } = geostrophicVelocity(heightField(eddies, usual, sea, sea.days[t]), geometry);
      for (let row = 3; row < 62; row++) {
        slow.push(u.subarray(row * 80, (row + 1) * 80).reduce((sum, value) => sum + value, 0) / 80);
        got.push(closed[row * 6 + t]);
      }
    }
    expectAllClose(got, slow, {
      relative: 0.02,
      because: "the flat earth around an eddy: radius tan(latitude) / earth radius, 1 %, in width and share",
    });
  });

  test("the same stream gives the same ocean, another another", () => {
    const plan = planOceans(usual, seaOf(small));
    expect(eddyOcean(plan, randomStream(9, 4))).toEqual(eddyOcean(plan, randomStream(9, 4)));
    expect(eddyOcean(plan, randomStream(9, 5))).not.toEqual(eddyOcean(plan, randomStream(9, 4)));
  });

  test("dates without data and rows of the equator's belt are NaN, land rows too", () => {
    const sea = seaOf({ ...small, south: 3 });
    sea.hasData[7] = 0;
    const ocean = new Uint8Array(small.rows * small.columns).fill(1).fill(0, 10 * small.columns, 11 * small.columns);
    const current = eddyOcean(planOceans(usual, { ...sea, ocean }), randomStream(1, 0));
    for (let row = 0; row < small.rows; row++) {
      for (let t = 0; t < small.dates; t++) {
        const blank = sea.latitude.values[row] < 5 || t === 7 || row === 10;
        expect(Number.isNaN(current[row * small.dates + t]), `row ${row}, date ${t}`).toBe(blank);
      }
    }
  });

  test("means over M eddies grow as the root of M", () => {
    const rmsAt = (density: number) => {
      const plan = planOceans({ ...usual, densityPerMillionKm2: density }, seaOf(small));
      const squares = Array.from({ length: 400 }, (_, i) => {
        const current = eddyOcean(plan, randomStream(11, i));
        const mean =
          current.subarray(8 * small.dates, 9 * small.dates).reduce((sum, value) => sum + value, 0) / small.dates;
        return mean * mean;
      });
      const { mean, error } = meanWithError(squares);
      return { rms: Math.sqrt(mean), error: error / (2 * Math.sqrt(mean)) };
    };
    const [few, many] = [rmsAt(4), rmsAt(16)];
    const spread = 2 * Math.hypot(few.error / few.rms, many.error / many.rms);
    expectClose(many.rms / few.rms, 2, { absolute: 4 * spread, because: "four standard errors of 400 oceans each" });
    expect(4 * spread).toBeLessThan(0.5);
  });

  test("is as energetic at the region's edges and on its first date as in its middle", () => {
    const plan = planOceans(usual, seaOf(small));
    const squares = { middle: [] as number[], edge: [] as number[], start: [] as number[] };
    for (let i = 0; i < 1500; i++) {
      const current = eddyOcean(plan, randomStream(13, i));
      // g/f and the width of the sector change with latitude: taken out.
      const at = (row: number, t: number) =>
        (current[row * small.dates + t] / plan.gravityOverCoriolis[row]) ** 2 *
        Math.cos((plan.setting.latitude.values[row] * Math.PI) / 180);
      squares.middle.push(at(8, 15));
      squares.edge.push((at(0, 15) + at(16, 15)) / 2);
      squares.start.push((at(8, 0) + at(8, 29)) / 2);
    }
    const middle = meanWithError(squares.middle);
    for (const each of [squares.edge, squares.start]) {
      const { mean, error } = meanWithError(each);
      expectClose(mean, middle.mean, {
        absolute: 4 * Math.hypot(error, middle.error),
        because: "four standard errors",
      });
    }
    expect(middle.error / middle.mean).toBeLessThan(0.05);
  });

  test("its northward current has the variance of the closed form, whatever the radius", () => {
    const population: EddyPopulation = { ...usual, radiusMetres: [4e4, 6e4, 9e4], amplitudeMetres: [0.04, 0.1, 0.12] };
    const sea = seaOf({ south: 26, west: -150, step: 0.25, rows: 33, columns: 40, dates: 1, stepDays: 10 });
    const plan = planOceans(population, sea);
    const geometry = gridGeometry(
      { latitude: sea.latitude, longitude: sea.longitude },
      { ...earth, stencil: 9, equatorDegrees: 5 },
      "test",
    );
    const squares = Array.from({ length: 250 }, (_, i) => {
      const eddies = drawEddies(plan, randomStream(17, i));
      const { v } = geostrophicVelocity(heightField(eddies, population, sea, 0), geometry);
      return v.reduce((sum, value) => sum + value * value, 0) / v.length;
    });
    const { mean, error } = meanWithError(squares);
    const wanted = populationNorthwardVariance(population, 30, ratioAt(30));
    expectClose(mean, wanted, {
      absolute: 4 * error,
      relative: 0.01,
      because: "four standard errors; g/f over 8 degrees",
    });
    expect(error / wanted).toBeLessThan(0.05);
  });

  test("white noise adds its variance and nothing else", () => {
    const sea = seaOf(small);
    const still = { ...usual, amplitudeMetres: [1e-9] };
    const current = eddyOcean(planOceans(still, { ...sea, noiseMetresPerSecond: 0.02 }), randomStream(2, 0));
    const variance = current.reduce((sum, value) => sum + value * value, 0) / current.length;
    expectClose(Math.sqrt(variance), 0.02, {
      relative: 4 / Math.sqrt(2 * 510),
      because: "four standard errors of 510 draws",
    });
  });
});

describe("a population", () => {
  test("takes numbers set by hand and says so, and leaves the rest", () => {
    const set = overridePopulation(
      { ...usual, amplitudeMetres: [0.02, 0.05, 0.1], notes: { ...usual.notes, radius: "fits" } },
      { medianAmplitudeMetres: 0.1, lifetimeDays: 90, speedMetresPerSecond: -0.02 },
    );
    expectAllClose(set.amplitudeMetres, [0.04, 0.1, 0.2], { relative: 1e-12, because: "a factor of two" });
    expect(set.lifetimeDays).toBe(90);
    expect(set.speedMetresPerSecond.values).toEqual([-0.02]);
    expect(set.densityPerMillionKm2).toBe(8);
    expect(set.notes).toMatchObject({ amplitude: "set by hand", lifetime: "set by hand", radius: "fits" });
  });

  test("no ocean is drawn from numbers that are not positive", () => {
    for (const set of [{ lifetimeDays: 0 }, { densityPerMillionKm2: -1 }, { medianRadiusMetres: Number.NaN }]) {
      expect(() => overridePopulation(usual, set)).toThrow(Fault);
    }
    expect(() => overridePopulation(usual, { speedMetresPerSecond: Number.NaN })).toThrow(/speed/);
  });

  test("quantiles of a sample give its own ends, median and mean square", () => {
    const sample = Float64Array.from({ length: 2001 }, (_, i) => (i / 2000) ** 2);
    const table = quantilesOf(sample);
    expect([table[0], quantileAt(table, 0.5), table[20]]).toEqual([0, 0.25, 1]);
    expectClose(meanSquare(table), 0.2, { relative: 0.01, because: "x^4 by twenty straight pieces" });
  });
});
