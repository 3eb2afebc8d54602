import type { OpenStudy } from "../../../../core/contract/engine";
import { useBench } from "../../../app/bench-context";
import { Check } from "../../../controls/Check";
import { NumberSetting } from "../../../controls/NumberSetting";
import { withSpace } from "../../../state/edit-study";

const directions = [
  ["meridional", "A band along meridians", "along meridians"],
  ["zonal", "A band along parallels", "along parallels"],
] as const;
const ends = [
  ["shortestKm", "Shortest wavelength, km", "shortest wavelength"],
  ["longestKm", "Longest wavelength, km", "longest wavelength"],
] as const;

/** A start that any grid can carry: large scales off, nothing taken off the short waves. */
const usualBand = { shortestKm: null, longestKm: 600 };
const mostKm = 40_000;

/** Wavelengths kept along meridians and parallels. */
export function SpaceSettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const { space } = open.study;
  return (
    <>
      {directions.map(([direction, title, along]) => {
        const band = space[direction];
        return (
          <div className="setting-group" key={direction}>
            <Check
              title={title}
              checked={band !== null}
              onChange={(on) => bench.edit(withSpace(open, { [direction]: on ? usualBand : null }))}
            />
            {band ? (
              <div className="nested">
                {ends.map(([end, endTitle, name]) => (
                  <NumberSetting<number | null>
                    key={end}
                    title={endTitle}
                    label={`The ${name} ${along}`}
                    placeholder="open"
                    value={band[end]}
                    rule={{
                      unit: "kilometres",
                      least: end === "longestKm" ? Math.max(1, Math.ceil(band.shortestKm ?? 0) + 1) : 1,
                      most: end === "shortestKm" ? Math.max(1, Math.floor(band.longestKm ?? mostKm) - 1) : mostKm,
                      optional: true,
                    }}
                    onCommit={(value) => bench.edit(withSpace(open, { [direction]: { ...band, [end]: value } }))}
                  />
                ))}
              </div>
            ) : null}
          </div>
        );
      })}
      <p className="quiet">A field left blank leaves that side open.</p>
    </>
  );
}
