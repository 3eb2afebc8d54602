import { formatNumber } from "../../core/figure/format";

/** What a typed number must be. */
export interface NumberRule {
  /** In the plural, "days"; empty for a plain number. */
  readonly unit: string;
  readonly least: number;
  readonly most: number;
  readonly whole?: boolean;
  /** A blank field is an answer of its own: null. */
  readonly optional?: boolean;
}

export type NumberReading<Value> = { readonly value: Value } | { readonly fault: string };

/** Reads a typed number; a comma or a real minus sign will do. The fault is a sentence that says what is wanted. */
export function readNumber(text: string, rule: NumberRule): NumberReading<number | null> {
  const trimmed = text.trim();
  if (trimmed === "" && rule.optional) return { value: null };
  const value = trimmed === "" ? Number.NaN : Number(trimmed.replace("−", "-").replace(",", "."));
  const fits = value >= rule.least && value <= rule.most && (!rule.whole || Number.isInteger(value));
  return fits ? { value } : { fault: wanted(rule) };
}

function wanted({ unit, least, most, whole, optional }: NumberRule): string {
  const kind = whole ? "A whole number" : "A number";
  const of = unit === "" ? "" : ` of ${unit}`;
  const range = `${boundText(least)} to ${boundText(most)}`;
  return `${kind}${of} from ${range}${optional ? ", or blank" : ""}.`;
}

function boundText(value: number): string {
  return formatNumber(value, Number.isInteger(value) ? 0 : 2);
}
