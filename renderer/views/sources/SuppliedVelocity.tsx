import type { OpenStudy } from "../../../core/contract/engine";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { ProgressLine } from "../../controls/ProgressLine";
import { comparisonKey } from "../../state/velocities";
import { VelocityReport } from "./VelocityReport";

/** The velocities that the grid's files supply beside its heights, compared with ours at the person's wish. */
export function SuppliedVelocity({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const grid = useBenchState((state) => state.grid);
  const comparison = useBenchState((state) => state.comparison);
  const comparing = useBenchState((state) => state.comparing);
  const isCurrent = comparison?.key === comparisonKey(open, grid);
  return (
    <section aria-label="Supplied velocity">
      <h2>Supplied velocity</h2>
      {comparing ? (
        <div className="comparing">
          <ProgressLine progress={comparing} label="Comparing supplied velocities" />
          <Button onPress={() => bench.velocities.cancel()}>Cancel</Button>
        </div>
      ) : isCurrent ? null : (
        <div className="comparing">
          <p className="quiet">
            {comparison
              ? "Grid or settings have changed since the last comparison."
              : "Where files hold velocities beside heights, they are compared with ours on a few dates."}
          </p>
          <Button onPress={() => void bench.velocities.compare()}>Compare supplied velocities</Button>
        </div>
      )}
      {isCurrent && !comparing ? (
        comparison.report ? (
          <VelocityReport open={open} report={comparison.report} />
        ) : (
          <p className="quiet">No velocities in these files.</p>
        )
      ) : null}
    </section>
  );
}
