import type { HeightReference } from "./source";

/** A picture of latitude × something, row-major, latitudes ascending, NaN where missing. */
export interface Plane {
  readonly rows: number;
  readonly columns: number;
  readonly values: Float32Array;
}

/** Profile over latitude with its 95 % band; all arrays are as long as the latitude axis; NaN where too few cells. */
export interface Profile {
  readonly mean: Float64Array;
  /** Half width of the 95 % confidence interval of the mean. */
  readonly half95: Float64Array;
  readonly effectiveSize: Float64Array;
  /** Number of dates that entered. */
  readonly dates: Float64Array;
}

/** Response of the study's filter on the spectrum's frequency axis. */
export interface BandResponse {
  /** Cycles a day. */
  readonly frequency: Float64Array;
  readonly amplitude: Float64Array;
  /** Weights on each side of the centre. */
  readonly halfWidthSteps: number;
  readonly daysLostEachEnd: number;
}

/** Region-mean power spectrum by period (Welch). Density is one-sided, variance units per cycle a day. */
export interface SpectrumResult {
  readonly quantity: string;
  readonly frequency: Float64Array;
  readonly density: Float64Array;
  readonly segments: number;
  readonly segmentDays: number;
  readonly window: string;
  readonly units: string;
}

/** How two velocities agree, m s-1. */
export interface AgreementNumbers {
  readonly count: number;
  readonly rmsDifference: number;
  /** Mean of ours minus supplied. */
  readonly bias: number;
  readonly correlation: number;
  readonly rmsOurs: number;
  readonly rmsSupplied: number;
}

export interface ComponentAgreementNumbers {
  readonly all: AgreementNumbers;
  /** About each one's mean over the compared dates. */
  readonly anomalies: AgreementNumbers;
}

/** The velocities that a grid's files supply beside its heights, compared with ours. */
export interface SuppliedVelocityReport {
  readonly eastward: string;
  readonly northward: string;
  readonly reference: HeightReference;
  readonly matchesHeight: boolean | null;
  readonly foundBy: string;
  readonly notes: readonly string[];
  /** Dates that were compared. */
  readonly dates: number;
  readonly agreement: {
    readonly u: ComponentAgreementNumbers;
    readonly v: ComponentAgreementNumbers;
    readonly bands: readonly {
      readonly south: number;
      readonly north: number;
      readonly u: ComponentAgreementNumbers;
      readonly v: ComponentAgreementNumbers;
    }[];
    /** Share of the mean square difference that is constant in time. */
    readonly meanShare: number;
    readonly oursOnly: number;
    readonly suppliedOnly: number;
  };
  /** The offered conventions, the best first, compared where the widest stencil is complete. */
  readonly conventions: readonly {
    readonly convention: {
      readonly stencil: number;
      readonly earth: string;
      readonly radius: number;
      readonly gravity: "latitude" | number;
    };
    readonly count: number;
    readonly rmsDifference: number;
    readonly rmsAnomalyDifference: number;
    readonly rmsSupplied: number;
  }[];
}

/** Standard errors of a field that come from the height's error, SI units. */
export interface FieldError {
  readonly map: Plane;
  /** Of the zonal mean on a date. */
  readonly onDate: Float64Array;
}
