import { expect } from "vitest";

export interface Tolerance {
  readonly relative?: number;
  readonly absolute?: number;
  /** Why this tolerance and not a smaller one. */
  readonly because: string;
}

/** Asserts that two numbers agree within a tolerance that carries its reason; NaN equals NaN only. */
export function expectClose(got: number, wanted: number, tolerance: Tolerance, what = "value"): void {
  if (Number.isNaN(got) && Number.isNaN(wanted)) return;
  const allowed = (tolerance.absolute ?? 0) + (tolerance.relative ?? 0) * Math.abs(wanted);
  const off = Math.abs(got - wanted);
  if (!(off <= allowed)) {
    expect.fail(`${what}: got ${got}, wanted ${wanted}, off by ${off}, allowed ${allowed} (${tolerance.because})`);
  }
}

/** The same for arrays; a relative tolerance is taken against the largest magnitude wanted, `null` reads as NaN. */
export function expectAllClose(
  got: ArrayLike<number>,
  wanted: ArrayLike<number | null>,
  tolerance: Tolerance,
  what = "array",
): void {
  expect(got.length, `${what}: length`).toBe(wanted.length);
  let scale = 0;
  for (let i = 0; i < wanted.length; i++) scale = Math.max(scale, Math.abs(wanted[i] ?? 0) || 0);
  const absolute = (tolerance.absolute ?? 0) + (tolerance.relative ?? 0) * scale;
  for (let i = 0; i < wanted.length; i++) {
    expectClose(got[i], wanted[i] ?? Number.NaN, { absolute, because: tolerance.because }, `${what}[${i}]`);
  }
}
