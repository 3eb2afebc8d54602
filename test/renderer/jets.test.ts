import { describe, expect, test } from "vitest";
import type { OpenStudy } from "../../core/contract/engine";
import { studySchema } from "../../core/study/schema";
import { carriedJet, eddyTestKey, jetsKey, testStanding, withEddyTest } from "../../renderer/state/jets-state";
import { chanceText, lifeEndText, rateText, tooFewOceansText } from "../../renderer/views/latitudes/jets/jet-texts";
import {
  populationNumbers,
  shownNumber,
  withPopulationNumber,
} from "../../renderer/views/latitudes/jets/population-numbers";
import { mapOrder, sortJets, turnedOrder } from "../../renderer/views/latitudes/jets/sort-jets";
import { madeJet, madeJets, madeTest, madeVerdict } from "./made-jets";

function openStudy(change: object = {}): OpenStudy {
  const study = studySchema.parse({ strake: 1, grids: [{ id: "A", files: ["a.nc"] }], ...change });
  return { study, folder: "/made-up", path: "" };
}

const open = openStudy();

describe("what jets depend on", () => {
  test("band, background, currents, space, region and the search name other jets; eddies and height errors do not", () => {
    const key = jetsKey(open, "A");
    const others = [
      { band: { shortestDays: 60 } },
      { background: { mean: false } },
      { geostrophy: { stencil: 3 } },
      { space: { removeZonalMean: true } },
      { region: { west: -140, east: -130, south: 25, north: 35 } },
      { jets: { leastLifetimeDays: 30 } },
    ];
    for (const change of others) expect(jetsKey(openStudy(change), "A")).not.toBe(key);
    expect(jetsKey(open, "B")).not.toBe(key);
    expect(jetsKey(openStudy({ eddyTest: { oceans: 7 } }), "A")).toBe(key);
    expect(jetsKey(openStudy({ errors: { heightMetres: 0.02 } }), "A")).toBe(key);
  });
});

describe("a test's standing", () => {
  const { eddyTest } = open.study;
  const found = { open, grid: "A", key: "", result: madeJets("one", [madeJet()]) };
  const tested = { settings: eddyTestKey(eddyTest), result: madeTest("one", [madeVerdict(1, 0.01)]) };

  test("is current for the jets and eddies it was made with", () => {
    expect(testStanding(found, tested, eddyTest)).toBe("current");
    expect(testStanding(found, null, eddyTest)).toBe("none");
  });

  test("is stale for jets of another key, and current again when they are back", () => {
    const other = { ...found, result: madeJets("two", [madeJet()]) };
    expect(testStanding(other, tested, eddyTest)).toBe("stale");
    expect(testStanding(null, tested, eddyTest)).toBe("stale");
    expect(testStanding(found, tested, eddyTest)).toBe("current");
  });

  test("is stale where other eddies, oceans or another seed are asked for", () => {
    for (const change of [{ oceans: 20 }, { seed: 2 }, { population: { lifetimeDays: 40 } }]) {
      expect(testStanding(found, tested, withEddyTest(open, change).study.eddyTest)).toBe("stale");
    }
  });
});

describe("the lit jet", () => {
  const lit = madeJet({ id: 4, sign: -1, meanLatitude: 30 });

  test("goes on as the nearest of its direction when jets are found anew", () => {
    const after = [
      madeJet({ id: 1, sign: 1, meanLatitude: 30 }),
      madeJet({ id: 2, sign: -1, meanLatitude: 29.4 }),
      madeJet({ id: 3, sign: -1, meanLatitude: 30.3 }),
    ];
    expect(carriedJet([lit], after, 4)).toBe(3);
  });

  test("goes out where none is near, or none was lit", () => {
    expect(carriedJet([lit], [madeJet({ sign: -1, meanLatitude: 31.5 })], 4)).toBeNull();
    expect(carriedJet([lit], [lit], null)).toBeNull();
  });
});

describe("the order of the table", () => {
  const jets = [
    madeJet({ id: 1, meanLatitude: 22, meanSpeed: -0.09, sign: -1 }),
    madeJet({ id: 2, meanLatitude: 26, meanSpeed: 0.05 }),
    madeJet({ id: 3, meanLatitude: 30, meanSpeed: -0.02, sign: -1 }),
  ];
  const verdicts = new Map([madeVerdict(1, 0.2), madeVerdict(3, 0.004)].map((verdict) => [verdict.jet, verdict]));
  const ids = (order: Parameters<typeof sortJets>[2]) => sortJets(jets, verdicts, order).map(({ id }) => id);

  test("begins as the map has it and turns on a second press", () => {
    expect(ids(mapOrder)).toEqual([3, 2, 1]);
    expect(ids(turnedOrder(mapOrder, "latitude"))).toEqual([1, 2, 3]);
  });

  test("goes by the size of speeds, the strongest first", () => {
    expect(ids(turnedOrder(mapOrder, "speed"))).toEqual([1, 2, 3]);
  });

  test("puts the least chance first, and what was not tested last either way", () => {
    const order = turnedOrder(mapOrder, "eddies");
    expect(ids(order)).toEqual([3, 1, 2]);
    expect(ids(turnedOrder(order, "eddies"))).toEqual([1, 3, 2]);
  });
});

describe("jets in words", () => {
  test("chances keep a digit where they are small and never become nought", () => {
    expect([0.0004, 0.004, 0.0994, 0.0996, 0.23, 1, Number.NaN].map(chanceText)).toEqual([
      "<0.1\u00a0%",
      "0.4\u00a0%",
      "9.9\u00a0%",
      "10\u00a0%",
      "23\u00a0%",
      "100\u00a0%",
      "–",
    ]);
  });

  test("a drift stands with its limits, in real minus signs", () => {
    expect(rateText({ value: 0.2, low95: -0.1, high95: 0.5 }, 1, 2)).toBe("0.20 (−0.10 to 0.50)");
    expect(rateText({ value: Number.NaN, low95: Number.NaN, high95: Number.NaN }, 1, 2)).toBe("–");
  });

  test("the other jet of a split or a merger is named by its latitude", () => {
    const jets = [madeJet({ id: 7, meanLatitude: 33.8 })];
    const latitudeOf = (latitude: number) => `${latitude}°`;
    expect(lifeEndText("merger into 7", jets, latitudeOf)).toBe("merges into the jet at 33.8°");
    expect(lifeEndText("split from 9", jets, latitudeOf)).toBe("splits from a line not listed");
    expect(lifeEndText("record start", jets, latitudeOf)).toBe("with the record");
  });

  test("too few oceans are told of: n of them show no chance below 1 in n + 1, times the number of jets", () => {
    const verdicts = [1, 2, 3].map((jet) => madeVerdict(jet, 0.01));
    // Three jets at 5 %: 1 / 60 is the largest chance with which a lone jet is held.
    expect(tooFewOceansText({ ...madeTest("one", verdicts), oceans: 58 })).toMatch(/with 59 or more/);
    expect(tooFewOceansText({ ...madeTest("one", verdicts), oceans: 59 })).toBe("");
  });

  test("only the leading jets count as tests where too few oceans are told of", () => {
    const verdicts = [1, 2, 3, 4, 5].map((jet) => ({ ...madeVerdict(jet, 0.01), leads: jet < 3 }));
    // Two tests at 5 %: 1 / 40 is the largest chance with which a lone jet is held.
    expect(tooFewOceansText({ ...madeTest("one", verdicts), oceans: 38 })).toMatch(/with 39 or more.*among 2 leading/);
    expect(tooFewOceansText({ ...madeTest("one", verdicts), oceans: 39 })).toBe("");
  });
});

describe("numbers of the eddies", () => {
  test("come back as typed from what the study keeps, and a blank one leaves the study", () => {
    for (const number of populationNumbers) {
      for (const typed of [0.07, 1.1, 7, 29]) {
        const population = withPopulationNumber({}, number, typed);
        expect(shownNumber(number, population[number.key] ?? Number.NaN)).toBe(typed);
        expect(withPopulationNumber(population, number, null)).toEqual({});
      }
    }
  });

  test("are kept in SI units", () => {
    const [amplitude, radius] = populationNumbers;
    expect(withPopulationNumber({}, amplitude, 7)).toEqual({ medianAmplitudeMetres: 0.07 });
    expect(withPopulationNumber({}, radius, 85)).toEqual({ medianRadiusMetres: 85_000 });
  });
});
