import type { EddyTestResult } from "../../../../core/model/jets-result";
import type { EddyTestSettings } from "../../../../core/study/schema";

type PopulationSettings = EddyTestSettings["population"];

/** A number of the eddies' population as a person types it: shown = stored × scale. */
export interface PopulationNumber {
  readonly key: keyof PopulationSettings & keyof EddyTestResult["population"];
  readonly title: string;
  readonly scale: number;
  readonly least: number;
  readonly most: number;
  /** Plural, for the sentence that says what is wanted. */
  readonly unit: string;
  /** Under which the engine says how it was found. */
  readonly note: string;
}

export const populationNumbers: readonly PopulationNumber[] = [
  {
    key: "medianAmplitudeMetres",
    title: "Amplitude, cm",
    scale: 100,
    least: 0.01,
    most: 1000,
    unit: "centimetres",
    note: "amplitude",
  },
  {
    key: "medianRadiusMetres",
    title: "Radius, km",
    scale: 1e-3,
    least: 1,
    most: 1000,
    unit: "kilometres",
    note: "radius",
  },
  {
    key: "densityPerMillionKm2",
    title: "Eddies in 10⁶ km²",
    scale: 1,
    least: 0.01,
    most: 10_000,
    unit: "eddies",
    note: "density",
  },
  { key: "lifetimeDays", title: "Lifetime, days", scale: 1, least: 1, most: 10_000, unit: "days", note: "lifetime" },
  {
    key: "speedMetresPerSecond",
    title: "Drift, cm/s eastward",
    scale: 100,
    least: -200,
    most: 200,
    unit: "centimetres a second",
    note: "speed",
  },
];

/** A stored number as shown, without the tails that scaling leaves in binary fractions. */
export function shownNumber({ scale }: PopulationNumber, stored: number): number {
  return Number((stored * scale).toPrecision(12));
}

/** The population with one number set by hand, given as shown; null leaves it to be estimated. */
export function withPopulationNumber(
  population: PopulationSettings,
  { key, scale }: PopulationNumber,
  shown: number | null,
): PopulationSettings {
  const { [key]: _, ...others } = population;
  return shown === null ? others : { ...others, [key]: Number((shown / scale).toPrecision(12)) };
}
