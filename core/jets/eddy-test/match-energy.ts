import { Fault } from "../../model/errors";
import { geostrophicVelocity } from "../../ocean/geostrophy";
import type { GridGeometry } from "../../ocean/grid-geometry";
import { envelopeMeanSquare } from "./eddy-life";
import { type MapSmoothing, mappedEddy, northwardVariancePerEddy } from "./gaussian-eddy";
import { valueAtLatitude } from "./latitude-table";
import type { EddyPopulation } from "./population";
import { meanSquare, quantileAt } from "./quantile-table";

/** Degrees of latitude over which the data's energy is averaged: about one eddy and its neighbours. */
const beltDegrees = 3;
const noSmoothing: MapSmoothing = { metres: 0, days: 0 };

/**
 * Variance of the geostrophic northward current by row, m2 s-2, over the dates given; NaN for rows without any. Zonal jets
 * have no northward current: matched to this, oceans of eddies do not take on the energy of the jets they are held against.
 * `heightAnomaly(date)` is a plane in metres less its background.
 */
export function northwardVariance(
  heightAnomaly: (date: number) => Float64Array,
  dates: readonly number[],
  geometry: GridGeometry,
  poll: () => void = () => undefined,
): Float64Array {
  const { rows, columns } = geometry;
  const sum = new Float64Array(rows);
  const count = new Float64Array(rows);
  for (const date of dates) {
    poll();
    const { v } = geostrophicVelocity(heightAnomaly(date), geometry);
    for (let i = 0; i < v.length; i++) {
      if (Number.isNaN(v[i])) continue;
      const row = Math.floor(i / columns);
      sum[row] += v[i] * v[i];
      count[row]++;
    }
  }
  return sum.map((value, row) => (count[row] > 0 ? value / count[row] : Number.NaN));
}

/** Variance of the northward current at a random place and moment in an ocean of the population (factor included), m2 s-2. */
export function populationNorthwardVariance(
  population: EddyPopulation,
  latitudeDegrees: number,
  gravityOverCoriolis: number,
  smoothing: MapSmoothing = noSmoothing,
): number {
  const speed = valueAtLatitude(population.speedMetresPerSecond, latitudeDegrees);
  const amplitude = valueAtLatitude(population.amplitudeFactor, latitudeDegrees);
  const radii = 40;
  let perUnitSquare = 0;
  for (let i = 0; i < radii; i++) {
    const radius = quantileAt(population.radiusMetres, (i + 0.5) / radii);
    perUnitSquare += northwardVariancePerEddy(mappedEddy(1, radius, speed, smoothing), gravityOverCoriolis) / radii;
  }
  const squares = meanSquare(population.amplitudeMetres) * amplitude ** 2 * envelopeMeanSquare(population.rampShare);
  return (population.densityPerMillionKm2 / 1e12) * perUnitSquare * squares;
}

/**
 * The population made as energetic as the data: its number scaled so that the variance of its northward current is that of
 * the data on the whole, its amplitudes so that it is so at every latitude (`variance` a row of the geometry, from
 * `northwardVariance`; rows are averaged over 3 degrees). The number comes first because crowded eddies are undercounted; for
 * the variance of zonal means only number times squared amplitude counts. Errors: Fault where no row has a variance.
 */
export function matchEnergy(
  population: EddyPopulation,
  variance: Float64Array,
  geometry: GridGeometry,
  smoothing: MapSmoothing = noSmoothing,
): EddyPopulation {
  const belts = new Map<number, { latitude: number; data: number; model: number; rows: number }>();
  geometry.latitude.forEach((latitude, row) => {
    if (!(variance[row] > 0) || geometry.blanked[row]) return;
    const ratio = geometry.gravity[row] / geometry.coriolis[row];
    const key = Math.floor(latitude / beltDegrees);
    const belt = belts.get(key) ?? { latitude: 0, data: 0, model: 0, rows: 0 };
    belt.latitude += latitude;
    belt.data += variance[row];
    belt.model += populationNorthwardVariance(population, latitude, ratio, smoothing);
    belt.rows++;
    belts.set(key, belt);
  });
  if (belts.size === 0) {
    throw new Fault({
      tag: "region",
      where: "eddyTest, energy of the eddies",
      expected: "heights that vary along at least one row",
      got: "no northward current anywhere",
      advice: "choose a region with data away from the equator",
    });
  }
  const ordered = [...belts.values()].sort((a, b) => a.latitude / a.rows - b.latitude / b.rows);
  const latitudesDegrees = ordered.map(({ latitude, rows }) => latitude / rows);
  const ratios = ordered.map(({ data, model }) => data / model);
  const overall =
    ordered.reduce((sum, { rows }, i) => sum + rows * ratios[i], 0) / ordered.reduce((sum, { rows }) => sum + rows, 0);
  const values = ordered.map(
    (_, i) => valueAtLatitude(population.amplitudeFactor, latitudesDegrees[i]) * Math.sqrt(ratios[i] / overall),
  );
  const [least, most] = [Math.min(...values).toFixed(2), Math.max(...values).toFixed(2)];
  return {
    ...population,
    densityPerMillionKm2: population.densityPerMillionKm2 * overall,
    amplitudeFactor: { latitudesDegrees, values },
    notes: {
      ...population.notes,
      energy: `number times ${overall.toFixed(2)} and amplitudes times ${least} to ${most} by latitude, so that the northward current has the variance of the maps`,
    },
  };
}
