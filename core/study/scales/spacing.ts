import { defaultProminence, findExtremes, kilometresNorth } from "../../jets/ridges/find-extremes";
import type { EarthSettings } from "../../ocean/earth";

/**
 * Mean distance in metres between neighbouring extremes of one sign of a profile of u (m s-1, one value a latitude), minima
 * inside eastward flow included; both signs count alike. `leastProminence` "auto": see defaultProminence. NaN under two
 * extremes of either sign.
 */
export function meanSpacing(
  profile: Float64Array,
  latitude: Float64Array,
  leastProminence: "auto" | number,
  earth: EarthSettings,
): number {
  const { sum, count } = distances(
    profile,
    latitude,
    leastProminence === "auto" ? defaultProminence(profile) : leastProminence,
    earth,
  );
  return sum / count;
}

/** The same over the columns of a latitude-time matrix `matrix[row * dates + date]`, with one prominence for all. */
export function meanSpacingOfDates(
  matrix: Float64Array,
  latitude: Float64Array,
  leastProminence: "auto" | number,
  earth: EarthSettings,
): number {
  const rows = latitude.length;
  const dates = matrix.length / rows;
  const least = leastProminence === "auto" ? defaultProminence(matrix) : leastProminence;
  let [sum, count] = [0, 0];
  for (let date = 0; date < dates; date++) {
    const profile = Float64Array.from({ length: rows }, (_, row) => matrix[row * dates + date]);
    const own = distances(profile, latitude, least, earth);
    sum += own.sum;
    count += own.count;
  }
  return sum / count;
}

function distances(profile: Float64Array, latitude: Float64Array, leastProminence: number, earth: EarthSettings) {
  const found = findExtremes(profile, latitude, { leastProminence, againstFlow: true }, earth);
  let [sum, count] = [0, 0];
  for (const sign of [1, -1]) {
    const own = found.filter((extreme) => extreme.sign === sign).map((extreme) => extreme.latitude);
    for (let i = 1; i < own.length; i++) {
      sum += 1000 * kilometresNorth(own[i - 1], own[i], earth);
      count++;
    }
  }
  return { sum, count };
}
