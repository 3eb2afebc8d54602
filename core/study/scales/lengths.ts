import { type RhinesConvention, rhinesConventions, rhinesScale } from "../../jets/scales/rhines-scale";
import { longWaveSpeed } from "../../jets/scales/rossby-waves";
import type { Estimate, ScaleLengths, ScalesByLatitude } from "../../model/scales-result";
import type { Study } from "../schema";
import { type DeformationChoice, deformationSource } from "./deformation";
import type { FlowSpeeds } from "./flow-speeds";
import { rulerOf } from "./ruler";
import { meanSpacing, meanSpacingOfDates } from "./spacing";

const conventions = Object.keys(rhinesConventions) as RhinesConvention[];

function byConvention<T>(make: (convention: RhinesConvention) => T): Record<string, T> {
  return Object.fromEntries(conventions.map((convention) => [convention, make(convention)]));
}

/** Speeds, beta and the scales that follow, one entry a row; SI units. */
export function lengthsByLatitude(speeds: FlowSpeeds, beta: Float64Array, radius: Float64Array): ScalesByLatitude {
  const scales = (speed: Float64Array, convention: RhinesConvention) =>
    speed.map((value, row) => rhinesScale(value, beta[row], convention));
  return {
    totalSpeed: speeds.totalByRow,
    eddySpeed: speeds.eddyByRow,
    beta,
    deformationRadius: radius,
    longWaveSpeed: radius.map((value, row) => longWaveSpeed(beta[row], value)),
    rhines: byConvention((convention) => ({
      total: scales(speeds.totalByRow, convention),
      eddy: scales(speeds.eddyByRow, convention),
    })),
  };
}

/** What the region's lengths are worked out from; SI units, beta and radius at the middle latitude. */
export interface LengthParts {
  /** Time and zonal mean of u, one a latitude. */
  readonly profile: Float64Array;
  /** u in the band, `bandPicture[row * dates + date]`; null without a band. */
  readonly bandPicture: Float64Array | null;
  readonly latitude: Float64Array;
  readonly speeds: FlowSpeeds;
  readonly beta: number;
  readonly radius: number;
  readonly deformation: DeformationChoice;
  readonly peak: Estimate;
  readonly meanPeak: number;
  readonly gridWavelength: number;
  readonly study: Study;
}

export function scaleLengths(parts: LengthParts): ScaleLengths {
  const { profile, bandPicture, latitude, speeds, beta, study } = parts;
  const { geostrophy, jets, scales } = study;
  const lengths = {
    meanSpacing: meanSpacing(profile, latitude, jets.prominence, geostrophy),
    bandSpacing: bandPicture ? meanSpacingOfDates(bandPicture, latitude, jets.prominence, geostrophy) : Number.NaN,
    peakWavelength: parts.peak,
    timeMeanPeakWavelength: parts.meanPeak,
    totalSpeed: speeds.total,
    eddySpeed: speeds.eddy,
    rhinesSpeed: scales.rhinesSpeed,
    rhines: byConvention((convention) => ({
      total: rhinesScale(speeds.total, beta, convention),
      eddy: rhinesScale(speeds.eddy, beta, convention),
    })),
    beta,
    deformationRadius: parts.radius,
    deformationSource: deformationSource(parts.deformation),
    resolvedWavelength: scales.resolvedKm * 1000,
    gridWavelength: parts.gridWavelength,
  };
  return { ...lengths, ruler: rulerOf(lengths) };
}
