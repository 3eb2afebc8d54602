import type { Axis, GridAxes } from "../model/axis";
import { Fault } from "../model/errors";
import { type DifferencePlan, planDifferences } from "../numeric/differences";
import type { StencilPoints } from "../numeric/stencils";
import {
  convergenceOfMeridians,
  coriolisParameter,
  type EarthSettings,
  gravityAt,
  metresPerRadianEast,
  metresPerRadianNorth,
  planetaryVorticityGradient,
} from "./earth";
import { type EquatorBlend, type EquatorBlendSettings, planEquatorBlend } from "./equator";

export interface GeometrySettings extends EarthSettings {
  readonly stencil: StencilPoints;
  /** Rows within this many degrees of the equator carry no geostrophic value (unless blended). */
  readonly equatorDegrees: number;
  /** "blank" (default) leaves the belt empty; "blend" fills it by the beta-plane solution, see equator.ts. */
  readonly equator?: "blank" | "blend";
  readonly equatorBlend?: EquatorBlendSettings;
}

/** All that differencing needs to know of a grid; one entry a row where an array. */
export interface GridGeometry {
  readonly rows: number;
  readonly columns: number;
  readonly latitude: Float64Array;
  readonly alongRow: DifferencePlan;
  readonly alongColumn: DifferencePlan;
  /** Metres per radian. */
  readonly east: Float64Array;
  readonly north: Float64Array;
  /** tan(latitude) over the transverse radius, m-1. */
  readonly convergence: Float64Array;
  readonly coriolis: Float64Array;
  readonly beta: Float64Array;
  readonly gravity: Float64Array;
  /** 1 where the row lies within `equatorDegrees` of the equator: what divides by f has no value there. */
  readonly blanked: Uint8Array;
  /** How velocities are blended across the equator; null where the belt is blank. */
  readonly equatorBlend: EquatorBlend | null;
  /** Why a blend that was asked for cannot be made, so that the belt is blank; else empty. */
  readonly equatorNote: string;
}

const degree = Math.PI / 180;

/**
 * Metric, Coriolis parameter, gravity and difference weights for a grid. Latitudes may ascend or descend; both axes
 * may be uneven, and longitudes periodic. Errors: a cell that touches a pole (its metric vanishes), fewer than 3 latitudes or longitudes.
 */
export function gridGeometry(axes: GridAxes, settings: GeometrySettings, where: string): GridGeometry {
  const { latitude, longitude } = axes;
  requireThree(latitude, "latitudes", where);
  requireThree(longitude, "longitudes", where);
  const rows = latitude.values.length;
  latitude.values.forEach((value, row) => {
    const halfCell = halfCellDegrees(latitude, row);
    if (Math.abs(value) + halfCell > 90 + 1e-9) {
      throw new Fault({
        tag: "region",
        where,
        expected: "cells that do not touch a pole, where east and north lose their meaning",
        got: `a row at latitude ${value}`,
        advice: `keep the region within ${90 - 2 * halfCell} degrees of the equator`,
      });
    }
  });
  const { blend, reason } =
    settings.equator === "blend"
      ? planEquatorBlend(latitude, settings, settings.equatorBlend)
      : { blend: null, reason: "" };
  const perRow = (compute: (latitudeDegrees: number) => number) => latitude.values.map(compute);
  return {
    rows,
    columns: longitude.values.length,
    latitude: latitude.values,
    alongRow: planDifferences(inRadians(longitude), settings.stencil),
    alongColumn: planDifferences(inRadians(latitude), settings.stencil),
    east: perRow((value) => metresPerRadianEast(value * degree, settings)),
    north: perRow((value) => metresPerRadianNorth(value * degree, settings)),
    convergence: perRow((value) => convergenceOfMeridians(value * degree, settings)),
    coriolis: perRow((value) => coriolisParameter(value, settings.omega)),
    beta: perRow((value) => planetaryVorticityGradient(value, settings)),
    gravity: perRow((value) => gravityAt(value, settings)),
    blanked: Uint8Array.from(latitude.values, (value) =>
      value === 0 || Math.abs(value) < settings.equatorDegrees ? 1 : 0,
    ),
    equatorBlend: blend,
    equatorNote: reason,
  };
}

/** Half the step, or on an uneven axis half the way to the nearest neighbour. */
function halfCellDegrees({ values, step, even }: Axis, row: number): number {
  if (even) return Math.abs(step) / 2;
  const neighbours = [values[row - 1], values[row + 1]].filter((value) => value !== undefined);
  return Math.min(...neighbours.map((value) => Math.abs(value - values[row]))) / 2;
}

function requireThree(axis: Axis, what: string, where: string): void {
  if (axis.values.length >= 3) return;
  throw new Fault({
    tag: "region",
    where,
    expected: `at least 3 ${what} to take a slope`,
    got: String(axis.values.length),
    advice: "widen the region, or choose a finer grid",
  });
}

function inRadians(axis: Axis) {
  return {
    coordinates: axis.values.map((value) => value * degree),
    even: axis.even,
    periodic: axis.periodic,
    turn: 2 * Math.PI,
  };
}
