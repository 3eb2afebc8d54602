import { centreLongitude, isLand, north, south, widthDegrees } from "./geography";
import type { Mission } from "./scenario";

const radians = Math.PI / 180;

/** Sub-satellite point on a sphere: circular orbit, `phase` radians after the ascending node, Earth turning below. */
export function groundPoint(
  mission: Pick<Mission, "inclinationDegrees" | "revolutions" | "nodalDays" | "firstNodeDegrees">,
  phase: number,
): { readonly latitude: number; readonly longitude: number } {
  const inclination = mission.inclinationDegrees * radians;
  const latitude = Math.asin(Math.sin(inclination) * Math.sin(phase)) / radians;
  const alongOrbit = Math.atan2(Math.cos(inclination) * Math.sin(phase), Math.cos(phase)) / radians;
  const turned = ((mission.nodalDays / mission.revolutions) * phase) / radians;
  return { latitude, longitude: wrapLongitude(mission.firstNodeDegrees + alongOrbit - turned) };
}

function wrapLongitude(longitude: number): number {
  return ((((longitude + 180) % 360) + 360) % 360) - 180;
}

/**
 * Direction of the ground track, degrees clockwise from north, by the closed formula of a circular orbit over a turning
 * sphere: tan α = (cos i − (D/N) cos²φ) / sqrt(cos²φ − cos²i), 180° − α on the way down.
 */
export function headingDegrees(mission: Mission, latitude: number, ascending: boolean): number {
  const cosI = Math.cos(mission.inclinationDegrees * radians);
  const cosSquared = Math.cos(latitude * radians) ** 2;
  const across = cosI - (mission.nodalDays / mission.revolutions) * cosSquared;
  const heading = Math.atan2(across, Math.sqrt(cosSquared - cosI * cosI)) / radians;
  return ascending ? heading : 180 - heading;
}

/** Points of a mission over the basin's sea, in order of time. */
export interface TrackPoints {
  readonly mission: Mission;
  readonly count: number;
  /** Days after the first date of the scenario. */
  readonly days: Float64Array;
  readonly latitude: Float64Array;
  readonly longitude: Float64Array;
  /** From 1; a cycle is one repeat. */
  readonly cycle: Int16Array;
  /** Half revolution within the cycle, from 1; odd ones ascend. */
  readonly pass: Int16Array;
}

/** Samples each pass at fixed phases, so that repeats fall on the same places. */
export function trackPoints(mission: Mission, lengthMetres: number): TrackPoints {
  const days: number[] = [];
  const latitudes: number[] = [];
  const longitudes: number[] = [];
  const cycles: number[] = [];
  const passes: number[] = [];
  const halfWidth = widthDegrees(lengthMetres) / 2;
  const halfDays = mission.repeatDays / (2 * mission.revolutions);
  const phaseStep = (Math.PI * (mission.sampleSeconds / 86400)) / halfDays;
  const samples = Math.floor(Math.PI / phaseStep);
  const halves = Math.floor((mission.lastDay - mission.firstDay) / halfDays);
  for (let half = 0; half < halves; half++) {
    const inCycle = half % (2 * mission.revolutions);
    const startPhase = -Math.PI / 2 + inCycle * Math.PI;
    for (let sample = 0; sample < samples; sample++) {
      const { latitude, longitude } = groundPoint(mission, startPhase + sample * phaseStep);
      if (latitude < south || latitude > north || Math.abs(longitude - centreLongitude) > halfWidth) continue;
      if (isLand(longitude, latitude)) continue;
      days.push(mission.firstDay + half * halfDays + (sample * mission.sampleSeconds) / 86400);
      latitudes.push(latitude);
      longitudes.push(longitude);
      cycles.push(1 + Math.floor(half / (2 * mission.revolutions)));
      passes.push(1 + inCycle);
    }
  }
  return {
    mission,
    count: days.length,
    days: Float64Array.from(days),
    latitude: Float64Array.from(latitudes),
    longitude: Float64Array.from(longitudes),
    cycle: Int16Array.from(cycles),
    pass: Int16Array.from(passes),
  };
}
