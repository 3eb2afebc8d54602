import type { Estimate } from "../../model/scales-result";
import { formatNumber, formatSignificant } from "../format";

/** Limits whose middle lies farther from the value than this share of their half distance are written out. */
const evenShare = 0.25;

/** Decimals that show the half width of an interval to one figure, to two where it begins with 1 or 2. */
function decimalsFor(half: number): number {
  const [figures, power] = half.toExponential(1).split("e");
  return Math.max(0, Math.min(12, -Number(power) + (Number(figures) < 3 ? 1 : 0)));
}

/**
 * A value with its 95 % limits, both times `scale`: "−2.4 ± 0.3"; "0.6 (0.4 to 1.0)" where they lie unevenly; the value alone,
 * to three figures, without limits; "unknown" for NaN.
 */
export function estimateText({ value, low95, high95 }: Estimate, scale: number): string {
  if (!Number.isFinite(value)) return "unknown";
  const half = (Math.abs(scale) * (high95 - low95)) / 2;
  if (!(half > 0) || !Number.isFinite(half)) return formatSignificant(value * scale, 3);
  const digits = decimalsFor(half);
  const skew = Math.abs((high95 + low95) / 2 - value) * Math.abs(scale);
  if (skew <= evenShare * half) return `${formatNumber(value * scale, digits)} ± ${formatNumber(half, digits)}`;
  const [low, high] = [low95 * scale, high95 * scale].sort((a, b) => a - b);
  return `${formatNumber(value * scale, digits)} (${formatNumber(low, digits)} to ${formatNumber(high, digits)})`;
}

/** The same in powers of ten, "(3.1 ± 0.9) × 10⁻⁹". */
export function powerText({ value, low95, high95 }: Estimate): string {
  if (!Number.isFinite(value)) return "unknown";
  const size = Math.max(...[value, low95, high95].map(Math.abs).filter(Number.isFinite));
  if (!(size > 0)) return "0";
  const power = Math.floor(Math.log10(size) + 1e-9);
  const text = estimateText({ value, low95, high95 }, 10 ** -power);
  const shown = /[ (]/.test(text) ? `(${text})`.replace(/^\((.*) \((.*)\)\)$/, "($1, $2)") : text;
  return power === 0 ? text : `${shown} × 10${superscript(power)}`;
}

function superscript(power: number): string {
  return [...String(power)].map((figure) => (figure === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(figure)])).join("");
}
