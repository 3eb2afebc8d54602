import { formatLatitude, formatNumber } from "../../../core/figure/format";
import { useBenchState } from "../../app/bench-context";
import { rowAt } from "../../figure/cell-values";
import type { Picture } from "../../state/bench-state";
import { Units } from "../../text/Units";
import { intervalText } from "../../text/values";
import { quantityText } from "./quantities";
import { dateText, meanStyle, onDateText } from "./readout";

/** The numbers on the held latitude. */
export function CursorReadout({ picture }: { readonly picture: Picture }) {
  const cursor = useBenchState((state) => state.cursor);
  if (!cursor) return null;
  const { result } = picture;
  const row = rowAt(picture, cursor.latitude);
  const { units, ...numbers } = meanStyle(picture);
  // The unit stands once above, so that no row grows onto a second line while values change.
  const style = { ...numbers, units: "" };
  const entries = [
    [`${dateText(picture, result.dateIndex)}${result.error ? " ± error" : ""}`, onDateText(picture, row, style)],
    ["Mean ± 95 %", intervalText(style, result.profile.mean[row], result.profile.half95[row])],
    ["Independent samples", formatNumber(result.profile.effectiveSize[row], 0)],
    ["Dates that entered", formatNumber(result.profile.dates[row], 0)],
  ];
  return (
    <section aria-label="At the cursor">
      <div>
        <h2>At {formatLatitude(cursor.latitude, 2)}</h2>
        <p className="quiet">
          {quantityText(result.choice.quantity).title}, zonal mean{units === "" ? "" : ", "}
          <Units text={units} />
        </p>
      </div>
      <dl className="readout">
        {entries.map(([title, value]) => (
          <div className="readout-row" key={title}>
            <dt>{title}</dt>
            <dd>
              <Units text={value} />
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
