import type { Plane, SpectrumResult } from "./results";

/** A number with its 95 % limits; NaN limits where none can be given. */
export interface Estimate {
  readonly value: number;
  readonly low95: number;
  readonly high95: number;
}

/** Period spectrum of u with the factors that turn a density into its 95 % limits. */
export interface PeriodSpectrum extends SpectrumResult {
  /** Of one cell's spectrum: neighbouring cells tell much the same, so that the limits are on the wide side. */
  readonly degreesOfFreedom: number;
  readonly lowFactor: number;
  readonly highFactor: number;
}

/** One-sided wavenumber spectrum of u: cycles a metre, m2 s-2 per cycle a metre. */
export interface WavenumberCurve {
  readonly wavenumber: Float64Array;
  readonly density: Float64Array;
}

/** Spectra along one direction; null where no line is whole enough. */
export interface DirectionSpectra {
  /** Mean over the chosen dates of each map's own spectrum, mean flow and all. */
  readonly eachMap: WavenumberCurve | null;
  readonly timeMean: WavenumberCurve | null;
  /** Mean over the chosen dates in the study's band; null without a band. */
  readonly inBand: WavenumberCurve | null;
}

/** Two-dimensional spectrum of kinetic energy, the mean over the chosen dates. */
export interface EnergyPlane {
  /** Cycles a metre, rising, zero in the middle; eastward and northward positive. */
  readonly zonal: Float64Array;
  readonly meridional: Float64Array;
  /** Density, meridional × zonal, m2 s-2 m2. */
  readonly density: Plane;
  /** Boundary between waves and turbulence, K2 = (beta / U) cos(angle), on the eastward side; the other mirrors it. */
  readonly boundary: { readonly zonal: Float64Array; readonly meridional: Float64Array };
  /** Speed that draws the boundary, m s-1. */
  readonly speed: number;
  /** Share of the energy inside the boundary, the mean of each map left out. */
  readonly shareInside: number;
}

export interface DispersionCurve {
  readonly id: "at-rest" | "in-flow";
  /** Wavelength along the meridian in metres; Infinity for waves that are even along it. */
  readonly meridionalWavelength: number;
  /** Cycles a metre; negative is westward. */
  readonly wavenumber: Float64Array;
  /** Cycles a day. */
  readonly frequency: Float64Array;
}

/** Spectrum of v along one latitude: frequency × zonal wavenumber. */
export interface FrequencyWavenumber {
  /** Cycles a day, from 0. */
  readonly frequency: Float64Array;
  /** Cycles a metre, rising; negative moves west. */
  readonly wavenumber: Float64Array;
  /** m2 s-2 day m, frequency × wavenumber. */
  readonly density: Plane;
  readonly curves: readonly DispersionCurve[];
}

/** A length on the ruler. All stand as half-wavelengths: from an eastward jet's core to the next westward one's. */
export interface RulerLength {
  readonly id: string;
  readonly title: string;
  readonly halfWavelength: Estimate;
  /** How the half-wavelength follows from what was measured, in words. */
  readonly basis: string;
}

/** Lengths and speeds over latitude; one entry a row, NaN where unknown. SI units. */
export interface ScalesByLatitude {
  /** Root mean square of the velocity vector, m s-1: whole flow, and departures from each cell's time mean. */
  readonly totalSpeed: Float64Array;
  readonly eddySpeed: Float64Array;
  readonly beta: Float64Array;
  readonly deformationRadius: Float64Array;
  readonly longWaveSpeed: Float64Array;
  /** Rhines scale in metres by convention (see core/jets/scales/rhines-scale.ts), with either speed. */
  readonly rhines: Readonly<Record<string, { readonly total: Float64Array; readonly eddy: Float64Array }>>;
}

export interface ScaleLengths {
  readonly ruler: readonly RulerLength[];
  /** Mean distance between neighbouring extremes of one sign, metres; NaN with under two. */
  readonly meanSpacing: number;
  readonly bandSpacing: number;
  /** Wavelength where wavenumber times density of each map's u peaks along the meridian, metres. */
  readonly peakWavelength: Estimate;
  readonly timeMeanPeakWavelength: number;
  /** Whole region: root mean square of the velocity vector, m s-1. */
  readonly totalSpeed: number;
  readonly eddySpeed: number;
  /** Which of the two the study takes for the Rhines scale. */
  readonly rhinesSpeed: "total" | "eddy";
  /** Rhines scale at the middle latitude in metres, by convention. */
  readonly rhines: Readonly<Record<string, { readonly total: number; readonly eddy: number }>>;
  readonly beta: number;
  readonly deformationRadius: number;
  /** "table" is from memory and off by up to 15 %. */
  readonly deformationSource: "table" | "wave speed" | "file";
  /** Shortest wavelengths, metres: what the study says the mapping resolves, and twice the grid's spacing. */
  readonly resolvedWavelength: number;
  readonly gridWavelength: number;
}

/** Kinetic energy of the flow by time scale; the three shares add up to one. */
export interface EnergyByPeriod {
  /** m2 s-2. */
  readonly total: number;
  /** Days between "weeks" and "months", and between "months" and "longer". */
  readonly weeksDays: number;
  readonly monthsDays: number;
  readonly weeksShare: number;
  readonly monthsShare: number;
  /** Longer periods and the mean. */
  readonly longerShare: number;
}

/** How a pattern moves, from the lines of a position-time picture whose means vary most. */
export interface Drift {
  readonly quantity: string;
  /** m s-1, eastward or northward positive. */
  readonly speed: Estimate;
  readonly limits: "bootstrap" | "peak width";
  /** Share of the variance between the lines, corrected for chance, and the median over all slopes. */
  readonly share: number;
  readonly medianShare: number;
  /** Rows are positions (longitudes or latitudes), columns times. */
  readonly picture: Plane;
  /** Degrees. */
  readonly position: Float64Array;
  /** Days since 1970-01-01 of each column. */
  readonly days: Float64Array;
}

/** Speeds of Rossby waves at the chosen latitude, m s-1, eastward positive. */
export interface WaveSpeeds {
  readonly longWave: number;
  /** Carried by the mean flow there, its curvature in the gradient. */
  readonly longWaveInFlow: number;
  /** Phase speed at the peaks of the zonal spectrum of v and the meridional one of u; NaN without peaks. */
  readonly atPeak: number;
  readonly atPeakInFlow: number;
  readonly zonalWavelength: number;
  readonly meridionalWavelength: number;
  /** Days; no free wave is faster without flow. */
  readonly shortestPeriodDays: number;
  readonly meanFlow: number;
}

/** Regression of momentum-flux convergence on the zonal-mean flow. */
export interface PushEstimate {
  /** Per day; positive pushes the jets along. */
  readonly perDay: Estimate;
  readonly correlation: number;
  readonly effectivePairs: number;
}

export interface ForcingResult {
  readonly meanFlow: Float64Array;
  /** Time mean of the zonal mean of u'v' about each date's zonal mean, m2 s-2. */
  readonly flux: Float64Array;
  /** m s-2. */
  readonly convergence: Float64Array;
  /** Latitude × time, block means, m s-2. */
  readonly latitudeTime: Plane;
  readonly days: Float64Array;
  /** All latitudes and dates about one mean: steady jets count; and about each latitude's own mean. */
  readonly push: PushEstimate;
  readonly pushInTime: PushEstimate;
  /** Mean convergence on mean flow over the latitudes: whether eddies hold up the standing jets. */
  readonly pushOfMeans: PushEstimate;
  /** Energy from eddies to the zonal-mean flow, W kg-1 (m2 s-3). */
  readonly conversion: Estimate;
  /** beta - U_yy of the mean flow, m-1 s-1, and the latitudes where it changes sign. */
  readonly gradient: Float64Array;
  readonly signChanges: readonly number[];
}

export interface PersistenceResult {
  readonly inBand: boolean;
  /** Days between the dates of the maps that were counted. */
  readonly stepDays: number;
  /** Share of dates with the prevailing sign (0.5 … 1), NaN where there is none; longest run in days. */
  readonly share: Plane;
  readonly longestDays: Plane;
  /** 1 eastward, -1 westward prevails. */
  readonly sign: Int8Array;
  /** Of the zonal means, every date. */
  readonly byLatitude: {
    readonly share: Float64Array;
    readonly longestDays: Float64Array;
    readonly sign: Int8Array;
  };
}

/** Everything the Scales view draws. SI units; null where the record cannot tell, with a line in `notes`. */
export interface ScalesResult {
  readonly latitude: Float64Array;
  readonly middleLatitude: number;
  /** Latitude of the row along which waves and drift are looked at. */
  readonly alongLatitude: number;
  readonly period: PeriodSpectrum | null;
  readonly zonal: DirectionSpectra;
  readonly meridional: DirectionSpectra;
  /** Dates whose maps were transformed. */
  readonly mapDates: Int32Array;
  readonly plane: EnergyPlane | null;
  readonly frequencyWavenumber: FrequencyWavenumber | null;
  readonly lengths: ScaleLengths;
  readonly byLatitude: ScalesByLatitude;
  readonly zonality: { readonly days: Float64Array; readonly zonality: Float64Array };
  readonly energy: EnergyByPeriod | null;
  readonly drift: { readonly alongLatitude: Drift | null; readonly acrossLatitudes: Drift | null };
  readonly waves: WaveSpeeds;
  readonly forcing: ForcingResult;
  readonly persistence: PersistenceResult;
  /** What is missing and why, and what rests on memory; sentences. */
  readonly notes: readonly string[];
}
