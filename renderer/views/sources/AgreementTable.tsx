import type { AgreementNumbers } from "../../../core/model/results";
import { Units } from "../../text/Units";
import { correlationText, speedText, speedUnits } from "./velocity-text";

interface AgreementTableProps {
  readonly caption: string;
  readonly rows: readonly { readonly name: string; readonly u: AgreementNumbers; readonly v: AgreementNumbers }[];
}

const measures = [
  ["rms difference", ({ rmsDifference }: AgreementNumbers) => speedText(rmsDifference)],
  ["bias", ({ bias }: AgreementNumbers) => speedText(bias)],
  ["rms supplied", ({ rmsSupplied }: AgreementNumbers) => speedText(rmsSupplied)],
  ["correlation", ({ correlation }: AgreementNumbers) => correlationText(correlation)],
] as const;

/** Agreement of both components, a row a part of the record. */
export function AgreementTable({ caption, rows }: AgreementTableProps) {
  return (
    <table className="table agreement">
      <caption className="quiet">
        {caption}; velocities in <Units text={speedUnits} />
      </caption>
      <thead>
        <tr>
          <td />
          <th scope="colgroup" colSpan={measures.length}>
            Eastward
          </th>
          <th scope="colgroup" colSpan={measures.length}>
            Northward
          </th>
        </tr>
        <tr>
          <th scope="col">Latitudes</th>
          {["u", "v"].flatMap((component) =>
            measures.map(([title]) => (
              <th scope="col" key={component + title}>
                {title}
              </th>
            )),
          )}
        </tr>
      </thead>
      <tbody>
        {rows.map(({ name, u, v }) => (
          <tr key={name}>
            <th scope="row">{name}</th>
            {Object.entries({ u, v }).flatMap(([component, numbers]) =>
              measures.map(([title, text]) => <td key={component + title}>{text(numbers)}</td>),
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
