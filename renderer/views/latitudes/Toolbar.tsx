import { formatDate } from "../../../core/figure/time-ticks";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { Segments } from "../../controls/Segments";
import { Select } from "../../controls/Select";
import { progressText } from "../../text/progress";
import { recordText } from "../../text/record";
import { ComputingLine } from "./ComputingLine";
import { quantityGroups } from "./quantity-groups";
import { TransportIcon } from "./TransportIcon";

const bandChoices = [
  { value: "band", title: "In the band" },
  { value: "raw", title: "As it stands" },
] as const;

/** What is shown, and when. */
export function Toolbar() {
  const bench = useBench();
  const choice = useBenchState((state) => state.choice);
  const cursor = useBenchState((state) => state.cursor);
  const record = useBenchState((state) => state.record);
  const loading = useBenchState((state) => state.loading);
  const playing = useBenchState((state) => state.playing);
  const dates = record?.time.values.length ?? 0;
  const index = cursor?.dateIndex ?? 0;
  return (
    <div className="toolbar" role="toolbar" aria-label="Field and date">
      <Select
        label="Quantity"
        value={choice.quantity}
        choices={quantityGroups}
        onChoose={(quantity) => bench.chooseField({ quantity })}
      />
      <Segments
        label="Periods shown"
        value={choice.inBand ? "band" : "raw"}
        choices={bandChoices}
        onChoose={(value) => bench.chooseField({ inBand: value === "band" })}
      />
      <div className="transport">
        <Button kind="icon" label="One date back" disabled={!record || index === 0} onPress={() => bench.stepDate(-1)}>
          <TransportIcon name="back" />
        </Button>
        <Button kind="icon" label={playing ? "Pause" : "Play"} disabled={!record} onPress={() => bench.togglePlay()}>
          <TransportIcon name={playing ? "pause" : "play"} />
        </Button>
        <Button
          kind="icon"
          label="One date on"
          disabled={!record || index >= dates - 1}
          onPress={() => bench.stepDate(1)}
        >
          <TransportIcon name="on" />
        </Button>
        <span className="date">
          {record && cursor ? formatDate(record.time.calendar, record.time.values[cursor.dateIndex]) : ""}
        </span>
      </div>
      {record && !loading ? <ComputingLine otherwise={recordText(record)} /> : null}
      {loading ? (
        <span className="loading" role="status">
          {progressText(loading)}
          <Button onPress={() => bench.loader.cancel()}>Cancel</Button>
        </span>
      ) : null}
    </div>
  );
}
