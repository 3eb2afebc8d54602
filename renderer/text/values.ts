import { displayUnits } from "../../core/figure/display-units";
import { formatNumber } from "../../core/figure/format";
import { errorsWithin95 } from "../../core/figure/latitudes/doubtful-cells";

/** How values of one field are written: the same decimals everywhere, so that they do not jump while a person moves. */
export interface ValueStyle {
  readonly scale: number;
  readonly digits: number;
  readonly units: string;
}

/** Style for a quantity in SI units whose largest shown magnitude is `limit`: three figures at the limit. */
export function valueStyle(siUnits: string, limit: number): ValueStyle {
  const { scale, units } = displayUnits(siUnits);
  const size = Math.abs(limit) * scale;
  const digits = size > 0 && Number.isFinite(size) ? Math.max(0, Math.min(6, 2 - Math.floor(Math.log10(size)))) : 2;
  return { scale, digits, units };
}

/** A value with its unit; NaN reads "no data". */
export function valueText(style: ValueStyle, value: number): string {
  return Number.isFinite(value) ? withUnits(formatNumber(value * style.scale, style.digits), style.units) : "no data";
}

/** A value with what 95 % of its errors lie within; the value alone where its standard error is not known. */
export function doubtText(style: ValueStyle, value: number, standardError: number | undefined): string {
  if (standardError === undefined || !Number.isFinite(standardError) || !Number.isFinite(value))
    return valueText(style, value);
  return intervalText(style, value, errorsWithin95 * standardError);
}

/** A value with the half width of its interval, a dash where that is not known; a missing value reads "no data". */
export function intervalText(style: ValueStyle, mean: number, half: number): string {
  if (!Number.isFinite(mean)) return "no data";
  const parts = [mean, half].map((part) => formatNumber(part * style.scale, style.digits));
  return withUnits(parts.join(" ± "), style.units);
}

function withUnits(text: string, units: string): string {
  return units === "" ? text : `${text} ${units}`;
}
