/** What the eddy test knows of a jet, whether found in the data or in a random ocean. */
export interface FoundJet {
  /** Mean over the dates it was found on, degrees north. */
  readonly latitudeDegrees: number;
  /** 1 eastward, -1 westward. */
  readonly direction: 1 | -1;
  /** Mean speed over those dates, m s-1, positive for either direction. */
  readonly speedMetresPerSecond: number;
  /** Those dates over all dates with data. */
  readonly shareOfDates: number;
}

/** Finds jets in zonal means as the record's own were found: `zonal[row * dates + t]`, background and band included. */
export type JetChain = (zonal: Float64Array) => readonly FoundJet[];

/**
 * Fast and steady as one number, m s-1: mean speed times the square root of the share of dates. The error of a mean over n
 * dates falls as the root of n, so that this orders jets as their mean speed over its error does. Our choice.
 */
export function jetScore({ speedMetresPerSecond, shareOfDates }: FoundJet): number {
  return speedMetresPerSecond * Math.sqrt(shareOfDates);
}

/** Whether two jets run the same way within `halfSpacingDegrees` of each other. */
export function areNeighbours(first: FoundJet, second: FoundJet, halfSpacingDegrees: number): boolean {
  const apart = Math.abs(first.latitudeDegrees - second.latitudeDegrees);
  return first.direction === second.direction && apart <= halfSpacingDegrees;
}
