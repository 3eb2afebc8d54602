import {
  type CarryingFlow,
  longWaveSpeed,
  rossbyFrequency,
  rossbyPhaseSpeed,
  shortestRossbyPeriodDays,
} from "../../jets/scales/rossby-waves";
import type { DispersionCurve, FrequencyWavenumber, WaveSpeeds } from "../../model/scales-result";
import type { FrequencyWavenumberSpectrum } from "../../numeric/spectra/frequency-wavenumber";
import { peakWavelength } from "./peak-wavelength";

/** What Rossby waves at a latitude depend on: SI units. */
export interface WaveSetting {
  readonly beta: number;
  readonly deformationRadius: number;
  readonly flow: CarryingFlow;
}

const curvePoints = 80;
const secondsPerDay = 86400;

/** Angular wavenumber of a wavelength in metres; 0 for Infinity. */
function angular(wavelength: number): number {
  return (2 * Math.PI) / wavelength;
}

/**
 * Dispersion curves up to a wavenumber in cycles a metre: at rest and in the mean flow, even along the meridian and, where
 * it is known, with the meridional wavelength given. Waves that go east under a strong flow have positive wavenumbers.
 */
export function dispersionCurves(
  setting: WaveSetting,
  highest: number,
  meridionalWavelength: number,
): DispersionCurve[] {
  const { beta, deformationRadius, flow } = setting;
  const across = [Number.POSITIVE_INFINITY, meridionalWavelength].filter((length) => length > 0);
  return across.flatMap((length) =>
    (["at-rest", "in-flow"] as const).map((id): DispersionCurve => {
      const wavenumber = new Float64Array(curvePoints);
      const frequency = new Float64Array(curvePoints);
      for (let i = 0; i < curvePoints; i++) {
        const cycles = (highest * (i + 1)) / curvePoints;
        const carried = id === "in-flow" ? flow : undefined;
        const omega = rossbyFrequency(2 * Math.PI * cycles, angular(length), beta, deformationRadius, carried);
        wavenumber[i] = omega < 0 ? -cycles : cycles;
        frequency[i] = (Math.abs(omega) / (2 * Math.PI)) * secondsPerDay;
      }
      return { id, meridionalWavelength: length, wavenumber, frequency };
    }),
  );
}

/** Wave speeds of a setting, with the wavelengths (metres) at which spectra peak; NaN for unknown wavelengths. */
export function waveSpeeds(setting: WaveSetting, zonalWavelength: number, meridionalWavelength: number): WaveSpeeds {
  const { beta, deformationRadius, flow } = setting;
  const at = (k: number, l: number, carried?: CarryingFlow) => rossbyPhaseSpeed(k, l, beta, deformationRadius, carried);
  const [k, l] = [angular(zonalWavelength), angular(meridionalWavelength)];
  return {
    longWave: longWaveSpeed(beta, deformationRadius),
    longWaveInFlow: at(0, 0, flow),
    atPeak: at(k, l),
    atPeakInFlow: at(k, l, flow),
    zonalWavelength,
    meridionalWavelength,
    shortestPeriodDays: shortestRossbyPeriodDays(beta, deformationRadius),
    meanFlow: flow.speed,
  };
}

/** The setting of a row: `gradient` is beta - U_yy of the mean flow; where it is not known the flow counts as uncurved. */
export function waveSettingAt(
  row: number,
  beta: number,
  deformationRadius: number,
  meanFlow: Float64Array,
  gradient: Float64Array,
): WaveSetting {
  const curvature = Number.isNaN(gradient[row]) ? 0 : beta - gradient[row];
  return { beta, deformationRadius, flow: { speed: meanFlow[row], curvature } };
}

/** Zonal wavelength in metres of most variance over all frequencies, both directions together; NaN without a spectrum. */
export function zonalPeak(spectrum: FrequencyWavenumberSpectrum | null): number {
  if (!spectrum) return Number.NaN;
  const { wavenumber, frequency, density } = spectrum;
  const columns = wavenumber.length;
  const zero = wavenumber.indexOf(0);
  const folded = new Float64Array(columns - zero);
  for (let f = 0; f < frequency.length; f++) {
    for (let k = 0; k < columns; k++) {
      const at = Math.abs(k - zero);
      if (at < folded.length) folded[at] += density[f * columns + k];
    }
  }
  return peakWavelength(wavenumber.slice(zero), folded);
}

/** The spectrum for display with the dispersion curves of a setting over it. */
export function withCurves(
  spectrum: FrequencyWavenumberSpectrum | null,
  setting: WaveSetting,
  meridionalWavelength: number,
): FrequencyWavenumber | null {
  if (!spectrum) return null;
  const { frequency, wavenumber, density } = spectrum;
  const highest = wavenumber[wavenumber.length - 1];
  return {
    frequency,
    wavenumber,
    density: { rows: frequency.length, columns: wavenumber.length, values: Float32Array.from(density) },
    curves: dispersionCurves(setting, highest, meridionalWavelength).filter(({ frequency: curve }) =>
      curve.every(Number.isFinite),
    ),
  };
}
