import type { KeyboardEvent } from "react";
import type { RecordOverview } from "../../../../core/contract/engine";
import { formatNumber } from "../../../../core/figure/format";
import type { JetRow, JetVerdictRow } from "../../../../core/model/jets-result";
import { JetSign } from "./JetSign";
import { directionWord, rateText, shortLatitude } from "./jet-texts";
import { VerdictCell } from "./VerdictCell";

interface JetTableRowProps {
  readonly jet: JetRow;
  readonly record: RecordOverview;
  readonly verdict: JetVerdictRow | undefined;
  readonly isSelected: boolean;
  /** The one row that the tab key reaches. */
  readonly takesFocus: boolean;
  readonly onPick: () => void;
  readonly onKeyDown: (event: KeyboardEvent<HTMLTableRowElement>) => void;
}

export function JetTableRow(props: JetTableRowProps) {
  const { jet, record, verdict, isSelected, takesFocus, onPick, onKeyDown } = props;
  const drift = jet.driftDegreesPerYear;
  return (
    <tr
      aria-selected={isSelected}
      tabIndex={takesFocus ? 0 : -1}
      className={isSelected ? "lit" : undefined}
      onClick={onPick}
      onKeyDown={onKeyDown}
    >
      <th scope="row" className={directionWord(jet.sign)}>
        <JetSign sign={jet.sign} />
        {shortLatitude(record, jet.meanLatitude)}
        <span className="heard"> {directionWord(jet.sign)}</span>
      </th>
      <td>{formatNumber(100 * jet.meanSpeed, 1)}</td>
      <td>{formatNumber(jet.meanWidthKm, 0)}</td>
      <td>{formatNumber(100 * jet.shareOfDaysPresent, 0)}</td>
      <td title={`${rateText(drift, 1, 2)} degrees a year, 95 % limits`}>{formatNumber(drift.value, 2)}</td>
      <td>
        <VerdictCell verdict={verdict} />
      </td>
    </tr>
  );
}
