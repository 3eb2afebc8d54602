import type { RecordOverview } from "../../../../core/contract/engine";
import { counted, formatCount, formatNumber, formatSignificant } from "../../../../core/figure/format";
import { jetLatitudeText } from "../../../../core/figure/latitudes/jet-line";
import { formatDate } from "../../../../core/figure/time-ticks";
import type {
  EddyTestResult,
  JetRow,
  JetsResult,
  JetVerdictRow,
  RateNumbers,
} from "../../../../core/model/jets-result";
import { nearestIndex } from "../../../state/cursor";

/** A jet's latitude without the hemisphere where the record has but one. */
export function shortLatitude(record: RecordOverview, latitude: number): string {
  const { values } = record.latitude;
  const ends = [values[0], values[values.length - 1]];
  return jetLatitudeText(latitude, 2, Math.min(...ends) < 0 && Math.max(...ends) > 0);
}

export function directionWord(sign: 1 | -1): "eastward" | "westward" {
  return sign === 1 ? "eastward" : "westward";
}

/** A chance as a percentage: "0.4 %", "23 %"; never a plain nought, which no number of oceans can show. */
export function chanceText(p: number): string {
  if (!Number.isFinite(p)) return "–";
  const percent = 100 * p;
  if (percent < 0.1) return "<0.1\u00a0%";
  return `${formatNumber(percent, percent < 9.95 ? 1 : 0)}\u00a0%`;
}

/** "0.23 (−0.11 to 0.60)": a rate with its 95 % limits. */
export function rateText({ value, low95, high95 }: RateNumbers, scale: number, digits: number): string {
  if (!Number.isFinite(value)) return "–";
  const [low, high] = [low95, high95].map((limit) => formatNumber(limit * scale, digits));
  return `${formatNumber(value * scale, digits)} (${low} to ${high})`;
}

/** How a life begins or ends, with the other jet named by its latitude where it is listed. */
export function lifeEndText(text: string, jets: readonly JetRow[], latitudeOf: (latitude: number) => string): string {
  const partner = /^(split from|merger into) (\d+)$/.exec(text);
  if (!partner) return lifeEnds[text] ?? text;
  const jet = jets.find(({ id }) => id === Number(partner[2]));
  const verb = partner[1] === "split from" ? "splits from" : "merges into";
  return jet ? `${verb} the jet at ${latitudeOf(jet.meanLatitude)}` : `${verb} a line not listed`;
}

const lifeEnds: Readonly<Record<string, string>> = {
  "record start": "with the record",
  "record end": "with the record",
  birth: "within the record",
  end: "within the record",
};

/** What the eddy test says of a jet, in a sentence with both its numbers. */
export function verdictText(verdict: JetVerdictRow, level: number): string {
  const { oceansAsStrong, oceans, p, adjustedP, leads } = verdict;
  const beside = leads
    ? " It leads: no stronger jet of its direction stands near by."
    : " It does not lead: a stronger jet of its direction stands near by.";
  const said = verdict.verdict === "held" ? "Held" : "Not told apart from eddies";
  return (
    `${said}: ${oceansAsStrong} of ${oceans} oceans of random eddies have as strong a jet near by, p ${chanceText(p)}; ` +
    `corrected over the leading jets ${chanceText(adjustedP)}, held below ${formatSignificant(100 * level, 2)}\u00a0%.${beside}`
  );
}

/** What red noise says at the jet's latitude; empty where the result has no number there. */
export function redNoiseText(jet: JetRow, { redNoise, redNoiseHeld }: JetsResult, record: RecordOverview): string {
  const row = nearestIndex(record.latitude.values, jet.meanLatitude);
  const part = (name: string, p: number, held: number): string[] => {
    if (!Number.isFinite(p)) return [];
    // Where persistence leaves less than one independent sample the chance is set to 1.
    const stands =
      held === 1 ? "stands out" : p < 1 ? "does not stand out" : "cannot be told, too persistent for its length";
    return [p < 1 ? `${name} ${stands} (p ${chanceText(p)})` : `${name} ${stands}`];
  };
  const parts = [
    ...part("variance in the band", redNoise.bandP[row], redNoiseHeld.band[row]),
    ...part("mean", redNoise.meanP[row], redNoiseHeld.mean[row]),
  ];
  return parts.length === 0 ? "" : `Against red noise: ${parts.join(", ")}.`;
}

/** First and last date of a jet's life. */
export function lifeDatesText({ firstDay, lastDay }: JetRow, { time }: RecordOverview): string {
  return `${formatDate(time.calendar, firstDay)} to ${formatDate(time.calendar, lastDay)}`;
}

/** "900 days": the record's length. */
export function recordDaysText({ time }: RecordOverview): string {
  const days = Math.round(time.values.length * Math.abs(time.step || 1));
  return counted(days, "day");
}

/** "8 found, 6 held": what a person wants to know first; without a standing test only what was found. */
export function countText(found: number, held: number | null): string {
  if (found === 0) return "none found";
  return held === null ? `${found} found` : `${found} found, ${held} held`;
}

/** What the column of chances holds. */
export function verdictLegend({ oceans, halfSpacingDegrees, level }: EddyTestResult): string {
  return (
    `“vs eddies”: share of ${formatCount(oceans)} random-eddy oceans with as strong a jet within ` +
    `${formatNumber(halfSpacingDegrees, 1)}°. Bold: held at ${formatSignificant(100 * level, 2)}\u00a0% after correction over the leading jets.`
  );
}

/** Says that a lone strong jet may not have been held, and how many oceans are enough for it; empty where there are enough. */
export function tooFewOceansText({ oceans, level, verdicts }: EddyTestResult): string {
  // The least chance that n oceans can show is 1 in n + 1; correction multiplies it by the number of tests.
  const tests = verdicts.filter(({ leads }) => leads).length;
  const wanted = Math.ceil(tests / level - 1e-9) - 1;
  if (oceans >= wanted) return "";
  const few = `${counted(oceans, "ocean")} ${oceans === 1 ? "is" : "are"} few`;
  return `${few}: with ${formatCount(wanted)} or more even a lone jet among ${tests} leading ones can be held.`;
}
