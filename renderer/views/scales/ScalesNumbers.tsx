import { useState } from "react";
import type { ScalesPicture } from "../../state/scales";
import { Units } from "../../text/Units";
import { type LatitudeTable, type NumberRow, persistenceTable, scalesTables } from "./scales-tables";

/** The figure's numbers as tables, and what rests on memory or is missing; built only while it is open. */
export function ScalesNumbers({ picture }: { readonly picture: ScalesPicture }) {
  const [open, setOpen] = useState(false);
  const { notes } = picture.result;
  return (
    <details className="scales-numbers" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>
        <span>Numbers as tables</span>
        {notes.length > 0 && !open ? <span className="quiet note">{notes.join(" ")}</span> : null}
      </summary>
      {open ? (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable from the keyboard
        <section className="scales-tables" tabIndex={0} aria-label="Numbers of the scales">
          {notes.length > 0 ? (
            <ul className="cautions">
              {notes.map((note) => (
                <li key={note}>{note}</li>
              ))}
            </ul>
          ) : null}
          {scalesTables(picture.result).map(({ title, rows }) => (
            <Table key={title} title={title} rows={rows} />
          ))}
          <ByLatitude {...persistenceTable(picture.result)} />
        </section>
      ) : null}
    </details>
  );
}

function Table({ title, rows }: { readonly title: string; readonly rows: readonly NumberRow[] }) {
  return (
    <table className="table">
      <caption>{title}</caption>
      <thead>
        <tr>
          <th scope="col">What</th>
          <th scope="col">Value</th>
          <th scope="col">95 % limits</th>
          <th scope="col">Rests on</th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ name, value, limits, basis }) => (
          <tr key={name}>
            <td>
              <Units text={name} />
            </td>
            <td>
              <Units text={value} />
            </td>
            <td>
              <Units text={limits} />
            </td>
            <td>{basis}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function ByLatitude({ title, heads, rows }: LatitudeTable) {
  return (
    <table className="table">
      <caption>{title}</caption>
      <thead>
        <tr>
          {heads.map((head) => (
            <th key={head} scope="col">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map(([latitude, ...texts]) => (
          <tr key={latitude}>
            <td>{latitude}</td>
            {texts.map((text, index) => (
              <td key={heads[index + 1]}>{text}</td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
