import { type SquareFourier, squareFourier } from "./fourier";
import { type HalfPlane, halfPlane, unpackPair, velocityPair } from "./half-plane";
import { seededRandom } from "./random";

export interface ModelSettings {
  /** Points along each side; a product of 2s and 3s. */
  readonly size: number;
  readonly lengthMetres: number;
  /** m^-1 s^-1 */
  readonly beta: number;
  readonly dragPerSecond: number;
  /** Damping rate of the highest kept wavenumber; elsewhere it falls as the wavenumber to the power 2 × order. */
  readonly hyperviscosityPerSecond: number;
  readonly hyperviscosityOrder: number;
  /** Ring that is stirred, in waves along a side; purely zonal-mean modes are never stirred. */
  readonly stirringWaves: readonly [number, number];
  /** Mean energy input by the stirring, m^2 s^-3. */
  readonly stirringPower: number;
  readonly stepSeconds: number;
  readonly seed: number;
}

/**
 * Barotropic vorticity on a doubly periodic beta plane:
 * ζ_t + J(ψ, ζ) + β ψ_x = stirring − drag ζ − hyperviscosity, ζ = ∇²ψ, u = −ψ_y, v = ψ_x.
 * Pseudo-spectral, circular truncation at a third of the points so that products alias onto nothing kept (Orszag 1971);
 * third-order Adams–Bashforth in time, the linear terms exactly through an integrating factor (Durran 1991).
 */
export interface VorticityModel {
  readonly settings: ModelSettings;
  readonly plane: HalfPlane;
  readonly fourier: SquareFourier;
  /** Coefficients of ζ in s^-1, laid out as `plane` says. Set them before the first step for a given start. */
  readonly vorticityReal: Float64Array;
  readonly vorticityImaginary: Float64Array;
  /** Row means of u·v (m^2 s^-2) at the start of the last step, southernmost row first. */
  readonly momentumFlux: Float64Array;
  /** Largest |u| or |v| met at the start of the last step, m s^-1. */
  fastest(): number;
  timeSeconds(): number;
  step(): void;
}

export function createVorticityModel(settings: ModelSettings): VorticityModel {
  const { size, stepSeconds } = settings;
  const fourier = squareFourier(size);
  const plane = halfPlane(size, settings.lengthMetres);
  const random = seededRandom(settings.seed);
  const { count, waveX, waveY, squared, kept } = plane;

  const vorticityReal = new Float64Array(count);
  const vorticityImaginary = new Float64Array(count);
  const tendency = Array.from({ length: 3 }, () => ({ re: new Float64Array(count), im: new Float64Array(count) }));
  const factorReal = new Float64Array(count);
  const factorImaginary = new Float64Array(count);
  const largestSquared = Math.max(...plane.keptIndices.map((index) => squared[index]));
  for (const index of plane.keptIndices) {
    const damping =
      settings.dragPerSecond +
      settings.hyperviscosityPerSecond * (squared[index] / largestSquared) ** settings.hyperviscosityOrder;
    const turn = (settings.beta * waveX[index]) / squared[index];
    factorReal[index] = Math.exp(-damping * stepSeconds) * Math.cos(turn * stepSeconds);
    factorImaginary[index] = Math.exp(-damping * stepSeconds) * Math.sin(turn * stepSeconds);
  }

  const unit = (2 * Math.PI) / settings.lengthMetres;
  const [ringFrom, ringTo] = settings.stirringWaves;
  const stirred = plane.keptIndices.filter((index) => {
    const waves = Math.sqrt(squared[index]) / unit;
    return waveX[index] > 0 && waves >= ringFrom && waves <= ringTo;
  });
  // A coefficient and its mirror image together hold |ζ̂|² / k² of energy per unit mass.
  const kickEnergy = stirred.length > 0 ? (settings.stirringPower * stepSeconds) / stirred.length : 0;

  const total = size * size;
  const pairReal = new Float64Array(total);
  const pairImaginary = new Float64Array(total);
  const productReal = new Float64Array(count);
  const productImaginary = new Float64Array(count);
  const differenceReal = new Float64Array(count);
  const differenceImaginary = new Float64Array(count);
  const momentumFlux = new Float64Array(size);
  let fastest = 0;
  let stepsDone = 0;

  /** J(ψ, ζ) as (∂xx − ∂yy)(uv) + ∂xy(v² − u²): one packed transform each way. */
  const advect = (re: Float64Array, im: Float64Array): void => {
    velocityPair(plane, vorticityReal, vorticityImaginary, pairReal, pairImaginary);
    fourier.toPhysical(pairReal, pairImaginary);
    fastest = 0;
    for (let row = 0; row < size; row++) {
      let flux = 0;
      for (let i = row * size; i < (row + 1) * size; i++) {
        const u = pairReal[i];
        const v = pairImaginary[i];
        if (Math.abs(u) > fastest) fastest = Math.abs(u);
        if (Math.abs(v) > fastest) fastest = Math.abs(v);
        flux += u * v;
        pairReal[i] = u * v;
        pairImaginary[i] = v * v - u * u;
      }
      momentumFlux[row] = flux / size;
    }
    fourier.toCoefficients(pairReal, pairImaginary);
    unpackPair(plane, pairReal, pairImaginary, productReal, productImaginary, differenceReal, differenceImaginary);
    for (let i = 0; i < count; i++) {
      if (kept[i] === 0) continue;
      const ofProduct = waveX[i] * waveX[i] - waveY[i] * waveY[i];
      const ofDifference = waveX[i] * waveY[i];
      re[i] = ofProduct * productReal[i] + ofDifference * differenceReal[i];
      im[i] = ofProduct * productImaginary[i] + ofDifference * differenceImaginary[i];
    }
  };

  /** Multiplies by the integrating factor of one step. */
  const carry = (re: Float64Array, im: Float64Array): void => {
    for (let i = 0; i < count; i++) {
      const real = re[i] * factorReal[i] - im[i] * factorImaginary[i];
      im[i] = re[i] * factorImaginary[i] + im[i] * factorReal[i];
      re[i] = real;
    }
  };

  const stir = (): void => {
    for (const index of stirred) {
      const amplitude = Math.sqrt(kickEnergy * squared[index]);
      const phase = 2 * Math.PI * random.uniform();
      vorticityReal[index] += amplitude * Math.cos(phase);
      vorticityImaginary[index] += amplitude * Math.sin(phase);
    }
  };

  const step = (): void => {
    const newest = tendency[stepsDone % 3];
    const older = tendency[(stepsDone + 2) % 3];
    const oldest = tendency[(stepsDone + 1) % 3];
    advect(newest.re, newest.im);
    for (const past of tendency) carry(past.re, past.im);
    carry(vorticityReal, vorticityImaginary);
    // The first two steps are Euler and second-order Adams–Bashforth.
    const weights = stepsDone === 0 ? [1, 0, 0] : stepsDone === 1 ? [1.5, -0.5, 0] : [23 / 12, -16 / 12, 5 / 12];
    for (let i = 0; i < count; i++) {
      vorticityReal[i] +=
        stepSeconds * (weights[0] * newest.re[i] + weights[1] * older.re[i] + weights[2] * oldest.re[i]);
      vorticityImaginary[i] +=
        stepSeconds * (weights[0] * newest.im[i] + weights[1] * older.im[i] + weights[2] * oldest.im[i]);
    }
    stir();
    plane.mirrorZonalMean(vorticityReal, vorticityImaginary);
    stepsDone++;
  };

  return {
    settings,
    plane,
    fourier,
    vorticityReal,
    vorticityImaginary,
    momentumFlux,
    fastest: () => fastest,
    timeSeconds: () => stepsDone * stepSeconds,
    step,
  };
}
