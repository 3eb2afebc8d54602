import type { OpenStudy } from "../../../../core/contract/engine";
import { useBench, useBenchState } from "../../../app/bench-context";
import { Button } from "../../../controls/Button";
import { ProgressLine } from "../../../controls/ProgressLine";
import { testStanding } from "../../../state/jets-state";
import { tooFewOceansText, verdictLegend } from "./jet-texts";

/** The test of the jets against oceans of passing eddies: what its column means, how it stands, its start and its end. */
export function EddyTest({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const { found, finding, tested, testing, testFault } = useBenchState((state) => state.jets);
  const standing = testStanding(found, tested, open.study.eddyTest);
  const hasJets = found !== null && found.result.jets.length > 0;
  const tooFew = standing === "current" && tested ? tooFewOceansText(tested.result) : "";
  return (
    <div className="eddy-test">
      {standing === "current" && tested ? <p className="quiet">{verdictLegend(tested.result)}</p> : null}
      {tooFew === "" ? null : <p className="stale">{tooFew}</p>}
      {standing === "stale" && !testing ? (
        <p className="stale" role="status">
          Tested for other settings: test again.
        </p>
      ) : null}
      {testing ? <ProgressLine progress={testing} label="Eddy test" /> : null}
      {testFault === "" ? null : <p className="quiet any-text">{testFault}</p>}
      {testing ? (
        <div>
          <Button onPress={() => bench.jets.cancelTest()}>Cancel the test</Button>
        </div>
      ) : null}
      {!testing && standing !== "current" ? (
        <div>
          <Button disabled={!hasJets || finding} onPress={() => void bench.jets.test()}>
            Test against eddies
          </Button>
        </div>
      ) : null}
    </div>
  );
}
