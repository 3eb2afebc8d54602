import { type KeyboardEvent, useRef, useState } from "react";
import type { RecordOverview } from "../../../../core/contract/engine";
import type { JetRow, JetVerdictRow } from "../../../../core/model/jets-result";
import { useBench, useBenchState } from "../../../app/bench-context";
import { JetsTableHead } from "./JetsTableHead";
import { JetTableRow } from "./JetTableRow";
import { mapOrder, sortJets, turnedOrder } from "./sort-jets";

interface JetsTableProps {
  readonly jets: readonly JetRow[];
  readonly record: RecordOverview;
  /** Of a standing test only. */
  readonly verdicts: ReadonlyMap<number, JetVerdictRow>;
}

const steps: Readonly<Record<string, number>> = {
  ArrowUp: -1,
  ArrowDown: 1,
  Home: Number.NEGATIVE_INFINITY,
  End: Number.POSITIVE_INFINITY,
};

/** Jets as a table whose rows can be picked: by a click, or with the arrow keys once a row has the focus. */
export function JetsTable({ jets, record, verdicts }: JetsTableProps) {
  const bench = useBench();
  const selected = useBenchState((state) => state.selectedJet);
  const [order, setOrder] = useState(mapOrder);
  const body = useRef<HTMLTableSectionElement>(null);
  const rows = sortJets(jets, verdicts, order);
  const lit = rows.findIndex(({ id }) => id === selected);
  const onKeyDown = (event: KeyboardEvent<HTMLTableRowElement>, index: number): void => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const { id } = rows[index];
    if (event.key in steps) {
      const next = Math.min(rows.length - 1, Math.max(0, index + steps[event.key]));
      bench.jets.pick(rows[next].id);
      body.current?.rows[next]?.focus();
    } else if (event.key === "Enter" || event.key === " ") bench.jets.pick(id === selected ? null : id);
    else if (event.key === "Escape") bench.jets.pick(null);
    else return;
    // The bench's own keys move cursor and time.
    event.preventDefault();
  };
  return (
    // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: a table whose rows can be selected is a grid
    <table className="table jets-table" role="grid" aria-label="Jets in this band">
      <JetsTableHead order={order} onSort={(column) => setOrder(turnedOrder(order, column))} />
      <tbody ref={body}>
        {rows.map((jet, index) => (
          <JetTableRow
            key={jet.id}
            jet={jet}
            record={record}
            verdict={verdicts.get(jet.id)}
            isSelected={jet.id === selected}
            takesFocus={index === Math.max(0, lit)}
            onPick={() => bench.jets.pick(jet.id === selected ? null : jet.id)}
            onKeyDown={(event) => onKeyDown(event, index)}
          />
        ))}
      </tbody>
    </table>
  );
}
