import type { HalfPlane } from "../model/half-plane";
import type { ModelSettings } from "../model/vorticity-model";

/** Zonal-mean momentum budget of one window, on the model's rows from south to north; m s^-1 and m s^-2, window means. */
export interface BudgetWindow {
  readonly flow: Float64Array;
  /** Change from the window's start to its end, over its length. */
  readonly tendency: Float64Array;
  /** −∂<u'v'>/∂y. */
  readonly convergence: Float64Array;
  /** Drag and hyperviscosity, as they act: of the opposite sign to the flow. */
  readonly friction: Float64Array;
}

/** Gathers windows that follow each other without gaps. */
export interface BudgetGatherer {
  /** State at the start of a step, before it is made: coefficients of vorticity. */
  atStart(real: Float64Array, imaginary: Float64Array): void;
  /** Row means of u·v at that same start, known once the step is made. */
  flux(rows: Float64Array): void;
  /** Ends a window at the state last given, and starts the next. The first call only starts. */
  cut(): BudgetWindow | null;
}

/** Flow and flux are averaged over a window by the trapezoidal rule over the model's steps. */
export function budgetGatherer(plane: HalfPlane, settings: ModelSettings): BudgetGatherer {
  const { size, truncation, lengthMetres } = plane;
  const unit = (2 * Math.PI) / lengthMetres;
  const nowReal = new Float64Array(truncation + 1);
  const nowImaginary = new Float64Array(truncation + 1);
  const fluxNow = new Float64Array(size);
  let startReal: Float64Array | null = null;
  let startImaginary: Float64Array | null = null;
  const sumReal = new Float64Array(truncation + 1);
  const sumImaginary = new Float64Array(truncation + 1);
  const fluxSum = new Float64Array(size);
  let steps = 0;

  const addHalf = (weight: number): void => {
    for (let k = 1; k <= truncation; k++) {
      sumReal[k] += weight * nowReal[k];
      sumImaginary[k] += weight * nowImaginary[k];
    }
    for (let row = 0; row < size; row++) fluxSum[row] += weight * fluxNow[row];
  };

  const rowsOf = (re: (k: number) => number, im: (k: number) => number): Float64Array => {
    const rows = new Float64Array(size);
    for (let row = 0; row < size; row++) {
      for (let k = 1; k <= truncation; k++) {
        const angle = (2 * Math.PI * k * row) / size;
        rows[row] += 2 * (re(k) * Math.cos(angle) - im(k) * Math.sin(angle));
      }
    }
    return rows;
  };

  const divergence = (flux: Float64Array, scale: number): Float64Array => {
    const re = new Float64Array(truncation + 1);
    const im = new Float64Array(truncation + 1);
    for (let k = 1; k <= truncation; k++) {
      for (let row = 0; row < size; row++) {
        const angle = (2 * Math.PI * k * row) / size;
        re[k] += (scale * flux[row] * Math.cos(angle)) / size;
        im[k] -= (scale * flux[row] * Math.sin(angle)) / size;
      }
    }
    // −∂y: multiply by −i k.
    return rowsOf(
      (k) => unit * k * im[k],
      (k) => -unit * k * re[k],
    );
  };

  const damping = (k: number): number =>
    settings.dragPerSecond + settings.hyperviscosityPerSecond * (k / truncation) ** (2 * settings.hyperviscosityOrder);

  return {
    atStart(real, imaginary) {
      // û = i ζ̂ / ky for the zonal mean.
      for (let k = 1; k <= truncation; k++) {
        nowReal[k] = -imaginary[k] / (unit * k);
        nowImaginary[k] = real[k] / (unit * k);
      }
    },
    flux(rows) {
      fluxNow.set(rows);
      steps++;
      addHalf(1);
    },
    cut() {
      let window: BudgetWindow | null = null;
      // Called after flux(): the last state is the end of this window and the start of the next, half in each.
      if (startReal && startImaginary) {
        addHalf(-0.5);
        const from = { re: startReal, im: startImaginary };
        const count = steps - 1;
        const seconds = count * settings.stepSeconds;
        window = {
          flow: rowsOf(
            (k) => sumReal[k] / count,
            (k) => sumImaginary[k] / count,
          ),
          tendency: rowsOf(
            (k) => (nowReal[k] - from.re[k]) / seconds,
            (k) => (nowImaginary[k] - from.im[k]) / seconds,
          ),
          convergence: divergence(fluxSum, 1 / count),
          friction: rowsOf(
            (k) => (-damping(k) * sumReal[k]) / count,
            (k) => (-damping(k) * sumImaginary[k]) / count,
          ),
        };
      }
      startReal = nowReal.slice();
      startImaginary = nowImaginary.slice();
      sumReal.fill(0);
      sumImaginary.fill(0);
      fluxSum.fill(0);
      steps = 1;
      addHalf(0.5);
      return window;
    },
  };
}
