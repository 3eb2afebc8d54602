import { fieldPair, velocityPair } from "../model/half-plane";
import { seededRandom } from "../model/random";
import type { VorticityModel } from "../model/vorticity-model";
import { heightOfStream, seasonAndTrend, surfaceCurrent, toSquare } from "./geography";
import { headingDegrees, type TrackPoints } from "./ground-track";
import { periodicStencil, valueUnder } from "./interpolation";
import type { SmoothMap } from "./map-smoothing";
import type { MapProduct } from "./scenario";

/** What a mission sees, and what it should have seen. */
export interface TrackSamples {
  readonly points: TrackPoints;
  /** Height with the instrument's white noise, m. */
  readonly height: Float64Array;
  readonly trueHeight: Float64Array;
  /** Current to the left of the direction of travel, m s^-1. */
  readonly trueCross: Float64Array;
  /** The same from the smoothed maps, free of mapping error, linear between dates; NaN past the last date. */
  readonly mappedCross: Float64Array;
}

/** Samples a mission while the model runs: fifth-degree interpolation in space, linear between steps in time. */
export interface TrackSampler {
  /** True if the mission samples in this stretch of days. */
  wants(from: number, to: number): boolean;
  /** Adds the part of the state at `at` to the points of that stretch; call at both ends of it. */
  take(from: number, to: number, at: "start" | "end", model: VorticityModel): void;
  finish(maps: readonly SmoothMap[], product: MapProduct, model: VorticityModel): TrackSamples;
}

/** Current left of the heading α (clockwise from north): −u cos α + v sin α. */
function leftOf(u: number, v: number, headingInDegrees: number): number {
  const heading = (headingInDegrees * Math.PI) / 180;
  return -u * Math.cos(heading) + v * Math.sin(heading);
}

export function trackSampler(points: TrackPoints, seed: number): TrackSampler {
  const { count, days, latitude, longitude, mission } = points;
  const stream = new Float64Array(count);
  const u = new Float64Array(count);
  const v = new Float64Array(count);
  let first = 0;

  const rangeOf = (from: number, to: number): readonly [number, number] => {
    while (first < count && days[first] < from) first++;
    let last = first;
    while (last < count && days[last] < to) last++;
    return [first, last];
  };

  const cross = (i: number, model: { stream: number; u: number; v: number }, lengthMetres: number): number => {
    const ascending = points.pass[i] % 2 === 1;
    const [east, northward] = surfaceCurrent(model, latitude[i], days[i], lengthMetres);
    return leftOf(east, northward, headingDegrees(mission, latitude[i], ascending));
  };

  return {
    wants(from, to) {
      const [start, end] = rangeOf(from, to);
      return end > start;
    },
    take(from, to, at, model) {
      const [start, end] = rangeOf(from, to);
      const { size, lengthMetres } = model.plane;
      const fields = physicalFields(model, model.vorticityReal, model.vorticityImaginary);
      for (let i = start; i < end; i++) {
        const along = (days[i] - from) / (to - from);
        const weight = at === "start" ? 1 - along : along;
        const [x, y] = toSquare(longitude[i], latitude[i], lengthMetres);
        const stencil = periodicStencil(x, y, size);
        stream[i] += weight * valueUnder(stencil, fields.stream, size);
        u[i] += weight * valueUnder(stencil, fields.u, size);
        v[i] += weight * valueUnder(stencil, fields.v, size);
      }
    },
    finish(maps, product, model) {
      const { size, lengthMetres, squared, count: coefficients } = model.plane;
      const random = seededRandom(seed);
      const trueHeight = new Float64Array(count);
      const height = new Float64Array(count);
      const trueCross = new Float64Array(count);
      for (let i = 0; i < count; i++) {
        trueHeight[i] = heightOfStream(stream[i], latitude[i]) + seasonAndTrend(latitude[i], days[i]);
        height[i] = trueHeight[i] + mission.noiseMetres * random.normal();
        trueCross[i] = cross(i, { stream: stream[i], u: u[i], v: v[i] }, lengthMetres);
      }
      const mappedCross = new Float64Array(count).fill(Number.NaN);
      const vorticity = { re: new Float64Array(coefficients), im: new Float64Array(coefficients) };
      let before = -2;
      let earlier: PhysicalFields | null = null;
      let later: PhysicalFields | null = null;
      const fieldsOf = (date: number): PhysicalFields => {
        for (let k = 0; k < coefficients; k++) {
          vorticity.re[k] = -squared[k] * maps[date].re[k];
          vorticity.im[k] = -squared[k] * maps[date].im[k];
        }
        return physicalFields(model, vorticity.re, vorticity.im);
      };
      for (let i = 0; i < count; i++) {
        const date = Math.floor(days[i] / product.everyDays);
        if (date + 1 >= maps.length) break;
        if (date !== before || !earlier || !later) {
          earlier = date === before + 1 && later ? later : fieldsOf(date);
          later = fieldsOf(date + 1);
          before = date;
        }
        const along = days[i] / product.everyDays - date;
        const [x, y] = toSquare(longitude[i], latitude[i], lengthMetres);
        const stencil = periodicStencil(x, y, size);
        const blend = (name: keyof PhysicalFields, a: PhysicalFields, b: PhysicalFields): number =>
          (1 - along) * valueUnder(stencil, a[name], size) + along * valueUnder(stencil, b[name], size);
        const mapped = {
          stream: blend("stream", earlier, later),
          u: blend("u", earlier, later),
          v: blend("v", earlier, later),
        };
        mappedCross[i] = cross(i, mapped, lengthMetres);
      }
      return { points, height, trueHeight, trueCross, mappedCross };
    },
  };
}

interface PhysicalFields {
  readonly stream: Float64Array;
  readonly u: Float64Array;
  readonly v: Float64Array;
}

function physicalFields(model: VorticityModel, real: Float64Array, imaginary: Float64Array): PhysicalFields {
  const { plane, fourier } = model;
  const total = plane.size * plane.size;
  const u = new Float64Array(total);
  const v = new Float64Array(total);
  velocityPair(plane, real, imaginary, u, v);
  fourier.toPhysical(u, v);
  const re = new Float64Array(plane.count);
  const im = new Float64Array(plane.count);
  for (const index of plane.keptIndices) {
    re[index] = -real[index] / plane.squared[index];
    im[index] = -imaginary[index] / plane.squared[index];
  }
  const nothing = { re: new Float64Array(plane.count), im: new Float64Array(plane.count) };
  const stream = new Float64Array(total);
  const unused = new Float64Array(total);
  fieldPair(plane, { re, im }, nothing, stream, unused);
  fourier.toPhysical(stream, unused);
  return { stream, u, v };
}
