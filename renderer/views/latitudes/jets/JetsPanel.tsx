import type { OpenStudy, RecordOverview } from "../../../../core/contract/engine";
import { counted, formatCount } from "../../../../core/figure/format";
import { boxText } from "../../../../core/figure/record-text";
import type { JetsResult } from "../../../../core/model/jets-result";
import { useBenchState } from "../../../app/bench-context";
import { recordKey } from "../../../state/edit-study";
import { testStanding, wantsJets } from "../../../state/jets-state";
import { EddySettings } from "./EddySettings";
import { EddyTest } from "./EddyTest";
import { JetDetails } from "./JetDetails";
import { JetsTable } from "./JetsTable";
import { countText, recordDaysText } from "./jet-texts";

interface JetsPanelProps {
  readonly open: OpenStudy;
  readonly record: RecordOverview;
}

/** Jets in the band as a table with what the eddy test makes of them; a sentence where there are none. */
export function JetsPanel({ open, record }: JetsPanelProps) {
  const choice = useBenchState((state) => state.choice);
  const { found, finding, fault } = useBenchState((state) => state.jets);
  const recordFor = useBenchState((state) => state.recordFor);
  const wanted = wantsJets(open, choice);
  // Those of another record would name latitudes that are not on screen.
  const shown = wanted && found && recordKey(found.open, found.grid) === recordFor ? found.result : null;
  return (
    <section className="jets" aria-label="Jets" aria-busy={finding}>
      <h2>Jets in this band</h2>
      {wanted ? null : <p className="quiet">{notLookedFor(choice.inBand)}</p>}
      {wanted && !shown ? (
        <p className="quiet any-text">{fault === "" ? "Looking for jets …" : `No jets: ${fault}`}</p>
      ) : null}
      {shown ? <Jets open={open} record={record} result={shown} /> : null}
      <p className="heard" role="status" aria-live="polite" data-spoken="jets">
        {shown && !finding ? spoken(shown.jets.length) : ""}
      </p>
    </section>
  );
}

function Jets({ open, record, result }: JetsPanelProps & { readonly result: JetsResult }) {
  const selected = useBenchState((state) => state.selectedJet);
  const quantity = useBenchState((state) => state.choice.quantity);
  const { found, finding, tested } = useBenchState((state) => state.jets);
  const isCurrent = testStanding(found, tested, open.study.eddyTest) === "current";
  const list = isCurrent && tested ? tested.result.verdicts : [];
  const verdicts = new Map(list.map((verdict) => [verdict.jet, verdict]));
  const held = isCurrent ? list.filter(({ verdict }) => verdict === "held").length : null;
  const picked = result.jets.find(({ id }) => id === selected);
  return (
    <>
      <p className="quiet">
        {boxText(record)}
        <br />
        {recordDaysText(record)} · {finding ? "looking …" : countText(result.jets.length, held)}
      </p>
      {quantity === "u" ? null : <p className="quiet">Their lines are drawn where eastward velocity is shown.</p>}
      {result.jets.length === 0 ? (
        <p className="quiet">{noneFound(result, open.study.jets.leastLifetimeDays)}</p>
      ) : (
        <>
          <div className={finding ? "behind" : undefined}>
            <JetsTable jets={result.jets} record={record} verdicts={verdicts} />
          </div>
          <EddyTest open={open} />
          {picked ? (
            <JetDetails
              jet={picked}
              result={result}
              record={record}
              verdict={verdicts.get(picked.id)}
              level={tested?.result.level ?? open.study.eddyTest.level}
            />
          ) : null}
          <EddySettings open={open} />
        </>
      )}
    </>
  );
}

function notLookedFor(inBand: boolean): string {
  return inBand
    ? "Jets are looked for in the band: choose a filter to keep one."
    : "Jets are looked for in the band; here the field has all its periods.";
}

function noneFound({ shorterLines }: JetsResult, leastLifetimeDays: number): string {
  const lines = shorterLines === 1 ? "One line lives" : `${formatCount(shorterLines)} lines live`;
  const rest = shorterLines === 0 ? "" : ` ${lines} for less.`;
  return `No line of strongest flow lives ${counted(leastLifetimeDays, "day")} in this band.${rest}`;
}

function spoken(count: number): string {
  return count === 0 ? "No jets found." : `${counted(count, "jet")} found.`;
}
