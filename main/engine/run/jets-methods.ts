import type { Study } from "../../../core/study/schema";
import type { JetsAnalysis } from "./jets-analysis";

/** Paragraphs on jets and their test for methods.md; none where no jets were looked for. */
export function jetsMethods({ jets, eddyTest }: JetsAnalysis, study: Study): string[] {
  if (!jets) return [];
  const { fastestDegreesPerDay, longestGapDays, leastLifetimeDays, sectorDegrees } = study.jets;
  const found =
    `Jets are extremes of the zonal-mean eastward velocity in latitude at each date, of at least ${(100 * jets.prominence).toFixed(2)} cm s⁻¹ ` +
    `prominence, refined by a parabola and followed by least-cost matching within half a width and ${fastestDegreesPerDay}° a day over gaps of up to ` +
    `${longestGapDays} days; lines that live ${leastLifetimeDays} days or more are listed (${jets.jets.length} of ${jets.jets.length + jets.shorterLines}). ` +
    `Extent and tilt come from longitude sectors of about ${sectorDegrees}°. Drift is the Theil–Sen slope with limits for the effective sample size.`;
  if (!eddyTest) return [found, ""];
  const { population: eddies } = eddyTest;
  const tests = eddyTest.verdicts.filter(({ leads }) => leads).length;
  const held = eddyTest.verdicts.filter(({ verdict }) => verdict === "held").length;
  const tested =
    `Each jet was held against ${eddyTest.oceans} random oceans of passing Gaussian eddies (seed ${eddyTest.seed}) sampled on the same dates and taken through ` +
    `the same background, band and search: median amplitude ${(100 * eddies.medianAmplitudeMetres).toFixed(1)} cm, radius ${(eddies.medianRadiusMetres / 1000).toFixed(0)} km, ` +
    `${eddies.densityPerMillionKm2.toFixed(2)} eddies per million km², lifetime ${eddies.lifetimeDays.toFixed(0)} days, moving ${Math.abs(100 * eddies.speedMetresPerSecond).toFixed(1)} cm s⁻¹ ${eddies.speedMetresPerSecond < 0 ? "westward" : "eastward"}, estimated from the maps unless set by hand. ` +
    `p is the share of oceans with a jet of the same direction within ${eddyTest.halfSpacingDegrees.toFixed(2)}° that scores as high (mean speed times the root of the share of dates), ` +
    `corrected by Benjamini & Hochberg (1995) at ${100 * eddyTest.level} % over the ${tests} jets that no stronger one of their direction stands beside; ` +
    `the others are judged by the same threshold. ${held} of ${eddyTest.verdicts.length} jets are held${held < eddyTest.verdicts.length ? "; what is not held is not told apart from eddies" : ""}. ` +
    "The neighbourhood is half the spacing of jets of one direction, the record's own or the oceans', whichever is wider.";
  return [found, "", tested, ""];
}
