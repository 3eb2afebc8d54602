import { Fault } from "../../model/errors";
import { falseDiscovery } from "../../numeric/statistics/false-discovery";
import { areNeighbours, type FoundJet, jetScore } from "./found-jet";
import type { OceanJets } from "./ocean-jets";

export interface JudgeSettings {
  /** A jet's neighbourhood reaches this far to either side; see `neighbourhoodDegrees`. */
  readonly halfSpacingDegrees: number;
  /** Share of eddy-only records in which any jet may be held wrongly. */
  readonly level: number;
}

export interface JetVerdict {
  /** Mean speed times root of the share of dates, m s-1. */
  readonly score: number;
  /** Oceans with a jet of this direction in the neighbourhood and at least this score. */
  readonly oceansAsStrong: number;
  readonly oceans: number;
  /** (1 + oceansAsStrong) / (1 + oceans). */
  readonly p: number;
  /** p corrected for the number of jets: held at any level down to this one. */
  readonly adjustedP: number;
  /** No jet of the record in its neighbourhood scores higher: only such jets count as tests. */
  readonly leads: boolean;
  readonly verdict: "held" | "not told apart from eddies";
}

/**
 * How far a neighbourhood must reach: half the distance between the record's jets of one direction on a date, but not less than half
 * that of the oceans, which show `jets` over `spanDegrees` of latitude. A narrower one often holds no jet of an ocean at
 * all, and p comes out too small (by as much as it is narrower). `ownSpacingDegrees` NaN where the record has too few jets.
 */
export function neighbourhoodDegrees(
  ownSpacingDegrees: number,
  oceans: readonly OceanJets[],
  spanDegrees: number,
): number {
  const perOcean = oceans.reduce((sum, { jets }) => sum + jets.length, 0) / oceans.length;
  const oceanSpacing = perOcean > 0 ? Math.min(spanDegrees, spanDegrees / (perOcean / 2)) : spanDegrees;
  return Math.max(Number.isNaN(ownSpacingDegrees) ? 0 : ownSpacingDegrees, oceanSpacing) / 2;
}

/**
 * Holds the jets of a record against oceans of eddies alone. A jet's p is the share of oceans that show, within half a jet
 * spacing and in its direction, a jet of its score or more, itself counted in. Corrected over the jets by Benjamini &
 * Hochberg; a neighbourhood is one test, its highest-scoring jet standing for it, and every jet with p under the threshold
 * the tests set is held. In eddies alone 5 % of the leading jets have p up to 0.05, and the chance that any jet is held is
 * about `level`.
 * Errors: Fault (tag "study") with no oceans or a neighbourhood that is not positive.
 */
export function judgeJets(
  found: readonly FoundJet[],
  oceans: readonly OceanJets[],
  { halfSpacingDegrees, level }: JudgeSettings,
): JetVerdict[] {
  if (oceans.length === 0 || !(halfSpacingDegrees > 0)) {
    const empty = oceans.length === 0;
    throw new Fault({
      tag: "study",
      where: empty ? "eddyTest.oceans" : "eddyTest, jet spacing",
      expected: empty ? "at least one ocean" : "degrees above 0",
      got: empty ? "none" : `${halfSpacingDegrees}`,
      advice: empty ? "choose 200 or more" : "find at least two jets of one direction, or set the spacing",
    });
  }
  const scores = found.map(jetScore);
  const counts = found.map((jet, i) => oceansAsStrong(jet, scores[i], oceans, halfSpacingDegrees));
  const p = counts.map((count) => (1 + count) / (1 + oceans.length));
  const leads = found.map((jet, i) =>
    found.every((other, j) => j === i || scores[j] <= scores[i] || !areNeighbours(jet, other, halfSpacingDegrees)),
  );
  const tests = Float64Array.from(p.filter((_, i) => leads[i]));
  const { rejections, threshold } = falseDiscovery(tests, level);
  return found.map((_, i) => ({
    score: scores[i],
    oceansAsStrong: counts[i],
    oceans: oceans.length,
    p: p[i],
    adjustedP: adjusted(p[i], tests),
    leads: leads[i],
    verdict: rejections > 0 && p[i] <= threshold ? "held" : "not told apart from eddies",
  }));
}

function oceansAsStrong(
  jet: FoundJet,
  score: number,
  oceans: readonly OceanJets[],
  halfSpacingDegrees: number,
): number {
  let count = 0;
  for (const { jets } of oceans) {
    for (const other of jets) {
      if (!areNeighbours(jet, other, halfSpacingDegrees) || jetScore(other) < score) continue;
      count++;
      break;
    }
  }
  return count;
}

/** The lowest level at which the tests reject up to p or beyond: the least m p_(k) / k over p_(k) >= p; 1 at most. */
function adjusted(p: number, tests: Float64Array): number {
  const sorted = tests.slice().sort();
  let least = 1;
  for (let k = 1; k <= sorted.length; k++) {
    if (sorted[k - 1] >= p) least = Math.min(least, (sorted.length * sorted[k - 1]) / k);
  }
  return least;
}
