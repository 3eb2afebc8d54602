import type { OpenStudy } from "../../../../core/contract/engine";
import type { BandSettings } from "../../../../core/study/schema";
import { useBench, useBenchState } from "../../../app/bench-context";
import { Check } from "../../../controls/Check";
import { ChoiceSetting } from "../../../controls/ChoiceSetting";
import { NumberSetting } from "../../../controls/NumberSetting";
import { type BandEdge, closeSide, edgeRange, fitBand, recordLimits, shownEdges } from "../../../state/band-edges";
import { withBand } from "../../../state/edit-study";

const kinds = [
  { value: "lanczos", title: "Lanczos" },
  { value: "butterworth", title: "Butterworth" },
  { value: "running-mean", title: "Running mean" },
  { value: "none", title: "None" },
] as const;
const cuts = [
  { value: "half-amplitude", title: "−6 dB" },
  { value: "half-power", title: "−3 dB" },
] as const;
const sides = [
  ["shortestDays", "Shortest period, days", "Nothing taken off the short periods", "longestDays"],
  ["longestDays", "Longest period, days", "Nothing taken off the long periods", "shortestDays"],
] as const;

/** The filter in time: its kind, its two edges and the gaps it bridges. */
export function FilterSettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const time = useBenchState((state) => state.record?.time ?? null);
  const { band } = open.study;
  if (!time) return null;
  const limits = recordLimits(time);
  const change = (part: Partial<BandSettings>): void => bench.edit(withBand(open, { ...band, ...part }));
  const openSide = (edge: BandEdge, isOpen: boolean): void =>
    bench.edit(withBand(open, isOpen ? { ...band, [edge]: null } : closeSide(band, edge, limits)));
  return (
    <>
      <ChoiceSetting
        title="Kind"
        value={band.filter}
        choices={kinds}
        onChoose={(filter) => bench.edit(withBand(open, { ...fitBand(band, limits), filter }))}
      />
      {band.filter === "butterworth" ? (
        <>
          <NumberSetting
            title="Order"
            value={band.order}
            rule={{ unit: "", least: 1, most: 8, whole: true }}
            onCommit={(order) => change({ order })}
          />
          <ChoiceSetting
            title="Level at the edges"
            value={band.cut}
            choices={cuts}
            onChoose={(cut) => change({ cut })}
          />
        </>
      ) : null}
      {band.filter === "none" ? null : (
        <>
          {sides.map(([edge, title, openTitle, other]) => {
            const days = band[edge];
            const [least, most] = edgeRange(shownEdges(band, limits), edge, limits);
            return (
              <div className="setting-group" key={edge}>
                {days === null ? null : (
                  <NumberSetting
                    title={title}
                    value={days}
                    rule={{ unit: "days", least, most }}
                    onCommit={(value) => change({ [edge]: value })}
                  />
                )}
                <Check
                  title={openTitle}
                  checked={days === null}
                  disabled={days !== null && band[other] === null}
                  onChange={(isOpen) => openSide(edge, isOpen)}
                />
              </div>
            );
          })}
          <NumberSetting
            title="Gaps bridged up to, days"
            value={band.bridgeDays}
            rule={{ unit: "days", least: 0, most: Math.max(limits.mostDays, band.bridgeDays) }}
            onCommit={(bridgeDays) => change({ bridgeDays })}
          />
        </>
      )}
    </>
  );
}
