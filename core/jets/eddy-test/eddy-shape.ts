import type { LocalGrid } from "./local-grid";

export interface FittedHill {
  /** Height of the fitted Gaussian above its ground, metres. */
  readonly amplitudeMetres: number;
  readonly radiusMetres: number;
  /** Height of the centre over the mean of the last ring that is lower than the one inside it, metres. */
  readonly standsOutMetres: number;
  /** Share of the height variance among the fitted cells that the hill explains, 0 to 1. */
  readonly explained: number;
}

/** Cells around a centre: squared distance in m2 and height, sign applied. */
interface Surroundings {
  readonly squared: number[];
  readonly height: number[];
}

/** Share of a ring's cells that must be valid. Common practice, no source. */
const leastRingShare = 0.6;

/**
 * Follows a hill outward ring by ring (rings one cell wide) while the ring means fall, to `farthestMetres` at most, and fits
 * ground + amplitude · exp(-r² / 2 radius²) by least squares to the cells within twice the distance at which the ring means
 * have fallen by half (2.4 radii of a Gaussian; neighbours begin beyond). The radius is sought between half a cell and that
 * distance over 1.3, beyond which hill and ground cannot be told apart. Null where not even two rings fall.
 */
export function fitEddy(
  plane: Float64Array,
  grid: LocalGrid,
  centre: { readonly row: number; readonly column: number; readonly sign: number },
  farthestMetres: number,
): FittedHill | null {
  const around = surroundings(plane, grid, centre, farthestMetres);
  const outer = lastFallingRing(around, grid, centre, farthestMetres);
  if (!outer) return null;
  const farthest = Math.min(outer.ring, Math.max(2, 2 * outer.halfRing)) * grid.cellMetres;
  const inside = within(around, farthest + grid.cellMetres / 2);
  const radiusMetres = bestRadius(inside, grid.cellMetres / 2, farthest / 1.3);
  const { amplitude, explained } = hillOnGround(inside, radiusMetres);
  if (!(amplitude > 0)) return null;
  const standsOutMetres = centre.sign * plane[centre.row * grid.columns + centre.column] - outer.mean;
  return { amplitudeMetres: amplitude, radiusMetres, standsOutMetres, explained };
}

function surroundings(
  plane: Float64Array,
  grid: LocalGrid,
  { row, column, sign }: { row: number; column: number; sign: number },
  farthestMetres: number,
): Surroundings {
  const squared: number[] = [];
  const height: number[] = [];
  const { rows, columns, northMetres, longitudeDegrees } = grid;
  const east = grid.eastMetresPerDegree[row];
  const limit = farthestMetres + grid.cellMetres / 2;
  const visitRow = (other: number): boolean => {
    const north = northMetres[other] - northMetres[row];
    if (Math.abs(north) > limit) return false;
    const visit = (at: number): boolean => {
      const distance = (longitudeDegrees[at] - longitudeDegrees[column]) * east;
      if (Math.abs(distance) > limit) return false;
      const value = plane[other * columns + at];
      if (!Number.isNaN(value)) {
        squared.push(north * north + distance * distance);
        height.push(sign * value);
      }
      return true;
    };
    for (let at = column; at < columns && visit(at); at++);
    for (let at = column - 1; at >= 0 && visit(at); at--);
    return true;
  };
  for (let other = row; other < rows && visitRow(other); other++);
  for (let other = row - 1; other >= 0 && visitRow(other); other--);
  return { squared, height };
}

function lastFallingRing(
  { squared, height }: Surroundings,
  grid: LocalGrid,
  centre: { readonly row: number },
  farthestMetres: number,
): { ring: number; mean: number; halfRing: number } | null {
  const rings = Math.floor(farthestMetres / grid.cellMetres);
  const sum = new Float64Array(rings + 1);
  const count = new Float64Array(rings + 1);
  squared.forEach((value, i) => {
    const ring = Math.round(Math.sqrt(value) / grid.cellMetres);
    if (ring > rings) return;
    sum[ring] += height[i];
    count[ring]++;
  });
  const cellsPerRing = (2 * Math.PI * grid.cellMetres ** 2) / (grid.cellKm2[centre.row] * 1e6);
  let ring = 0;
  while (ring < rings) {
    const next = ring + 1;
    const enough = count[next] >= leastRingShare * cellsPerRing * next;
    if (!enough || !(sum[next] / count[next] < sum[ring] / count[ring])) break;
    ring = next;
  }
  if (ring < 2) return null;
  const mean = sum[ring] / count[ring];
  const half = (sum[0] + mean) / 2;
  let above = 0;
  while (sum[above + 1] / count[above + 1] > half) above++;
  const [high, low] = [sum[above] / count[above], sum[above + 1] / count[above + 1]];
  return { ring, mean, halfRing: above + (high - half) / (high - low) };
}

function within({ squared, height }: Surroundings, distanceMetres: number): Surroundings {
  const kept = squared.flatMap((value, i) => (value <= distanceMetres ** 2 ? [i] : []));
  return { squared: kept.map((i) => squared[i]), height: kept.map((i) => height[i]) };
}

/** Least-squares amplitude on a level ground for one radius, and the share of the variance it explains. */
function hillOnGround({ squared, height }: Surroundings, radius: number): { amplitude: number; explained: number } {
  const count = squared.length;
  const scale = -0.5 / (radius * radius);
  let [bell, bellBell, sum, cross, squares] = [0, 0, 0, 0, 0];
  for (let i = 0; i < count; i++) {
    const value = Math.exp(scale * squared[i]);
    bell += value;
    bellBell += value * value;
    sum += height[i];
    cross += value * height[i];
    squares += height[i] * height[i];
  }
  const spread = bellBell - (bell * bell) / count;
  const joint = cross - (bell * sum) / count;
  return { amplitude: joint / spread, explained: (joint * joint) / spread / (squares - (sum * sum) / count) };
}

/** Golden-section search in the logarithm of the radius, to 0.5 %. */
function bestRadius(cells: Surroundings, least: number, most: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  const left = (logRadius: number) => 1 - hillOnGround(cells, Math.exp(logRadius)).explained;
  let [low, high] = [Math.log(least), Math.log(most)];
  let [inner, outer] = [high - golden * (high - low), low + golden * (high - low)];
  let [atInner, atOuter] = [left(inner), left(outer)];
  while (high - low > 0.005) {
    if (atInner < atOuter) {
      [high, outer, atOuter] = [outer, inner, atInner];
      inner = high - golden * (high - low);
      atInner = left(inner);
    } else {
      [low, inner, atInner] = [inner, outer, atOuter];
      outer = low + golden * (high - low);
      atOuter = left(outer);
    }
  }
  return Math.exp((low + high) / 2);
}
