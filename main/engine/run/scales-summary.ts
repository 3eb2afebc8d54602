import type { Drift, Estimate, PushEstimate, ScalesResult } from "../../../core/model/scales-result";

/** Headline numbers of the scales for summary.json, each with its unit. */
export function scalesSummary(scales: ScalesResult): object {
  const { lengths, drift, waves, forcing, energy, zonality, plane } = scales;
  const last = zonality.days.length - 1;
  return {
    middleLatitude: number(scales.middleLatitude, "degrees_north"),
    meanSpacing: number(lengths.meanSpacing, "m"),
    bandSpacing: number(lengths.bandSpacing, "m"),
    peakMeridionalWavelength: estimate(lengths.peakWavelength, "m"),
    peakMeridionalWavelengthOfMean: number(lengths.timeMeanPeakWavelength, "m"),
    rmsSpeed: number(lengths.totalSpeed, "m s-1"),
    rmsEddySpeed: number(lengths.eddySpeed, "m s-1"),
    rhines: Object.fromEntries(
      Object.entries(lengths.rhines).map(([convention, { total, eddy }]) => [
        convention,
        { total: number(total, "m"), eddy: number(eddy, "m") },
      ]),
    ),
    deformationRadius: { ...number(lengths.deformationRadius, "m"), source: lengths.deformationSource },
    energyInsideWaveBoundary: number(plane?.shareInside ?? Number.NaN, "1"),
    zonality: {
      shortest: { ...number(zonality.zonality[0], "1"), days: zonality.days[0] ?? null },
      longest: { ...number(zonality.zonality[last], "1"), days: zonality.days[last] ?? null },
    },
    kineticEnergy: energy
      ? {
          total: number(energy.total, "m2 s-2"),
          weeks: { ...number(energy.weeksShare, "1"), periods: `under ${energy.weeksDays} days` },
          months: { ...number(energy.monthsShare, "1"), periods: `${energy.weeksDays} to ${energy.monthsDays} days` },
          longer: { ...number(energy.longerShare, "1"), periods: `over ${energy.monthsDays} days, and the mean` },
        }
      : null,
    waves: {
      latitude: number(scales.alongLatitude, "degrees_north"),
      longWave: number(waves.longWave, "m s-1"),
      longWaveInFlow: number(waves.longWaveInFlow, "m s-1"),
      atPeak: number(waves.atPeak, "m s-1"),
      atPeakInFlow: number(waves.atPeakInFlow, "m s-1"),
      shortestPeriod: number(waves.shortestPeriodDays, "days"),
    },
    driftAlongLatitude: driftOf(drift.alongLatitude),
    driftAcrossLatitudes: driftOf(drift.acrossLatitudes),
    eddyPush: pushOf(forcing.push),
    eddyPushInTime: pushOf(forcing.pushInTime),
    eddyPushOfMeans: pushOf(forcing.pushOfMeans),
    energyToMeanFlow: estimate(forcing.conversion, "W kg-1"),
    signChangesOfGradient: { value: forcing.signChanges, unit: "degrees_north" },
    notes: scales.notes,
  };
}

function number(value: number, unit: string) {
  return { value: Number.isFinite(value) ? value : null, unit };
}

function estimate({ value, low95, high95 }: Estimate, unit: string) {
  return { ...number(value, unit), low95: number(low95, unit).value, high95: number(high95, unit).value };
}

function pushOf({ perDay, correlation, effectivePairs }: PushEstimate) {
  return {
    ...estimate(perDay, "day-1"),
    correlation: number(correlation, "1"),
    effectivePairs: number(effectivePairs, "1"),
  };
}

function driftOf(drift: Drift | null) {
  return drift ? { ...estimate(drift.speed, "m s-1"), quantity: drift.quantity, limits: drift.limits } : null;
}
