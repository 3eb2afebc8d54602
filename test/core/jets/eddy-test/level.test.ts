import { describe, expect, test } from "vitest";
import { detectionPower } from "../../../../core/jets/eddy-test/detection-power";
import type { FoundJet } from "../../../../core/jets/eddy-test/found-jet";
import { judgeJets, neighbourhoodDegrees } from "../../../../core/jets/eddy-test/judge-jets";
import { eddyTestRange } from "../../../../core/jets/eddy-test/ocean-jets";
import { planOceans } from "../../../../core/jets/eddy-test/ocean-plan";
import { uniformPopulation } from "../../../../core/jets/eddy-test/population";
import { expectClose } from "../../../expect-close";
import { seaOf } from "./made-seas";
import { meanJets } from "./mean-jets";

const dates = 60;
const sea = seaOf({ south: 25, west: -150, step: 0.5, rows: 31, columns: 30, dates, stepDays: 10 });
const plan = planOceans(
  uniformPopulation({
    amplitudeMetres: 0.08,
    radiusMetres: 6e4,
    densityPerMillionKm2: 10,
    lifetimeDays: 100,
    speedMetresPerSecond: -0.03,
  }),
  sea,
);
const chain = meanJets(sea.latitude.values, dates, 3);
const oceans = eddyTestRange(plan, chain, { from: 0, to: 2000, seed: 5 });

const halfSpacingDegrees = neighbourhoodDegrees(Number.NaN, oceans, 15);
const settings = { halfSpacingDegrees, level: 0.05 };

describe("the level of the eddy test", () => {
  test("of 1,000 records of eddies alone 5 % of the leading jets have p <= 0.05, and about 5 % have any jet held", () => {
    const records = eddyTestRange(plan, chain, { from: 2000, to: 3000, seed: 5 });
    let [leading, below, anyHeld] = [0, 0, 0];
    for (const { jets } of records) {
      const verdicts = judgeJets(jets, oceans, settings);
      for (const { leads, p } of verdicts) {
        if (leads) leading++;
        if (leads && p <= 0.05) below++;
      }
      if (verdicts.some(({ verdict }) => verdict === "held")) anyHeld++;
    }
    expect(leading).toBeGreaterThan(5000);
    const because = "asked: 5 % ± 1.5 %; 0.7 % is the standard error of 1,000 records";
    expectClose(below / leading, 0.05, { absolute: 0.015, because }, "jets");
    expect(anyHeld / records.length, "records").toBeLessThan(0.065);
    expect(anyHeld / records.length, "records").toBeGreaterThan(0.02);
  });

  test("a wider neighbourhood keeps the level; one half as wide doubles it, which is why none is narrower than the oceans' own", () => {
    const records = eddyTestRange(plan, chain, { from: 3000, to: 3400, seed: 5 });
    const levelAt = (halfSpacing: number) => {
      const verdicts = records.flatMap(({ jets }) =>
        judgeJets(jets, oceans, { level: 0.05, halfSpacingDegrees: halfSpacing }),
      );
      const leading = verdicts.filter(({ leads }) => leads);
      return leading.filter(({ p }) => p <= 0.05).length / leading.length;
    };
    const because = "asked: 5 % ± 1.5 %";
    expectClose(levelAt(neighbourhoodDegrees(4 * halfSpacingDegrees, oceans, 15)), 0.05, { absolute: 0.015, because });
    expect(levelAt(halfSpacingDegrees / 2)).toBeGreaterThan(0.08);
    expect(neighbourhoodDegrees(halfSpacingDegrees / 2, oceans, 15)).toBe(halfSpacingDegrees);
  });

  test("a fast steady jet is held nearly always, one slower than the eddies leave hardly ever, and faster never less often", () => {
    const jet = { latitudeDegrees: 32, direction: 1 as const, widthDegrees: 0.8, strengthAt: () => 1 };
    const power = detectionPower(plan, chain, oceans, jet, [0, 0.01, 0.02, 0.04, 0.08], {
      ...settings,
      seed: 6,
      from: 0,
      trials: 100,
    });
    const held = power.map((point) => point.held);
    expect(held[0]).toBeLessThan(0.06);
    expect(held[4]).toBeGreaterThan(0.95);
    held.slice(1).forEach((share, i) => {
      expect(share, `${power[i + 1].speedMetresPerSecond} m/s`).toBeGreaterThanOrEqual(held[i] - 0.02);
    });
  });

  test("an eddy population twice as energetic as the record's makes the test refuse more, never less", () => {
    const louder = planOceans({ ...plan.population, densityPerMillionKm2: 20 }, sea);
    const loudOceans = eddyTestRange(louder, chain, { from: 0, to: 500, seed: 5 });
    const found: FoundJet[] = eddyTestRange(plan, chain, { from: 4000, to: 4050, seed: 5 }).flatMap(({ jets }) => jets);
    const mean = (which: typeof oceans) =>
      judgeJets(found, which, settings).reduce((sum, { p }) => sum + p, 0) / found.length;
    expect(mean(loudOceans)).toBeGreaterThan(mean(oceans.slice(0, 500)));
  });
});
