import { Fault } from "../../model/errors";
import { randomStream } from "../../numeric/statistics/random";
import { eddyOcean } from "./eddy-ocean";
import type { FoundJet, JetChain } from "./found-jet";
import type { OceanPlan } from "./ocean-plan";

/** Jets that one random ocean showed. Plain data. */
export interface OceanJets {
  readonly ocean: number;
  readonly jets: readonly FoundJet[];
}

/**
 * Draws oceans `from` to `to` - 1 and runs the chain on each. Ocean i takes stream i of the seed: any sharing out over workers
 * gives the same oceans. `poll` is called before each; a throw from it ends the work.
 */
export function eddyTestRange(
  plan: OceanPlan,
  chain: JetChain,
  range: { readonly from: number; readonly to: number; readonly seed: number },
  poll: () => void = () => undefined,
): OceanJets[] {
  const out: OceanJets[] = [];
  for (let ocean = range.from; ocean < range.to; ocean++) {
    poll();
    const zonal = eddyOcean(plan, randomStream(range.seed, ocean));
    out.push({ ocean, jets: chain(zonal).map((jet) => ({ ...jet })) });
  }
  return out;
}

/** Joins what the workers drew, in order. Errors: Fault (tag "internal") where an ocean is missing or there twice. */
export function mergeOceans(parts: readonly (readonly OceanJets[])[]): OceanJets[] {
  const all = parts.flat().sort((a, b) => a.ocean - b.ocean);
  const wrong = all.findIndex(({ ocean }, i) => ocean !== all[0].ocean + i);
  if (wrong < 0) return all;
  throw new Fault({
    tag: "internal",
    where: "eddyTest",
    expected: `ocean ${all[0].ocean + wrong}`,
    got: `ocean ${all[wrong].ocean}`,
    advice: "please report this with the study that led to it",
  });
}
