import type { RecordOverview } from "../../../core/contract/engine";
import { formatCount, formatNumber } from "../../../core/figure/format";
import { boxText } from "../../../core/figure/record-text";
import { bytesText, periodText, samplingText } from "../../text/record";
import { Facts } from "./Facts";

/** The loaded record in numbers. */
export function RecordFacts({ record }: { readonly record: RecordOverview }) {
  const { latitude, longitude, time, hasData, ocean } = record;
  const dates = time.values.length;
  const withData = hasData.reduce((sum, has) => sum + has, 0);
  const cells = latitude.values.length * longitude.values.length;
  const wet = ocean.reduce((sum, is) => sum + is, 0);
  return (
    <Facts
      entries={[
        ["Region", boxText(record)],
        ["Period", periodText(time)],
        ["Dates", `${formatCount(dates)}, ${samplingText(time)}; ${formatCount(dates - withData)} without data`],
        [
          "Cells",
          `${latitude.values.length} × ${longitude.values.length}, ${percent(wet, cells)} with data at some time`,
        ],
        ["Calendar", time.calendar.replace("_", " ")],
        ["Times moved to the step by at most", `${formatNumber(record.timeDeviationDays * 86400, 0)} s`],
        ["Memory", bytesText(record.bytes)],
      ]}
    />
  );
}

function percent(part: number, whole: number): string {
  return `${whole > 0 ? Math.round((100 * part) / whole) : 0} %`;
}
