import type { OpenStudy } from "../../../../core/contract/engine";
import { useBench } from "../../../app/bench-context";
import { Check } from "../../../controls/Check";
import { NumberSetting } from "../../../controls/NumberSetting";
import { withBackground, withSpace } from "../../../state/edit-study";

const parts = [
  ["mean", "Mean"],
  ["trend", "Trend"],
  ["annual", "Annual cycle"],
  ["semiannual", "Half-year cycle"],
] as const;

/** Half-spans that leave jets and eddies alone; a start, to be chosen by the person. */
const usualSurface = { zonalKm: 1500, meridionalKm: 1000 };
const spanRule = { unit: "kilometres", least: 50, most: 40_000 };

/** What is taken off the heights before any band is kept. */
export function BackgroundSettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const { background, space } = open.study;
  const { removeSurface } = space;
  return (
    <>
      <div className="checks">
        {parts.map(([part, title]) => (
          <Check
            key={part}
            title={title}
            checked={background[part]}
            onChange={(on) => bench.edit(withBackground(open, { [part]: on }))}
          />
        ))}
      </div>
      <Check
        title="Zonal mean of each date"
        checked={space.removeZonalMean}
        onChange={(removeZonalMean) => bench.edit(withSpace(open, { removeZonalMean }))}
      />
      <Check
        title="Large-scale surface of each date"
        checked={removeSurface !== null}
        onChange={(on) => bench.edit(withSpace(open, { removeSurface: on ? usualSurface : null }))}
      />
      {removeSurface ? (
        <div className="nested">
          <NumberSetting
            title="Half-span east–west, km"
            value={removeSurface.zonalKm}
            rule={spanRule}
            onCommit={(zonalKm) => bench.edit(withSpace(open, { removeSurface: { ...removeSurface, zonalKm } }))}
          />
          <NumberSetting
            title="Half-span north–south, km"
            value={removeSurface.meridionalKm}
            rule={spanRule}
            onCommit={(meridionalKm) =>
              bench.edit(withSpace(open, { removeSurface: { ...removeSurface, meridionalKm } }))
            }
          />
        </div>
      ) : null}
    </>
  );
}
