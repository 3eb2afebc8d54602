import { randomStream } from "../../numeric/statistics/random";
import { eddyOcean } from "./eddy-ocean";
import { areNeighbours, type FoundJet, type JetChain } from "./found-jet";
import { type JudgeSettings, judgeJets } from "./judge-jets";
import type { OceanJets } from "./ocean-jets";
import type { OceanPlan } from "./ocean-plan";

/** A jet laid over an ocean: speed · exp(-y² / 2 width²), all record long. */
export interface TrialJet {
  readonly latitudeDegrees: number;
  readonly direction: 1 | -1;
  /** Standard deviation of the profile, degrees of latitude. */
  readonly widthDegrees: number;
  /** Factor on the speed by day: 1 for a steady jet, a slow wave where the chain takes the mean off. */
  readonly strengthAt: (day: number) => number;
}

export interface PowerPoint {
  readonly speedMetresPerSecond: number;
  /** Share of trials in which a jet at the trial jet's place was held. */
  readonly held: number;
  readonly trials: number;
}

/**
 * How often the test holds a jet of a given speed among the eddies of the plan: each trial is a fresh ocean (streams `from`
 * upward of the seed, the same for every speed) with the jet added, judged against `oceans`.
 */
export function detectionPower(
  plan: OceanPlan,
  chain: JetChain,
  oceans: readonly OceanJets[],
  jet: TrialJet,
  speedsMetresPerSecond: readonly number[],
  settings: JudgeSettings & { readonly seed: number; readonly from: number; readonly trials: number },
  poll: () => void = () => undefined,
): PowerPoint[] {
  const held = new Float64Array(speedsMetresPerSecond.length);
  const place: FoundJet = { ...jet, speedMetresPerSecond: 0, shareOfDates: 1 };
  for (let trial = 0; trial < settings.trials; trial++) {
    const eddies = eddyOcean(plan, randomStream(settings.seed, settings.from + trial));
    speedsMetresPerSecond.forEach((speed, i) => {
      poll();
      const found = chain(withJet(eddies, plan, jet, speed));
      const verdicts = judgeJets(found, oceans, settings);
      const seen = found.some(
        (each, j) => verdicts[j].verdict === "held" && areNeighbours(each, place, settings.halfSpacingDegrees),
      );
      if (seen) held[i]++;
    });
  }
  return speedsMetresPerSecond.map((speedMetresPerSecond, i) => ({
    speedMetresPerSecond,
    held: held[i] / settings.trials,
    trials: settings.trials,
  }));
}

function withJet(zonal: Float64Array, plan: OceanPlan, jet: TrialJet, speed: number): Float64Array {
  const { latitude, days } = plan.setting;
  const strength = days.map(jet.strengthAt);
  const out = Float64Array.from(zonal);
  for (let row = 0; row < latitude.values.length; row++) {
    const away = (latitude.values[row] - jet.latitudeDegrees) / jet.widthDegrees;
    const core = jet.direction * speed * Math.exp(-0.5 * away * away);
    for (let t = 0; t < days.length; t++) out[row * days.length + t] += core * strength[t];
  }
  return out;
}
