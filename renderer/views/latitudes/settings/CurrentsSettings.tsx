import type { OpenStudy } from "../../../../core/contract/engine";
import { useBench } from "../../../app/bench-context";
import { ChoiceSetting } from "../../../controls/ChoiceSetting";
import { NumberSetting } from "../../../controls/NumberSetting";
import { withGeostrophy } from "../../../state/edit-study";

const stencils = (["3", "5", "7", "9"] as const).map((value) => ({ value, title: `${value} points` }));
const earths = [
  { value: "ellipsoid", title: "Ellipsoid" },
  { value: "sphere", title: "Sphere" },
] as const;
const gravities = [
  { value: "latitude", title: "By latitude" },
  { value: "number", title: "One value" },
] as const;
const equators = [
  { value: "blank", title: "Blank" },
  { value: "blend", title: "Blend" },
] as const;

/** Conventional standard gravity, m s-2 (CGPM 1901 [from memory]). */
const standardGravity = 9.80665;

/** How currents are computed from heights. */
export function CurrentsSettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const { geostrophy } = open.study;
  const change = (part: Partial<typeof geostrophy>): void => bench.edit(withGeostrophy(open, part));
  const { gravity } = geostrophy;
  return (
    <>
      <ChoiceSetting
        title="Difference stencil"
        value={`${geostrophy.stencil}` as "3"}
        choices={stencils}
        onChoose={(value) => change({ stencil: Number(value) as 3 | 5 | 7 | 9 })}
      />
      <ChoiceSetting
        title="Shape of the Earth"
        value={geostrophy.earth}
        choices={earths}
        onChoose={(earth) => change({ earth })}
      />
      <ChoiceSetting
        title="Gravity"
        value={gravity === "latitude" ? "latitude" : "number"}
        choices={gravities}
        onChoose={(value) => change({ gravity: value === "latitude" ? "latitude" : standardGravity })}
      />
      {gravity === "latitude" ? null : (
        <NumberSetting
          title="Gravity, m/s²"
          value={gravity}
          rule={{ unit: "", least: 9.7, most: 9.9 }}
          onCommit={(value) => change({ gravity: value })}
        />
      )}
      <ChoiceSetting
        title="At the equator"
        value={geostrophy.equator}
        choices={equators}
        onChoose={(equator) => change({ equator })}
      />
      <NumberSetting
        title="Blank within, °"
        label="Degrees from the equator left blank"
        value={geostrophy.equatorDegrees}
        rule={{ unit: "degrees", least: 0, most: 30 }}
        onCommit={(equatorDegrees) => change({ equatorDegrees })}
      />
      {geostrophy.equator === "blend" ? (
        <>
          <p className="quiet">Velocities are blended; what divides by f stays blank.</p>
          <NumberSetting
            title="Blend falls off over, °"
            value={geostrophy.blendScaleDegrees}
            rule={{ unit: "degrees", least: 0.5, most: 10 }}
            onCommit={(blendScaleDegrees) => change({ blendScaleDegrees })}
          />
          <NumberSetting
            title="Slopes fitted within, °"
            value={geostrophy.blendWidthDegrees}
            rule={{ unit: "degrees", least: 2, most: 15 }}
            onCommit={(blendWidthDegrees) => change({ blendWidthDegrees })}
          />
        </>
      ) : null}
    </>
  );
}
