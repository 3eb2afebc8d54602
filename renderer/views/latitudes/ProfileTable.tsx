import { useState } from "react";
import { formatLatitude, formatNumber } from "../../../core/figure/format";
import { useBenchState } from "../../app/bench-context";
import { rowAt } from "../../figure/cell-values";
import type { Picture } from "../../state/bench-state";
import { Units } from "../../text/Units";
import { meanStyle } from "./readout";

/** The profile as a table, northernmost row first, for reading out and copying. Built only while it is open. */
export function ProfileTable({ picture }: { readonly picture: Picture }) {
  const [open, setOpen] = useState(false);
  return (
    <details className="profile-table" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>Profile as a table</summary>
      {open ? <Rows picture={picture} /> : null}
    </details>
  );
}

function Rows({ picture }: { readonly picture: Picture }) {
  const held = useBenchState((state) => (state.cursor ? rowAt(picture, state.cursor.latitude) : -1));
  const { mean, half95, effectiveSize } = picture.result.profile;
  const style = meanStyle(picture);
  const latitudes = [...picture.record.latitude.values].sort((a, b) => a - b);
  const shown = (value: number): string => formatNumber(value * style.scale, style.digits);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable from the keyboard
    <section className="profile-scroll" tabIndex={0} aria-label="Profile over latitude">
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Latitude</th>
            <th scope="col">
              Mean <Units text={style.units} />
            </th>
            <th scope="col">±95 %</th>
            <th scope="col">N_eff</th>
          </tr>
        </thead>
        <tbody>
          {latitudes
            .map((latitude, row) => (
              <tr key={latitude} className={row === held ? "at-cursor" : undefined}>
                <td>{formatLatitude(latitude, 2)}</td>
                <td>{shown(mean[row])}</td>
                <td>{shown(half95[row])}</td>
                <td>{formatNumber(effectiveSize[row], 0)}</td>
              </tr>
            ))
            .reverse()}
        </tbody>
      </table>
    </section>
  );
}
