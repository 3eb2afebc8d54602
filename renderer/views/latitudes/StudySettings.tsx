import type { OpenStudy } from "../../../core/contract/engine";
import { useBench } from "../../app/bench-context";
import { Check } from "../../controls/Check";
import { NumberField } from "../../controls/NumberField";
import { Select } from "../../controls/Select";
import { withBackground, withGeostrophy } from "../../state/edit-study";

const stencils = (["3", "5", "7", "9"] as const).map((value) => ({ value, title: `${value} points` }));
const earths = [
  { value: "ellipsoid", title: "Ellipsoid" },
  { value: "sphere", title: "Sphere" },
] as const;
const parts = [
  ["mean", "Mean"],
  ["trend", "Trend"],
  ["annual", "Annual cycle"],
  ["semiannual", "Half-year cycle"],
] as const;

/** The settings that change the picture most; each change is a new study that Undo takes back. */
export function StudySettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const { geostrophy, background } = open.study;
  return (
    <section aria-label="Settings">
      <h2>Currents from height</h2>
      <div className="setting">
        <span>Difference stencil</span>
        <Select
          label="Difference stencil"
          value={`${geostrophy.stencil}` as "3"}
          choices={stencils}
          onChoose={(value) => bench.edit(withGeostrophy(open, { stencil: Number(value) as 3 | 5 | 7 | 9 }))}
        />
      </div>
      <div className="setting">
        <span>Shape of the Earth</span>
        <Select
          label="Shape of the Earth"
          value={geostrophy.earth}
          choices={earths}
          onChoose={(earth) => bench.edit(withGeostrophy(open, { earth }))}
        />
      </div>
      <div className="setting">
        <span>Blank near the equator, °</span>
        <NumberField
          label="Degrees from the equator left blank"
          value={geostrophy.equatorDegrees}
          least={0}
          most={30}
          onCommit={(equatorDegrees) => bench.edit(withGeostrophy(open, { equatorDegrees }))}
        />
      </div>
      <h2>Taken off before filtering</h2>
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
    </section>
  );
}
