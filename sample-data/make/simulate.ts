import { createVorticityModel, type VorticityModel } from "../model/vorticity-model";
import { type TrackSamples, trackSampler } from "./along-track";
import { trackPoints } from "./ground-track";
import { mapSmoother, type SmoothMap } from "./map-smoothing";
import { type BudgetWindow, budgetGatherer } from "./momentum-budget";
import { marginDays, type Scenario } from "./scenario";

/** Everything the files are made from. */
export interface Simulation {
  readonly scenario: Scenario;
  readonly model: VorticityModel;
  /** Streamfunction maps of the two products. */
  readonly mapsA: readonly SmoothMap[];
  readonly mapsB: readonly SmoothMap[];
  readonly tracks: readonly TrackSamples[];
  /** One window a date of product A, centred on it and as long as its sampling. */
  readonly budget: readonly BudgetWindow[];
}

const day = 86400;

/** Runs the model through spin-up and record. `report` hears of the days done. */
export function simulate(scenario: Scenario, report: (line: string) => void): Simulation {
  const model = createVorticityModel(scenario.model);
  seedJets(model, scenario);
  const stepsPerDay = Math.round(day / scenario.model.stepSeconds);
  const margin = marginDays(scenario);
  for (let spun = 0; spun < scenario.spinUpDays - margin; spun++) {
    for (let i = 0; i < stepsPerDay; i++) model.step();
    if (spun % 250 === 0) report(`spin-up, day ${spun} of ${scenario.spinUpDays}`);
  }

  const { plane } = model;
  const smootherA = mapSmoother(plane, scenario.gridA);
  const smootherB = mapSmoother(plane, scenario.gridB);
  const samplers = scenario.missions.map((mission, i) =>
    trackSampler(trackPoints(mission, plane.lengthMetres), scenario.seed + 100 + i),
  );
  const gatherer = budgetGatherer(plane, scenario.model);
  const budget: BudgetWindow[] = [];
  const every = scenario.gridA.everyDays;
  const stepsPerSample = Math.max(1, Math.round(stepsPerDay / 4));
  const stepsPerWindow = every * stepsPerDay;
  // Windows start half an interval before the first date.
  const firstWindowStep = Math.round((margin - every / 2) * stepsPerDay);
  const total = (2 * margin + scenario.days) * stepsPerDay;

  for (let step = 0; step < total; step++) {
    const from = step / stepsPerDay - margin;
    const to = (step + 1) / stepsPerDay - margin;
    if (step % stepsPerSample === 0) {
      smootherA.take(from, model.vorticityReal, model.vorticityImaginary);
      smootherB.take(from, model.vorticityReal, model.vorticityImaginary);
    }
    const sampling = samplers.filter((sampler) => sampler.wants(from, to));
    for (const sampler of sampling) sampler.take(from, to, "start", model);
    const budgeted = step >= firstWindowStep && budget.length < scenario.gridA.dates;
    if (budgeted) gatherer.atStart(model.vorticityReal, model.vorticityImaginary);
    model.step();
    if (budgeted) {
      gatherer.flux(model.momentumFlux);
      if ((step - firstWindowStep) % stepsPerWindow === 0) {
        const window = gatherer.cut();
        if (window) budget.push(window);
      }
    }
    for (const sampler of sampling) sampler.take(from, to, "end", model);
    if (step % (100 * stepsPerDay) === 0) report(`record, day ${Math.round(from)} of ${scenario.days}`);
  }

  const mapsA = smootherA.finish();
  const mapsB = smootherB.finish();
  const tracks = samplers.map((sampler) => sampler.finish(mapsA, scenario.gridA, model));
  return { scenario, model, mapsA, mapsB, tracks, budget };
}

/** Zonal jets for a start, of which the stirring keeps what the dynamics can hold: shortens the spin-up. */
function seedJets(model: VorticityModel, scenario: Scenario): void {
  const { waves, speed } = scenario.seedJets;
  const { size, lengthMetres } = model.plane;
  const amplitude = (speed * 2 * Math.PI * waves) / lengthMetres / 2;
  model.vorticityReal[waves] = amplitude;
  model.vorticityReal[size - waves] = amplitude;
}
