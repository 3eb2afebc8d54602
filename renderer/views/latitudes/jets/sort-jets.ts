import type { JetRow, JetVerdictRow } from "../../../../core/model/jets-result";

/** Columns of the table of jets, in their order. */
export const jetColumns = ["latitude", "speed", "width", "present", "drift", "eddies"] as const;
export type JetColumn = (typeof jetColumns)[number];

export interface JetOrder {
  readonly column: JetColumn;
  readonly descending: boolean;
}

/** From north to south, as on the map beside the table. */
export const mapOrder: JetOrder = { column: "latitude", descending: true };

/** The order after a press on a column's heading: another column begins with what matters most there, the same one turns. */
export function turnedOrder(order: JetOrder, column: JetColumn): JetOrder {
  if (order.column === column) return { column, descending: !order.descending };
  return { column, descending: column !== "eddies" };
}

/** Jets in the order asked for; speeds and drifts by their size. Unknown values stand last either way, ties from north to south. */
export function sortJets(
  jets: readonly JetRow[],
  verdicts: ReadonlyMap<number, JetVerdictRow>,
  { column, descending }: JetOrder,
): readonly JetRow[] {
  const value: Readonly<Record<JetColumn, (jet: JetRow) => number>> = {
    latitude: (jet) => jet.meanLatitude,
    speed: (jet) => Math.abs(jet.meanSpeed),
    width: (jet) => jet.meanWidthKm,
    present: (jet) => jet.shareOfDaysPresent,
    drift: (jet) => Math.abs(jet.driftDegreesPerYear.value),
    eddies: (jet) => verdicts.get(jet.id)?.p ?? Number.NaN,
  };
  const of = value[column];
  return [...jets].sort((a, b) => {
    const [first, second] = [of(a), of(b)];
    const known = Number(Number.isFinite(second)) - Number(Number.isFinite(first));
    const apart = known || (known === 0 && Number.isFinite(first) ? (descending ? second - first : first - second) : 0);
    return apart || b.meanLatitude - a.meanLatitude;
  });
}
