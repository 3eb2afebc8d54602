import { faultLine } from "../../../core/model/errors";
import type { JetsAnalysis } from "./jets-analysis";

/** Headline numbers of jets and eddy test for summary.json. */
export function jetsSummary({ jets, eddyTest, missing }: JetsAnalysis): object {
  const quantified = (value: number, unit: string) => ({ value: Number.isFinite(value) ? value : null, unit });
  return {
    ...(missing ? { notMade: faultLine(missing) } : {}),
    ...(jets
      ? {
          found: jets.jets.length,
          shorterLines: jets.shorterLines,
          prominence: quantified(jets.prominence, "m s-1"),
          spacing: quantified(jets.spacingKm, "km"),
          latitudesAboveRedNoise: jets.redNoiseHeld.band.reduce((sum, flag) => sum + flag, 0),
        }
      : {}),
    ...(eddyTest
      ? {
          eddyTest: {
            held: eddyTest.verdicts.filter(({ verdict }) => verdict === "held").length,
            jets: eddyTest.verdicts.length,
            tests: eddyTest.verdicts.filter(({ leads }) => leads).length,
            oceans: eddyTest.oceans,
            seed: eddyTest.seed,
            level: eddyTest.level,
            neighbourhood: quantified(2 * eddyTest.halfSpacingDegrees, "degrees"),
            population: eddyTest.population,
          },
        }
      : {}),
  };
}
