import { describe, expect, test } from "vitest";
import { describeJet } from "../../../core/jets/describe-jet";
import { defaultFollowSettings } from "../../../core/jets/follow/follow-jets";
import { type FollowedJet, followJets } from "../../../core/jets/follow/jet-lines";
import { defaultProminence } from "../../../core/jets/ridges/find-extremes";
import { findRidges } from "../../../core/jets/ridges/find-ridges";
import { expectClose } from "../../expect-close";
import { sphere } from "./earths";
import { type MadeField, type MadeJet, madeField, yearDays } from "./made-field";

const dates = 260;
const jets: readonly MadeJet[] = [
  { latitude: 23.1, driftDegreesPerYear: 0, speed: 0.08, spread: 0.6, from: 0, to: 259 },
  { latitude: 26.0, driftDegreesPerYear: 0.3, speed: -0.07, spread: 0.5, from: 0, to: 259 },
  { latitude: 30.6, driftDegreesPerYear: -0.2, speed: 0.1, spread: 0.7, from: 60, to: 199 },
  { latitude: 34.4, driftDegreesPerYear: 0.1, speed: -0.06, spread: 0.6, from: 0, to: 150 },
  { latitude: 37.3, driftDegreesPerYear: -0.3, speed: 0.07, spread: 0.6, from: 100, to: 259 },
];

function followed({ latitude, days, matrix }: MadeField): FollowedJet[] {
  const settings = { leastProminence: defaultProminence(matrix), againstFlow: false };
  const ridges = findRidges(matrix, latitude, days, settings, sphere);
  return followJets(ridges, latitude, defaultFollowSettings(0.25), sphere);
}

function longLived(field: MadeField): FollowedJet[] {
  return followed(field).filter((jet) => jet.dates.length >= 30);
}

function summaryOf(jet: FollowedJet, count = dates) {
  const hasData = new Uint8Array(count).fill(1);
  return describeJet(jet, { hasData, stepDays: 7, yearDays, earth: sphere, extents: [] });
}

describe.each([1, 2, 3, 4])("five made jets under noise a tenth of their speed, seed %i", (seed) => {
  const found = longLived(madeField(jets, dates, 0.007, 0, seed));

  test("all five are found, and nothing else lives as long", () => {
    expect(found.map(({ sign }) => sign).sort()).toEqual(jets.map(({ speed }) => Math.sign(speed)).sort());
    expect(found).toHaveLength(jets.length);
  });

  test.each(jets)("the jet that starts at $latitude lies, flows, begins and ends where it was made to", (made) => {
    const middle = made.latitude + (made.driftDegreesPerYear * 7 * (made.from + made.to)) / 2 / yearDays;
    const jet = found.find(
      ({ sign, latitudes }) => sign === Math.sign(made.speed) && Math.abs(latitudes[0] - made.latitude) < 0.8,
    );
    if (!jet) return expect.fail("not found");
    const summary = summaryOf(jet);
    const thirdOfCell = { absolute: 0.25 / 3, because: "a third of a cell, as promised" };
    expectClose(summary.meanLatitude, middle, thirdOfCell, "mean latitude");
    expectClose(
      summary.meanSpeed,
      made.speed,
      { absolute: 0.007, because: "the highest of noisy rows is taken, which lifts it by up to the noise" },
      "speed",
    );
    expectClose(jet.dates[0], made.from, { absolute: 1, because: "noise may hide the first" }, "first");
    expectClose(jet.dates[jet.dates.length - 1], made.to, { absolute: 1, because: "noise may prolong it" }, "last");
    expect(jet.beginning.kind).toBe(made.from === 0 ? "record start" : "birth");
    expect(jet.ending.kind).toBe(made.to === dates - 1 ? "record end" : "end");
    expect(summary.shareOfDaysPresent).toBeGreaterThan(0.95);
    const slow = { absolute: 0.03, because: "a third of a cell over the shortest of the lives" };
    expectClose(summary.driftDegreesPerYear.value, made.driftDegreesPerYear, slow, "drift");
  });
});

test("without noise the width of a Gaussian jet is its full width at half height", () => {
  const [jet] = followed(madeField([jets[0]], 3, 0, 0, 1));
  const wanted = 2 * Math.sqrt(2 * Math.log(2)) * 0.6 * 111.19492664;
  expectClose(summaryOf(jet, 3).meanWidthKm, wanted, {
    relative: 0.02,
    because: "straight lines between rows; core off the grid",
  });
});

describe("limits of drift", () => {
  test.each([
    ["white noise on the field", 0.01, 0, 1],
    ["cores that wander with a memory of weeks", 0.003, 0.15, 2],
  ] as const)("hold the true drift for at least 90 of 100 seeds: %s", (_, noise, wander, run) => {
    const made: MadeJet = { latitude: 28, driftDegreesPerYear: 0.25, speed: 0.08, spread: 0.6, from: 0, to: 199 };
    let held = 0;
    for (let seed = 0; seed < 100; seed++) {
      const found = followed(madeField([made], 200, noise, wander, 1000 * run + seed));
      const jet = found.reduce((longest, each) => (each.dates.length > longest.dates.length ? each : longest));
      const { low95, high95 } = summaryOf(jet, 200).driftDegreesPerYear;
      if (low95 <= made.driftDegreesPerYear && made.driftDegreesPerYear <= high95) held++;
    }
    expect(held).toBeGreaterThanOrEqual(90);
  });
});
