import { describe, expect, test } from "vitest";
import { budgetGatherer } from "../../sample-data/make/momentum-budget";
import { seededRandom } from "../../sample-data/model/random";
import { createVorticityModel, type ModelSettings, type VorticityModel } from "../../sample-data/model/vorticity-model";
import { expectAllClose, expectClose } from "../expect-close";

const quiet: ModelSettings = {
  size: 48,
  lengthMetres: 2.4e6,
  beta: 2e-11,
  dragPerSecond: 0,
  hyperviscosityPerSecond: 0,
  hyperviscosityOrder: 4,
  stirringWaves: [0, 0],
  stirringPower: 0,
  stepSeconds: 3600,
  seed: 1,
};

/** Random coefficients at 2 to 6 waves a side, with currents of some 20 cm/s. */
function startRandomly(model: VorticityModel, seed: number): void {
  const random = seededRandom(seed);
  const { plane } = model;
  const unit = (2 * Math.PI) / plane.lengthMetres;
  for (const index of plane.keptIndices) {
    const waves = Math.sqrt(plane.squared[index]) / unit;
    if (waves < 2 || waves > 6) continue;
    model.vorticityReal[index] = 0.015 * Math.sqrt(plane.squared[index]) * random.normal();
    model.vorticityImaginary[index] = 0.015 * Math.sqrt(plane.squared[index]) * random.normal();
  }
  plane.mirrorZonalMean(model.vorticityReal, model.vorticityImaginary);
}

/** Energy (m² s^-2) and enstrophy (s^-2) per unit mass, from Parseval's theorem. */
function invariants({ plane, vorticityReal, vorticityImaginary }: VorticityModel): {
  energy: number;
  enstrophy: number;
} {
  let energy = 0;
  let enstrophy = 0;
  for (const index of plane.keptIndices) {
    const both = plane.waveX[index] > 0 ? 2 : 1;
    const squared = both * (vorticityReal[index] ** 2 + vorticityImaginary[index] ** 2);
    energy += (0.5 * squared) / plane.squared[index];
    enstrophy += 0.5 * squared;
  }
  return { energy, enstrophy };
}

function drift(stepSeconds: number, days: number): { energy: number; enstrophy: number } {
  const model = createVorticityModel({ ...quiet, stepSeconds });
  startRandomly(model, 3);
  const before = invariants(model);
  for (let i = 0; i < (days * 86400) / stepSeconds; i++) model.step();
  const after = invariants(model);
  return {
    energy: Math.abs(after.energy / before.energy - 1),
    enstrophy: Math.abs(after.enstrophy / before.enstrophy - 1),
  };
}

describe("the vorticity model", () => {
  test("keeps energy and enstrophy when nothing stirs or damps it", () => {
    const { energy, enstrophy } = drift(900, 10);
    // The truncated equations keep both exactly; what is lost is lost by the time stepping, third order in the step.
    expect(energy).toBeLessThan(1e-5);
    expect(enstrophy).toBeLessThan(1e-4);
  });

  test("loses some fourfold less of both, or better, with half the step", () => {
    const coarse = drift(1800, 5);
    const fine = drift(900, 5);
    // Third order but for the single Euler step at the start, whose error falls with the square of the step.
    expect(coarse.energy / fine.energy).toBeGreaterThan(3.5);
    expect(coarse.enstrophy / fine.enstrophy).toBeGreaterThan(3.5);
  });

  test("moves a Rossby wave at the speed of its dispersion relation", () => {
    const model = createVorticityModel(quiet);
    const [kx, ky] = [3, 5];
    const index = kx * quiet.size + ky;
    model.vorticityReal[index] = 1e-6;
    const days = 40;
    for (let i = 0; i < days * 24; i++) model.step();
    const unit = (2 * Math.PI) / quiet.lengthMetres;
    const frequency = (-quiet.beta * unit * kx) / (unit * unit * (kx * kx + ky * ky));
    const phase = -frequency * days * 86400;
    const because = "the linear terms are exact and a lone plane wave does not interact with itself";
    expectClose(model.vorticityReal[index], 1e-6 * Math.cos(phase), { absolute: 1e-15, because });
    expectClose(model.vorticityImaginary[index], 1e-6 * Math.sin(phase), { absolute: 1e-15, because });
  });

  test("takes in energy at the rate its settings say", () => {
    const stirringPower = 2e-9;
    const days = 10;
    const seeds = [1, 2, 3, 4, 5, 6];
    let energy = 0;
    for (const seed of seeds) {
      const model = createVorticityModel({ ...quiet, stirringWaves: [8, 11], stirringPower, seed });
      for (let i = 0; i < days * 24; i++) model.step();
      energy += invariants(model).energy / seeds.length;
    }
    const because = "each of some 90 modes walks at random, so that 540 of them scatter by 4 %; three of that and some";
    expectClose(energy, stirringPower * days * 86400, { relative: 0.14, because });
  });

  test("decays a zonal flow at the drag's rate", () => {
    const dragPerSecond = 1 / (30 * 86400);
    const model = createVorticityModel({ ...quiet, dragPerSecond });
    model.vorticityReal[4] = 1e-6;
    model.vorticityReal[quiet.size - 4] = 1e-6;
    for (let i = 0; i < 30 * 24; i++) model.step();
    expectClose(model.vorticityReal[4], 1e-6 / Math.E, { relative: 1e-10, because: "the integrating factor is exact" });
  });

  test("closes its zonal-mean momentum budget: tendency = convergence + friction", () => {
    const settings = {
      ...quiet,
      dragPerSecond: 1 / (50 * 86400),
      hyperviscosityPerSecond: 1 / 86400,
      stirringWaves: [8, 11] as const,
      stirringPower: 5e-9,
      stepSeconds: 1800,
    };
    const model = createVorticityModel(settings);
    startRandomly(model, 5);
    const gatherer = budgetGatherer(model.plane, settings);
    for (let step = 0; step <= 3 * 48; step++) {
      gatherer.atStart(model.vorticityReal, model.vorticityImaginary);
      model.step();
      gatherer.flux(model.momentumFlux);
      if (step === 0) gatherer.cut();
    }
    const window = gatherer.cut();
    if (!window) throw new Error("no window");
    const sum = window.convergence.map((value, row) => value + window.friction[row]);
    expect(Math.max(...window.tendency.map(Math.abs))).toBeGreaterThan(1e-8);
    const because = "the trapezoidal rule and the time stepping err with the square of the half-hour step";
    expectAllClose(sum, window.tendency, { relative: 0.01, because });
  });

  test("gives the same numbers for the same seed", () => {
    const run = () => {
      const model = createVorticityModel({ ...quiet, stirringWaves: [8, 11], stirringPower: 1e-9, seed: 8 });
      for (let i = 0; i < 50; i++) model.step();
      return [...model.vorticityReal];
    };
    expect(run()).toEqual(run());
  });
});
