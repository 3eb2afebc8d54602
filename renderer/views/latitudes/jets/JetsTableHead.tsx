import { Units } from "../../../text/Units";
import { type JetColumn, type JetOrder, jetColumns } from "./sort-jets";

interface JetsTableHeadProps {
  readonly order: JetOrder;
  readonly onSort: (column: JetColumn) => void;
}

const titles: Readonly<Record<JetColumn, readonly [title: string, unit: string, hint: string]>> = {
  latitude: ["Latitude", "", "Mean latitude over the jet's life"],
  speed: ["Speed", "cm s⁻¹", "Mean eastward speed on its axis"],
  width: ["Width", "km", "Mean width"],
  present: ["Present", "% days", "Share of the days of its life on which it was found"],
  drift: ["Drift", "° yr⁻¹", "Drift northward; its 95 % limits stand below for the jet picked"],
  eddies: ["vs", "eddies", "Chance that eddies alone make as strong a jet near by"],
};

/** Headings with their units; a press sorts by the column. */
export function JetsTableHead({ order, onSort }: JetsTableHeadProps) {
  return (
    <thead>
      <tr>
        {jetColumns.map((column) => {
          const [title, unit, hint] = titles[column];
          const sorted = order.column === column;
          return (
            <th
              key={column}
              scope="col"
              aria-sort={sorted ? (order.descending ? "descending" : "ascending") : undefined}
            >
              <button type="button" title={hint} onClick={() => onSort(column)}>
                <span>
                  {title}
                  {sorted ? (
                    <svg className="sort-mark" viewBox="0 0 8 8" aria-hidden="true">
                      <path d={order.descending ? "M1 2.5L4 6L7 2.5" : "M1 5.5L4 2L7 5.5"} />
                    </svg>
                  ) : null}
                </span>
                {unit === "" ? null : (
                  <span>
                    <Units text={unit} />
                  </span>
                )}
              </button>
            </th>
          );
        })}
      </tr>
    </thead>
  );
}
