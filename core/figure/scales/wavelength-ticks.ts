import type { Tick } from "../ticks";

/** Steps of wavenumber, as wavelengths in km, whose multiples are mostly round wavelengths too: 600, 300, 200, 150 …; fine ones first. */
const stepsKm = [12_000, 6000, 3000, 2000, 1200, 600, 300, 200, 120, 100, 60, 30, 20, 12, 6] as const;
const most = 12;

/**
 * Ticks of a linear scale of wavenumber (cycles a metre, either sign), labelled with wavelengths in km and ∞ at zero, at the
 * finest even step that `fits`. Multiples whose wavelength is no whole number of km carry no tick.
 */
export function wavelengthTicks(
  from: number,
  to: number,
  unit: string,
  fits: (ticks: readonly Tick[]) => boolean,
): Tick[] {
  const [lower, upper] = [Math.min(from, to), Math.max(from, to)];
  for (const km of stepsKm) {
    const step = 1 / (1000 * km);
    if ((upper - lower) / step > 2 * most) continue;
    const ticks: Tick[] = [];
    for (let index = Math.ceil(lower / step - 1e-9); index <= upper / step + 1e-9; index++) {
      const length = index === 0 ? 0 : km / Math.abs(index);
      if (!Number.isInteger(length)) continue;
      ticks.push({ value: index * step, label: index === 0 ? "∞" : `${length}${unit}` });
    }
    if (fits(ticks)) return ticks;
  }
  return lower <= 0 && upper >= 0 ? [{ value: 0, label: "∞" }] : [];
}

const logRanks: readonly (readonly number[])[] = [
  [1000, 100, 10, 10_000],
  [500, 200, 50, 20, 2000, 5000],
  [300, 150, 700, 70, 30, 3000],
];

/** Ticks of a logarithmic scale of wavelengths in metres, "500 km", the roundest first, at least `leastGap` (natural logarithms) apart. */
export function logWavelengthTicks(longest: number, shortest: number, leastGap: number): Tick[] {
  const placed: number[] = [];
  for (const rank of logRanks) {
    for (const km of rank) {
      const value = 1000 * km;
      if (value > longest * (1 + 1e-9) || value < shortest * (1 - 1e-9)) continue;
      if (placed.every((other) => Math.abs(Math.log(other / value)) >= leastGap)) placed.push(value);
    }
  }
  return placed.sort((a, b) => b - a).map((value) => ({ value, label: `${value / 1000} km` }));
}
