import type { OpenStudy } from "../../core/contract/engine";
import { judgeJets, neighbourhoodDegrees } from "../../core/jets/eddy-test/judge-jets";
import { valueAtLatitude } from "../../core/jets/eddy-test/latitude-table";
import { mergeOceans } from "../../core/jets/eddy-test/ocean-jets";
import { quantileAt } from "../../core/jets/eddy-test/quantile-table";
import { Fault } from "../../core/model/errors";
import type { EddyTestResult } from "../../core/model/jets-result";
import { jetRules } from "../../core/study/jets/settings";
import { jetsResult } from "./jets";
import type { Job } from "./job";
import { fieldStages } from "./latitudes";
import type { Workspace } from "./workspace";

/** Oceans in one task: fixed, though the result does not depend on it. */
const oceansInTask = 5;
const kilometresPerDegree = 111.2;

/** Holds the record's jets against oceans of passing eddies. Errors: no jet to test, no eddies to estimate from. */
export async function eddyTestResult(
  workspace: Workspace,
  open: OpenStudy,
  grid: string,
  job: Job,
): Promise<EddyTestResult> {
  const { study } = open;
  const { oceans, seed, level } = study.eddyTest;
  const found = await jetsResult(workspace, open, grid, job);
  if (found.jets.length === 0) throw nothingToTest(study.jets.leastLifetimeDays);
  const { record, background } = await fieldStages(workspace, open, grid, { quantity: "u", inBand: true }, job);
  const settings = { band: study.band, jets: study.jets, geostrophy: study.geostrophy };
  const { axes, time, hasData, ocean } = record;
  const population = await job.step("Estimating the eddies", 1, () =>
    workspace.pool.run(
      "eddyPopulation",
      { record, study: { geostrophy: study.geostrophy, eddyTest: study.eddyTest } },
      job,
    ),
  );
  // The prominence the record was searched with, not each ocean's own.
  const rules = jetRules(
    { ...study.jets, prominence: found.prominence },
    new Float64Array(0),
    axes.latitude.step,
    time.step,
  );
  const parts = await job.step("Drawing oceans of eddies", oceans, () =>
    workspace.pool.share(
      "eddyOceans",
      oceans,
      ([from, to]) => ({
        record: { axes, time, hasData },
        settings,
        basis: background.basis,
        ocean,
        rules,
        population,
        range: { from, to, seed },
      }),
      job,
      Math.ceil(oceans / oceansInTask),
    ),
  );
  const drawn = mergeOceans(parts);
  const { values } = axes.latitude;
  const span = values[values.length - 1] - values[0];
  const halfSpacingDegrees = neighbourhoodDegrees(found.spacingKm / kilometresPerDegree, drawn, span);
  const weighed = found.jets.map((jet) => ({
    latitudeDegrees: jet.meanLatitude,
    direction: jet.sign,
    speedMetresPerSecond: Math.abs(jet.meanSpeed),
    shareOfDates: jet.shareOfRecord,
  }));
  const verdicts = judgeJets(weighed, drawn, { halfSpacingDegrees, level });
  const middle = (values[0] + values[values.length - 1]) / 2;
  return {
    key: found.key,
    seed,
    oceans,
    level,
    halfSpacingDegrees,
    verdicts: verdicts.map((verdict, i) => ({ jet: found.jets[i].id, ...verdict })),
    population: {
      medianAmplitudeMetres: quantileAt(population.amplitudeMetres, 0.5),
      medianRadiusMetres: quantileAt(population.radiusMetres, 0.5),
      densityPerMillionKm2: population.densityPerMillionKm2,
      lifetimeDays: population.lifetimeDays,
      speedMetresPerSecond: valueAtLatitude(population.speedMetresPerSecond, middle),
      shareHigh: population.shareHigh,
      notes: population.notes,
    },
  };
}

function nothingToTest(leastLifetimeDays: number): Fault {
  return new Fault({
    tag: "band",
    where: "eddyTest",
    expected: "at least one jet to test",
    got: "none in this band",
    advice: `widen the band, lower jets.prominence, or lower jets.leastLifetimeDays (${leastLifetimeDays} now)`,
  });
}
