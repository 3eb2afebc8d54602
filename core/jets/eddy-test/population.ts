import { Fault } from "../../model/errors";
import { type LatitudeTable, sameEverywhere } from "./latitude-table";
import { type QuantileTable, withMedian } from "./quantile-table";

/** What an ocean of passing eddies is drawn from. Plain data: it goes into a study and across workers as it is. */
export interface EddyPopulation {
  /** Full heights, metres, both signs taken together; an eddy has less while it grows and decays. */
  readonly amplitudeMetres: QuantileTable;
  /** Standard deviation of the Gaussian hill, metres: the distance from centre to fastest current. */
  readonly radiusMetres: QuantileTable;
  /** Eddies alive at any moment, a million square kilometres. */
  readonly densityPerMillionKm2: number;
  /** Share that are hills rather than hollows. */
  readonly shareHigh: number;
  /** From birth to death, days. */
  readonly lifetimeDays: number;
  /** Share of the life spent growing, and again decaying (see lifeEnvelope). */
  readonly rampShare: number;
  /** Eastward speed by latitude, m s-1; negative is westward. */
  readonly speedMetresPerSecond: LatitudeTable;
  /** Factor on every amplitude by latitude; 1 until matched to the energy of data. */
  readonly amplitudeFactor: LatitudeTable;
  /** How each number was found, in a sentence. */
  readonly notes: Readonly<Record<PopulationNumber, string>>;
}

export type PopulationNumber = "amplitude" | "radius" | "density" | "lifetime" | "speed" | "energy";

/** Numbers set by hand; what is left out stays as estimated. Medians stretch the estimated distribution. */
export interface PopulationOverrides {
  readonly medianAmplitudeMetres?: number;
  readonly medianRadiusMetres?: number;
  readonly densityPerMillionKm2?: number;
  readonly lifetimeDays?: number;
  readonly speedMetresPerSecond?: number;
}

export const byHand = "set by hand";

/** The population with numbers set by hand in it, and its notes saying so. Errors as `checkPopulation`. */
export function overridePopulation(population: EddyPopulation, set: PopulationOverrides): EddyPopulation {
  const notes = { ...population.notes };
  if (set.medianAmplitudeMetres !== undefined) notes.amplitude = byHand;
  if (set.medianRadiusMetres !== undefined) notes.radius = byHand;
  if (set.densityPerMillionKm2 !== undefined) notes.density = byHand;
  if (set.lifetimeDays !== undefined) notes.lifetime = byHand;
  if (set.speedMetresPerSecond !== undefined) notes.speed = byHand;
  const { amplitudeMetres, radiusMetres, speedMetresPerSecond } = population;
  const overridden: EddyPopulation = {
    ...population,
    amplitudeMetres: withMedian(amplitudeMetres, set.medianAmplitudeMetres ?? middle(amplitudeMetres)),
    radiusMetres: withMedian(radiusMetres, set.medianRadiusMetres ?? middle(radiusMetres)),
    densityPerMillionKm2: set.densityPerMillionKm2 ?? population.densityPerMillionKm2,
    lifetimeDays: set.lifetimeDays ?? population.lifetimeDays,
    speedMetresPerSecond:
      set.speedMetresPerSecond === undefined ? speedMetresPerSecond : sameEverywhere(set.speedMetresPerSecond),
    notes,
  };
  checkPopulation(overridden);
  return overridden;
}

/** A population of equal round eddies, for want of data or for trials. */
export function uniformPopulation(numbers: {
  readonly amplitudeMetres: number;
  readonly radiusMetres: number;
  readonly densityPerMillionKm2: number;
  readonly lifetimeDays: number;
  readonly speedMetresPerSecond: number;
}): EddyPopulation {
  const population: EddyPopulation = {
    ...numbers,
    amplitudeMetres: [numbers.amplitudeMetres],
    radiusMetres: [numbers.radiusMetres],
    shareHigh: 0.5,
    rampShare: defaultRampShare,
    speedMetresPerSecond: sameEverywhere(numbers.speedMetresPerSecond),
    amplitudeFactor: sameEverywhere(1),
    notes: { amplitude: byHand, radius: byHand, density: byHand, lifetime: byHand, speed: byHand, energy: "as drawn" },
  };
  checkPopulation(population);
  return population;
}

/** A quarter of the life to grow, a quarter to decay. Common practice, no source. */
export const defaultRampShare = 0.25;

/** Throws a Fault (tag "study") that names the first number no ocean can be drawn from. */
export function checkPopulation(population: EddyPopulation): void {
  const positive: [string, number, string][] = [
    ["amplitude", middle(population.amplitudeMetres), "metres"],
    ["radius", population.radiusMetres[0], "metres"],
    ["density", population.densityPerMillionKm2, "eddies a million square kilometres"],
    ["lifetime", population.lifetimeDays, "days"],
  ];
  for (const [name, value, unit] of positive) {
    if (value > 0 && Number.isFinite(value)) continue;
    throw populationFault(name, `${unit} above 0`, `${value}`, "set it in the study, or estimate it from the data");
  }
  const { latitudesDegrees, values } = population.speedMetresPerSecond;
  if (values.length === 0 || values.length !== latitudesDegrees.length || !values.every(Number.isFinite)) {
    throw populationFault("speed", "one finite speed a latitude", `[${values.join(", ")}]`, "set one speed by hand");
  }
}

function populationFault(name: string, expected: string, got: string, advice: string): Fault {
  return new Fault({ tag: "study", where: `eddyTest, ${name} of the eddies`, expected, got, advice });
}

function middle(table: QuantileTable): number {
  const centre = (table.length - 1) / 2;
  return (table[Math.floor(centre)] + table[Math.ceil(centre)]) / 2;
}
