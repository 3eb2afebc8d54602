import { formatLatitude } from "../../../core/figure/format";
import type { ScalesPart } from "../../../core/figure/scales-figure";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { NumberSetting } from "../../controls/NumberSetting";
import { Segments } from "../../controls/Segments";
import { progressText } from "../../text/progress";
import { partChoices } from "./scales-parts";
import { useScalesState } from "./use-scales-state";

interface ScalesToolbarProps {
  readonly part: ScalesPart;
  /** What is drawn belongs to settings that have changed since. */
  readonly isEarlier: boolean;
}

/** Which page, which latitude for waves and drift, and how far new scales are. */
export function ScalesToolbar({ part, isEarlier }: ScalesToolbarProps) {
  const bench = useBench();
  const record = useBenchState((state) => state.record);
  const cursor = useBenchState((state) => state.cursor?.latitude ?? null);
  const chosen = useScalesState((state) => state.latitude);
  const shown = useScalesState((state) => state.picture?.result.alongLatitude ?? null);
  const values = record?.latitude.values ?? new Float64Array(0);
  const [south, north] = [Math.min(...values), Math.max(...values)];
  const latitude = chosen ?? shown;
  return (
    <div className="toolbar">
      <Segments label="Page" value={part} choices={partChoices} onChoose={(next) => bench.scales.choosePart(next)} />
      {latitude !== null && values.length > 1 ? (
        <div className="scales-latitude">
          <NumberSetting
            title="Waves along, °N"
            label="Latitude of waves and drift, degrees north"
            value={Math.round(1000 * latitude) / 1000}
            rule={{ unit: "degrees", least: south, most: north }}
            onCommit={(value) => bench.scales.setLatitude(value)}
          />
        </div>
      ) : null}
      {cursor !== null && latitude !== null && Math.abs(cursor - latitude) > 0.005 ? (
        <Button onPress={() => bench.scales.setLatitude(cursor)} label="Take the latitude held in the Latitudes view">
          {formatLatitude(cursor, 1)}
        </Button>
      ) : null}
      <Standing isEarlier={isEarlier} />
    </div>
  );
}

/** At the right end: what is being computed, or why what is drawn is not of the present settings. */
function Standing({ isEarlier }: { readonly isEarlier: boolean }) {
  const bench = useBench();
  const progress = useScalesState((state) => state.progress);
  const fault = useScalesState((state) => state.fault);
  const hasPicture = useScalesState((state) => state.picture !== null);
  if (!hasPicture) return null;
  if (progress) {
    return (
      <div className="scales-standing" role="status">
        {isEarlier ? <strong>of earlier settings</strong> : null}
        <span className="step">{progressText(progress)}</span>
        <progress
          aria-label="Computing the scales"
          max={progress.total > 0 ? progress.total : undefined}
          value={progress.total > 0 ? progress.done : undefined}
        />
        <Button onPress={() => bench.scales.cancel()}>Cancel</Button>
      </div>
    );
  }
  if (!isEarlier) return null;
  return (
    <div className="scales-standing" role="status">
      <strong>of earlier settings</strong>
      <span className="step any-text" title={fault}>
        {fault}
      </span>
      <Button onPress={() => bench.scales.again()}>Compute again</Button>
    </div>
  );
}
