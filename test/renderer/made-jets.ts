import type { EddyTestResult, JetRow, JetsResult, JetVerdictRow } from "../../core/model/jets-result";

/** A jet of the made-up ocean; what a test does not name is of no account to it. */
export function madeJet(part: Partial<JetRow> = {}): JetRow {
  return {
    id: 1,
    sign: 1,
    meanLatitude: 30,
    southernmost: 29.5,
    northernmost: 30.5,
    meanSpeed: 0.05,
    peakSpeed: 0.08,
    meanWidthKm: 200,
    zonalExtent: 0.9,
    tilt: 0.01,
    firstDay: 22_340,
    lastDay: 22_400,
    lifetimeDays: 63,
    datesFound: 21,
    shareOfDaysPresent: 1,
    shareOfRecord: 0.07,
    driftDegreesPerYear: { value: 0.2, low95: -0.1, high95: 0.5 },
    driftMetresPerSecond: { value: 0.0007, low95: -0.0003, high95: 0.0017 },
    eFoldingDays: 12,
    integralDays: 20,
    effectiveSize: 4,
    beginning: "record start",
    ending: "end",
    dates: Int32Array.from({ length: 21 }, (_, date) => date),
    latitudes: new Float64Array(21).fill(part.meanLatitude ?? 30),
    ...part,
  };
}

export function madeJets(key: string, jets: readonly JetRow[], rows = 43): JetsResult {
  const perRow = () => new Float64Array(rows).fill(0.2);
  return {
    key,
    jets,
    shorterLines: 3,
    prominence: 0.01,
    spacingKm: 220,
    persistence: { share: perRow(), longestDays: perRow() },
    redNoise: { bandP: perRow(), meanP: perRow() },
    redNoiseHeld: { band: new Uint8Array(rows), mean: new Uint8Array(rows) },
  };
}

export function madeVerdict(jet: number, p: number, verdict: JetVerdictRow["verdict"] = "held"): JetVerdictRow {
  return {
    jet,
    score: 1,
    oceansAsStrong: Math.round(500 * p),
    oceans: 500,
    p,
    adjustedP: 1.5 * p,
    leads: true,
    verdict,
  };
}

export function madeTest(key: string, verdicts: readonly JetVerdictRow[]): EddyTestResult {
  return {
    key,
    seed: 1,
    oceans: 500,
    level: 0.05,
    verdicts,
    halfSpacingDegrees: 0.8,
    population: {
      medianAmplitudeMetres: 0.08,
      medianRadiusMetres: 90_000,
      densityPerMillionKm2: 12,
      lifetimeDays: 120,
      speedMetresPerSecond: -0.04,
      shareHigh: 0.5,
      notes: { amplitude: "made up" },
    },
  };
}
