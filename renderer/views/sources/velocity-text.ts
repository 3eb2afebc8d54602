import type { SuppliedVelocityReport } from "../../../core/contract/engine";
import { displayUnits } from "../../../core/figure/display-units";
import { formatNumber, formatSignificant } from "../../../core/figure/format";
import type { AgreementNumbers, ComponentAgreementNumbers } from "../../../core/model/results";
import type { GeostrophySettings } from "../../../core/study/schema";

type Convention = SuppliedVelocityReport["conventions"][number]["convention"];

/** Velocities are compared as they stand, or about each one's mean where the heights have another reference. */
export function measured(report: SuppliedVelocityReport, component: ComponentAgreementNumbers): AgreementNumbers {
  return isAboutMean(report) ? component.anomalies : component.all;
}

export function isAboutMean({ matchesHeight, dates }: SuppliedVelocityReport): boolean {
  return matchesHeight === false && dates > 1;
}

/** A velocity in display units, without them, to thousandths: "0.420". */
export function speedText(metresPerSecond: number): string {
  return formatNumber(metresPerSecond * displayUnits("m s-1").scale, 3);
}

/** The same in a sentence: what thousandths cannot show reads "under 0.001". */
function smallText(value: number, least: number): string {
  return value > 0 && value < least ? `under ${least}` : formatNumber(value, -Math.log10(least));
}

/** An rms difference for a sentence, in display units without them. */
export function differenceText(metresPerSecond: number): string {
  return smallText(metresPerSecond * displayUnits("m s-1").scale, 0.001);
}

export const speedUnits = displayUnits("m s-1").units;

export function correlationText(correlation: number): string {
  return formatNumber(correlation, 3);
}

/** "7 points, ellipsoid, gravity by latitude"; "3 points, sphere of 6371 km, gravity 9.81 m s⁻²". */
export function conventionText({ stencil, earth, radius, gravity }: Convention): string {
  const shape = earth === "sphere" ? `sphere of ${formatSignificant(radius / 1000, 7)} km` : earth;
  return `${stencil} points, ${shape}, gravity ${gravity === "latitude" ? "by latitude" : `${gravity} m s⁻²`}`;
}

/** Whether a study computes currents in this way. The radius matters on a sphere only. */
export function isStudysOwn({ stencil, earth, radius, gravity }: Convention, settings: GeostrophySettings): boolean {
  return (
    stencil === settings.stencil &&
    earth === settings.earth &&
    gravity === settings.gravity &&
    (earth !== "sphere" || radius === settings.radius)
  );
}

/** The convention as settings; null for one that a study cannot hold. */
export function conventionSettings({
  stencil,
  earth,
  radius,
  gravity,
}: Convention): Pick<GeostrophySettings, "stencil" | "earth" | "radius" | "gravity"> | null {
  const known = ([3, 5, 7, 9] as const).find((points) => points === stencil);
  if (known === undefined || (earth !== "ellipsoid" && earth !== "sphere")) return null;
  return { stencil: known, earth, radius, gravity };
}

/** What the best convention's numbers allow to be said, in two sentences. */
export function claimText(report: SuppliedVelocityReport): string {
  const [best] = report.conventions;
  const difference = best && (isAboutMean(report) ? best.rmsAnomalyDifference : best.rmsDifference);
  const rule =
    "That the supplied velocities were made this way may be claimed only if this is a small part of their rms";
  if (!best || !(best.rmsSupplied > 0) || !Number.isFinite(difference))
    return `${rule}; it could not be measured here.`;
  const share = (100 * difference) / best.rmsSupplied;
  return `${rule} of ${speedText(best.rmsSupplied)} ${speedUnits}; here it is ${smallText(share, 0.1)} %.`;
}
