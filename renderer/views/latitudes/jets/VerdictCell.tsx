import type { JetVerdictRow } from "../../../../core/model/jets-result";
import { chanceText } from "./jet-texts";

/** A verdict's chance in a box: heavy and bold where the jet is held. A dash where there is no standing test. */
export function VerdictCell({ verdict }: { readonly verdict: JetVerdictRow | undefined }) {
  if (!verdict)
    return (
      <span className="quiet" title="not tested for these settings">
        –
      </span>
    );
  const held = verdict.verdict === "held";
  return (
    <span className={held ? "verdict held" : "verdict"} title={verdict.verdict}>
      {chanceText(verdict.p)}
      <span className="heard"> {verdict.verdict}</span>
    </span>
  );
}
