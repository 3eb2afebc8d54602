import { describe, expect, test } from "vitest";
import { areNeighbours, type FoundJet, jetScore } from "../../../../core/jets/eddy-test/found-jet";
import { judgeJets } from "../../../../core/jets/eddy-test/judge-jets";
import { eddyTestRange, mergeOceans, type OceanJets } from "../../../../core/jets/eddy-test/ocean-jets";
import { planOceans } from "../../../../core/jets/eddy-test/ocean-plan";
import { uniformPopulation } from "../../../../core/jets/eddy-test/population";
import { Fault } from "../../../../core/model/errors";
import { expectClose } from "../../../expect-close";
import { seaOf } from "./made-seas";
import { meanJets } from "./mean-jets";

const jet = (latitudeDegrees: number, speedMetresPerSecond: number, more: Partial<FoundJet> = {}): FoundJet => ({
  latitudeDegrees,
  direction: 1,
  speedMetresPerSecond,
  shareOfDates: 1,
  ...more,
});
const oceansOf = (...each: FoundJet[][]): OceanJets[] => each.map((jets, ocean) => ({ ocean, jets }));
const settings = { halfSpacingDegrees: 1.5, level: 0.05 };

describe("a jet held against oceans of eddies", () => {
  test("p counts the oceans with a jet as strong, near by and running the same way", () => {
    const oceans = oceansOf(
      [jet(30.2, 0.05)],
      [jet(30, 0.04), jet(29, 0.06), jet(31, 0.09)],
      [jet(30, 0.09, { direction: -1 })],
      [jet(31.6, 0.09)],
      [jet(30, 0.06, { shareOfDates: 0.25 })],
      [jet(28.5, 0.05)],
      [],
      [],
      [],
    );
    const [verdict] = judgeJets([jet(30, 0.05)], oceans, settings);
    expect(verdict).toMatchObject({ oceansAsStrong: 3, oceans: 9, p: 0.4, adjustedP: 0.4, leads: true });
    expect(verdict.verdict).toBe("not told apart from eddies");
  });

  test("fast for a quarter of the dates is as good as half as fast for all of them", () => {
    expectClose(jetScore(jet(0, 0.1, { shareOfDates: 0.25 })), jetScore(jet(0, 0.05)), {
      relative: 1e-15,
      because: "0.1 · 0.5",
    });
  });

  test("neighbours run the same way within half a spacing", () => {
    expect(areNeighbours(jet(30, 1), jet(31.5, 1), 1.5)).toBe(true);
    expect(areNeighbours(jet(30, 1), jet(31.6, 1), 1.5)).toBe(false);
    expect(areNeighbours(jet(30, 1), jet(30, 1, { direction: -1 }), 1.5)).toBe(false);
  });

  test("p values are corrected over neighbourhoods, each led by its highest score (Benjamini & Hochberg)", () => {
    // Ranks of scores among 99 oceans that all have one jet everywhere, of speeds 1 … 99 mm/s.
    const places = [20, 24, 28, 32];
    const oceans = oceansOf(...Array.from({ length: 99 }, (_, i) => places.map((place) => jet(place, (i + 1) / 1000))));
    const found = [jet(20, 0.0985), jet(24, 0.0975), jet(28, 0.0905), jet(32, 0.05), jet(20.5, 0.098)];
    const verdicts = judgeJets(found, oceans, settings);
    expect(verdicts.map(({ p }) => p)).toEqual([0.02, 0.03, 0.1, 0.51, 0.03]);
    expect(verdicts.map(({ leads }) => leads)).toEqual([true, true, true, true, false]);
    const close = { absolute: 1e-12, because: "m p / k by hand" };
    [0.06, 0.06, 0.4 / 3, 0.51, 0.06].forEach((wanted, i) => {
      expectClose(verdicts[i].adjustedP, wanted, close, `jet ${i}`);
    });
    expect(verdicts.map(({ verdict }) => verdict === "held")).toEqual([false, false, false, false, false]);
    const lenient = judgeJets(found, oceans, { ...settings, level: 0.07 });
    expect(lenient.map(({ verdict }) => verdict === "held")).toEqual([true, true, false, false, true]);
  });

  test("no oceans and no spacing are faults; no jets are none judged", () => {
    expect(() => judgeJets([jet(30, 1)], [], settings)).toThrow(/at least one ocean/);
    expect(() => judgeJets([jet(30, 1)], oceansOf([]), { ...settings, halfSpacingDegrees: Number.NaN })).toThrow(Fault);
    expect(judgeJets([], oceansOf([]), settings)).toEqual([]);
  });
});

describe("oceans shared out over workers", () => {
  const sea = seaOf({ south: 26, west: -150, step: 0.5, rows: 17, columns: 20, dates: 20, stepDays: 15 });
  const plan = planOceans(
    uniformPopulation({
      amplitudeMetres: 0.1,
      radiusMetres: 6e4,
      densityPerMillionKm2: 8,
      lifetimeDays: 120,
      speedMetresPerSecond: -0.04,
    }),
    sea,
  );
  const chain = meanJets(sea.latitude.values, 20, 3);
  const range = (from: number, to: number) => eddyTestRange(plan, chain, { from, to, seed: 4 });

  test("any split, joined in any order, gives the same oceans", () => {
    const whole = range(0, 12);
    expect(mergeOceans([range(7, 12), range(0, 3), range(3, 7)])).toEqual(whole);
    expect(structuredClone(whole)).toEqual(whole);
    expect(new Set(whole.map(({ jets }) => JSON.stringify(jets))).size).toBe(12);
  });

  test("a missing or repeated ocean is an internal fault", () => {
    expect(() => mergeOceans([range(0, 2), range(3, 4)])).toThrow(/expected ocean 2/);
    expect(() => mergeOceans([range(0, 2), range(1, 3)])).toThrow(Fault);
  });

  test("the caller is asked before every ocean and can stop the work", () => {
    let asked = 0;
    const poll = () => {
      if (++asked === 4) throw new Fault({ tag: "cancelled", where: "eddyTest", expected: "", got: "", advice: "" });
    };
    expect(() => eddyTestRange(plan, chain, { from: 0, to: 100, seed: 4 }, poll)).toThrow(Fault);
    expect(asked).toBe(4);
  });
});
