import { Fault } from "../../core/model/errors";

/** A date index that the record does not have. */
export function dateIndexFault(got: number, dates: number): Fault {
  return new Fault({
    tag: "request",
    where: "date",
    expected: `an index from 0 to ${dates - 1}`,
    got: String(got),
    advice: "choose a date of the record",
  });
}
