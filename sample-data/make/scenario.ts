import type { ModelSettings } from "../model/vorticity-model";

/** A smoothed product: dates every `everyDays` from `firstDay`, smoothed by Gaussians of these standard deviations. */
export interface MapProduct {
  readonly everyDays: number;
  readonly dates: number;
  readonly stepDegrees: number;
  readonly smoothingMetres: number;
  readonly smoothingDays: number;
  /** Mapping error: normal, this standard deviation, covariance exp(−r²/2L²) in space, exp(−t/T) in time. */
  readonly noiseMetres: number;
  readonly noiseLengthMetres: number;
  readonly noiseDays: number;
}

/** An invented altimeter mission on a repeating circular orbit. */
export interface Mission {
  readonly name: string;
  readonly inclinationDegrees: number;
  readonly repeatDays: number;
  readonly revolutions: number;
  /** Nodal days in a repeat. */
  readonly nodalDays: number;
  readonly sampleSeconds: number;
  /** Longitude of the first ascending equator crossing. */
  readonly firstNodeDegrees: number;
  readonly firstDay: number;
  readonly lastDay: number;
  readonly noiseMetres: number;
}

export interface Scenario {
  readonly model: ModelSettings;
  /** Jets the spin-up starts from: waves from south to north, and speed of the strongest flow. */
  readonly seedJets: { readonly waves: number; readonly speed: number };
  readonly spinUpDays: number;
  readonly firstDate: string;
  readonly days: number;
  readonly gridA: MapProduct;
  /** Indices of the dates that product A lacks altogether, and of one that is there but empty. */
  readonly missingDates: readonly number[];
  readonly emptyDate: number;
  readonly gridB: MapProduct;
  readonly missions: readonly Mission[];
  readonly seed: number;
}

const day = 86400;

const plover = {
  name: "Plover",
  inclinationDegrees: 66.04,
  repeatDays: 9.9156,
  revolutions: 127,
  nodalDays: 10,
  sampleSeconds: 1.128,
  firstNodeDegrees: -99.92,
  noiseMetres: 0.02,
};

const dunlin = {
  name: "Dunlin",
  inclinationDegrees: 98.55,
  repeatDays: 35,
  revolutions: 501,
  nodalDays: 35,
  sampleSeconds: 0.967,
  firstNodeDegrees: 0.13,
  noiseMetres: 0.02,
};

const gridA: MapProduct = {
  everyDays: 3,
  dates: 300,
  stepDegrees: 0.25,
  smoothingMetres: 35e3,
  smoothingDays: 5,
  noiseMetres: 0.006,
  noiseLengthMetres: 80e3,
  noiseDays: 10,
};

const gridB: MapProduct = {
  everyDays: 10,
  dates: 90,
  stepDegrees: 0.5,
  smoothingMetres: 60e3,
  smoothingDays: 12,
  noiseMetres: 0.006,
  noiseLengthMetres: 120e3,
  noiseDays: 15,
};

/** What the committed files hold. */
export const fullScenario: Scenario = {
  model: {
    size: 192,
    lengthMetres: 2.4e6,
    beta: 1.9661e-11,
    dragPerSecond: 1 / (1000 * day),
    hyperviscosityPerSecond: 2 / day,
    hyperviscosityOrder: 4,
    stirringWaves: [18.8, 21.2],
    stirringPower: 1.5e-10,
    stepSeconds: 3600,
    seed: 5,
  },
  seedJets: { waves: 5, speed: 0.07 },
  spinUpDays: 1000,
  firstDate: "2031-03-03",
  days: 900,
  gridA,
  missingDates: [58, 131, 132, 211, 212, 213, 214],
  emptyDate: 96,
  gridB,
  missions: [
    { ...plover, firstDay: 150, lastDay: 450 },
    { ...dunlin, firstDay: 420, lastDay: 560 },
  ],
  seed: 20310303,
};

/** The same sea in miniature, made in seconds, for the tests. */
export const smallScenario: Scenario = {
  ...fullScenario,
  model: { ...fullScenario.model, size: 64, stirringWaves: [11, 13], stepSeconds: 7200 },
  spinUpDays: 20,
  days: 60,
  gridA: { ...gridA, dates: 20, stepDegrees: 0.5 },
  missingDates: [4, 11, 12],
  emptyDate: 7,
  gridB: { ...gridB, dates: 6, stepDegrees: 1 },
  missions: [
    { ...plover, firstDay: 10, lastDay: 30 },
    { ...dunlin, firstDay: 25, lastDay: 40 },
  ],
};

/** Days before the first and after the last date that the widest smoothing needs. */
export function marginDays(scenario: Scenario): number {
  return Math.ceil(3 * Math.max(scenario.gridA.smoothingDays, scenario.gridB.smoothingDays)) + 2;
}
