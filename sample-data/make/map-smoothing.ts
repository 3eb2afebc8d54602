import type { HalfPlane } from "../model/half-plane";
import type { MapProduct } from "./scenario";

/** Coefficients of one smoothed streamfunction map. */
export interface SmoothMap {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Gathers the maps of a product while the model runs. */
export interface MapSmoother {
  /** Takes in the vorticity at a moment (days after the first date). */
  take(day: number, vorticityReal: Float64Array, vorticityImaginary: Float64Array): void;
  /** The streamfunction maps, to be called once all is taken in. */
  finish(): readonly SmoothMap[];
}

/** Gaussian in time over ±3 standard deviations of the samples taken, normalised; Gaussian in space. */
export function mapSmoother(plane: HalfPlane, product: MapProduct): MapSmoother {
  const maps = Array.from({ length: product.dates }, () => ({
    re: new Float64Array(plane.count),
    im: new Float64Array(plane.count),
  }));
  const weightSums = new Float64Array(product.dates);
  const reach = 3 * product.smoothingDays;

  return {
    take(day, vorticityReal, vorticityImaginary) {
      const first = Math.max(0, Math.ceil((day - reach) / product.everyDays));
      const last = Math.min(product.dates - 1, Math.floor((day + reach) / product.everyDays));
      for (let date = first; date <= last; date++) {
        const apart = (day - date * product.everyDays) / product.smoothingDays;
        const weight = Math.exp(-0.5 * apart * apart);
        weightSums[date] += weight;
        const { re, im } = maps[date];
        for (let i = 0; i < plane.count; i++) {
          re[i] += weight * vorticityReal[i];
          im[i] += weight * vorticityImaginary[i];
        }
      }
    },
    finish() {
      maps.forEach(({ re, im }, date) => {
        for (let i = 0; i < plane.count; i++) {
          if (plane.kept[i] === 0) continue;
          const spatial = Math.exp(-0.5 * plane.squared[i] * product.smoothingMetres ** 2);
          const factor = -spatial / (plane.squared[i] * weightSums[date]);
          re[i] *= factor;
          im[i] *= factor;
        }
      });
      return maps;
    },
  };
}
