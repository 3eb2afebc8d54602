import type { FieldChoice, OpenStudy } from "../../core/contract/engine";
import type { Progress } from "../../core/contract/job";
import type { EddyTestResult, JetRow, JetsResult } from "../../core/model/jets-result";
import type { EddyTestSettings } from "../../core/study/schema";
import { recordKey } from "./edit-study";

/** Jets with the study they were found for. */
export interface FoundJets {
  readonly open: OpenStudy;
  readonly grid: string;
  /** See `jetsKey`: the jets hold for nothing else. */
  readonly key: string;
  readonly result: JetsResult;
}

/** An eddy test with the settings it was made with; its own key names the jets that were tested. */
export interface TestedJets {
  readonly settings: string;
  readonly result: EddyTestResult;
}

export interface JetsState {
  readonly found: FoundJets | null;
  /** Jets for the present settings are awaited. */
  readonly finding: boolean;
  /** Why there are none, as a sentence; empty while all is well. */
  readonly fault: string;
  readonly tested: TestedJets | null;
  readonly testing: Progress | null;
  readonly testFault: string;
}

export const noJets: JetsState = {
  found: null,
  finding: false,
  fault: "",
  tested: null,
  testing: null,
  testFault: "",
};

/** Names all that jets depend on: the record, how currents come of it and how jets are found in them. */
export function jetsKey(open: OpenStudy, grid: string): string {
  const { geostrophy, space, background, band, jets } = open.study;
  return JSON.stringify([recordKey(open, grid), geostrophy, space, background, band, jets]);
}

/** Jets are looked for in the band: not in the field as it stands, nor without a filter. */
export function wantsJets(open: OpenStudy, choice: FieldChoice): boolean {
  return choice.inBand && open.study.band.filter !== "none";
}

export function eddyTestKey(settings: EddyTestSettings): string {
  return JSON.stringify(settings);
}

/** Whether a test's verdicts hold for the jets shown: "stale" where record, settings or the eddies asked for are others. */
export function testStanding(
  found: FoundJets | null,
  tested: TestedJets | null,
  settings: EddyTestSettings,
): "none" | "current" | "stale" {
  if (!tested) return "none";
  return found?.result.key === tested.result.key && tested.settings === eddyTestKey(settings) ? "current" : "stale";
}

/** Farthest that a jet's mean latitude may move for it to count as the same when jets are found anew. */
const sameJetDegrees = 1;

/** The jet of a new list that goes on from the lit one: of its direction, nearest in latitude; null where none is near. */
export function carriedJet(
  before: readonly JetRow[],
  after: readonly JetRow[],
  selected: number | null,
): number | null {
  const lit = before.find(({ id }) => id === selected);
  if (!lit) return null;
  const away = (jet: JetRow): number => Math.abs(jet.meanLatitude - lit.meanLatitude);
  const near = after.filter((jet) => jet.sign === lit.sign && away(jet) <= sameJetDegrees);
  return near.reduce<JetRow | null>((best, jet) => (best && away(best) <= away(jet) ? best : jet), null)?.id ?? null;
}

export function withEddyTest(open: OpenStudy, change: Partial<EddyTestSettings>): OpenStudy {
  return { ...open, study: { ...open.study, eddyTest: { ...open.study.eddyTest, ...change } } };
}
