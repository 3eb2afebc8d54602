import type { OpenStudy } from "../../../../core/contract/engine";
import { useBench, useBenchState } from "../../../app/bench-context";
import { ChoiceSetting } from "../../../controls/ChoiceSetting";
import { NumberSetting } from "../../../controls/NumberSetting";
import { withErrors } from "../../../state/edit-study";

const kinds = [
  { value: "none", title: "None" },
  { value: "number", title: "One number" },
  { value: "file", title: "From the file" },
] as const;

/** A start: what maps of heights are commonly said to be off by. Common practice, no source. */
const usualMetres = 0.02;

/** How far heights are off, from which the errors of currents follow. */
export function ErrorSettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const picture = useBenchState((state) => state.picture);
  const { heightMetres, correlationKm } = open.study.errors;
  const kind = heightMetres === null ? "none" : heightMetres === "file" ? "file" : "number";
  const unknown = picture?.open === open && heightMetres !== null && picture.result.error === null;
  const values = { none: null, number: usualMetres, file: "file" } as const;
  return (
    <>
      <ChoiceSetting
        title="Standard error"
        value={kind}
        choices={kinds}
        onChoose={(value) => bench.edit(withErrors(open, { heightMetres: values[value] }))}
      />
      {typeof heightMetres === "number" ? (
        <NumberSetting
          title="Of heights, cm"
          value={Number((100 * heightMetres).toPrecision(12))}
          rule={{ unit: "centimetres", least: 0.01, most: 1000 }}
          onCommit={(centimetres) => bench.edit(withErrors(open, { heightMetres: centimetres / 100 }))}
        />
      ) : null}
      {heightMetres === null ? null : (
        <NumberSetting
          title="Alike over, km"
          value={correlationKm}
          rule={{ unit: "kilometres", least: 0, most: 2000 }}
          onCommit={(km) => bench.edit(withErrors(open, { correlationKm: km }))}
        />
      )}
      {unknown ? <p className="quiet">For this quantity no error is known.</p> : null}
    </>
  );
}
