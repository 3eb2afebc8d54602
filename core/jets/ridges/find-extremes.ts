import { meanAndDeviation } from "../../numeric/serial-correlation";
import { type EarthSettings, metresPerRadianNorth } from "../../ocean/earth";
import { prominentPeaks } from "./prominence";
import { parabolaVertex } from "./vertex";

/** 1 eastward, -1 westward. */
export type FlowSign = 1 | -1;

/** A jet's core on one date. */
export interface Extreme {
  readonly sign: FlowSign;
  /** Row of the grid nearest to it. */
  readonly row: number;
  /** Degrees north, refined below the grid. */
  readonly latitude: number;
  /** Eastward velocity at the core in m s-1 (negative for westward jets), refined likewise. */
  readonly speed: number;
  /** m s-1, from grid values. */
  readonly prominence: number;
  /** Distance between the half-prominence points. */
  readonly widthKm: number;
}

export interface ExtremeSettings {
  /** m s-1; less prominent extremes are left out. */
  readonly leastProminence: number;
  /** Keep maxima inside westward flow and minima inside eastward flow too; otherwise a jet must flow its own way. */
  readonly againstFlow: boolean;
}

/** The larger of 0.01 m/s and half the standard deviation of all valid values. Our choice, no source. */
export function defaultProminence(matrix: Float64Array): number {
  const { deviation } = meanAndDeviation(matrix);
  return Number.isNaN(deviation) ? 0.01 : Math.max(0.01, deviation / 2);
}

/**
 * Eastward and westward extremes of a profile of eastward velocity, in order of row. Place and speed are the vertex of the
 * parabola through the core and its two neighbours; the width lies between the points, linearly interpolated, where the
 * profile has fallen by half its prominence. NaN rows end the profile: nothing is found beside or measured across them.
 */
export function findExtremes(
  profile: Float64Array,
  latitude: Float64Array,
  settings: ExtremeSettings,
  earth: EarthSettings,
): Extreme[] {
  const found: Extreme[] = [];
  for (const sign of [1, -1] as const) {
    const towards = sign === 1 ? profile : profile.map((value) => -value);
    for (const peak of prominentPeaks(towards, settings.leastProminence)) {
      if (!settings.againstFlow && !(towards[peak.index] > 0)) continue;
      const { at, value } = parabolaVertex(latitude, profile, peak.index);
      found.push({
        sign,
        row: peak.index,
        latitude: at,
        speed: value,
        prominence: peak.prominence,
        widthKm: kilometresNorth(valueAt(latitude, peak.left), valueAt(latitude, peak.right), earth),
      });
    }
  }
  return found.sort((a, b) => a.row - b.row);
}

/** Length of a stretch of a meridian in kilometres, by the metric at its middle (off by under 2e-5 over ten degrees). */
export function kilometresNorth(fromDegrees: number, toDegrees: number, earth: EarthSettings): number {
  const middle = (((fromDegrees + toDegrees) / 2) * Math.PI) / 180;
  return (Math.abs(toDegrees - fromDegrees) * Math.PI * metresPerRadianNorth(middle, earth)) / 180 / 1000;
}

/** Degrees of latitude that a length in kilometres spans about `latitudeDegrees`. */
export function degreesNorth(kilometres: number, latitudeDegrees: number, earth: EarthSettings): number {
  return ((kilometres * 1000) / metresPerRadianNorth((latitudeDegrees * Math.PI) / 180, earth)) * (180 / Math.PI);
}

/** Value of an axis at a fractional index. */
function valueAt(axis: Float64Array, index: number): number {
  const below = Math.min(Math.floor(index), axis.length - 2);
  return axis[below] + (index - below) * (axis[below + 1] - axis[below]);
}
