import { lessZonalMean } from "./find-eddies";
import type { LocalGrid } from "./local-grid";

/** Planes of height anomaly in metres at dates an even step apart. */
export interface HeightAnomalies {
  readonly dates: number;
  readonly stepDays: number;
  /** 1 where the date has data. */
  readonly hasData: Uint8Array;
  /** Row-major plane of one date less its background; NaN for land and gaps. */
  readonly plane: (date: number) => Float64Array;
}

/** How a belt of latitude moves and how long its pattern lasts. */
export interface BeltDrift {
  readonly latitudeDegrees: number;
  /** Eastward speed, m s-1; NaN where no pattern could be followed. */
  readonly speedMetresPerSecond: number;
  /** Correlation of the moving pattern with itself by lag: the highest near the path. */
  readonly correlation: Float64Array;
}

export interface DriftSurvey {
  readonly lagDays: Float64Array;
  readonly belts: readonly BeltDrift[];
}

const beltDegrees = 2;
/** Patterns correlated less than this are not followed further. Common practice, no source. */
const leastCorrelation = 0.3;
/** No eddy drifts faster. Common practice, no source. */
const fastestMetresPerSecond = 0.5;

/**
 * Lagged correlation along longitude of height anomaly less its zonal mean (so that a standing jet lends eddies nothing of
 * its lasting), summed over `bases` pairs of dates and the rows of 2-degree belts. From lag to lag the highest correlation
 * is followed near the path so far; the speed is the least-squares slope of shift on lag, weighted by squared correlation.
 */
export function surveyDrift(
  heights: HeightAnomalies,
  grid: LocalGrid,
  lags: readonly number[],
  bases: readonly number[],
  poll: () => void = () => undefined,
): DriftSurvey {
  const belts = beltsOf(grid);
  const lagDays = Float64Array.from(lags, (lag) => lag * heights.stepDays);
  const columnDegrees = (grid.longitudeDegrees[grid.columns - 1] - grid.longitudeDegrees[0]) / (grid.columns - 1);
  const middles = belts.map((rows) => rows[rows.length >> 1]);
  const cellMetres = middles.map((row) => columnDegrees * grid.eastMetresPerDegree[row]);
  const widest = cellMetres.map((metres) => {
    const travelled = fastestMetresPerSecond * lagDays[lagDays.length - 1] * 86400;
    return Math.min(grid.columns >> 1, Math.ceil(travelled / Math.abs(metres)) + 2);
  });
  const sums = belts.map((_, belt) => lags.map(() => new ShiftSums(widest[belt])));
  for (const base of bases) {
    poll();
    if (!heights.hasData[base]) continue;
    const first = lessZonalMean(heights.plane(base), grid);
    lags.forEach((lag, index) => {
      const later = base + lag;
      if (later >= heights.dates || !heights.hasData[later]) return;
      const second = lessZonalMean(heights.plane(later), grid);
      belts.forEach((rows, belt) => {
        for (const row of rows) sums[belt][index].add(first, second, row * grid.columns, grid.columns);
      });
    });
  }
  return {
    lagDays,
    belts: belts.map((_, belt) => ({
      latitudeDegrees: grid.latitudeDegrees[middles[belt]],
      ...followPath(sums[belt], lagDays, cellMetres[belt]),
    })),
  };
}

/** Rows in belts of about 2 degrees, southern first whichever way the rows run; at most 6 rows stand for a belt. */
function beltsOf({ rows, latitudeDegrees }: LocalGrid): number[][] {
  const order = Array.from({ length: rows }, (_, row) => row).sort((a, b) => latitudeDegrees[a] - latitudeDegrees[b]);
  const span = latitudeDegrees[order[rows - 1]] - latitudeDegrees[order[0]];
  const count = Math.max(1, Math.round(span / beltDegrees));
  return Array.from({ length: count }, (_, belt) => {
    const own = order.slice(Math.floor((belt * rows) / count), Math.floor(((belt + 1) * rows) / count));
    const stride = Math.ceil(own.length / 6);
    return own.filter((_row, i) => i % stride === 0);
  }).filter((own) => own.length > 0);
}

/** Products of two lines at every shift of the second, over pairs where both are valid. */
class ShiftSums {
  readonly #products: Float64Array;
  readonly #first: Float64Array;
  readonly #second: Float64Array;

  constructor(readonly widest: number) {
    this.#products = new Float64Array(2 * widest + 1);
    this.#first = new Float64Array(2 * widest + 1);
    this.#second = new Float64Array(2 * widest + 1);
  }

  add(first: Float64Array, second: Float64Array, offset: number, columns: number): void {
    for (let shift = -this.widest; shift <= this.widest; shift++) {
      let [product, squaresFirst, squaresSecond] = [0, 0, 0];
      const to = Math.min(columns, columns - shift);
      for (let column = Math.max(0, -shift); column < to; column++) {
        const a = first[offset + column];
        const b = second[offset + column + shift];
        if (Number.isNaN(a + b)) continue;
        product += a * b;
        squaresFirst += a * a;
        squaresSecond += b * b;
      }
      this.#products[shift + this.widest] += product;
      this.#first[shift + this.widest] += squaresFirst;
      this.#second[shift + this.widest] += squaresSecond;
    }
  }

  at(shift: number): number {
    const i = shift + this.widest;
    const scale = Math.sqrt(this.#first[i] * this.#second[i]);
    return scale > 0 ? this.#products[i] / scale : Number.NaN;
  }

  /** Highest correlation at shifts within `reach` of `near`, refined by a parabola. */
  peak(near: number, reach: number): { shift: number; correlation: number } {
    let best = { shift: Number.NaN, correlation: Number.NEGATIVE_INFINITY };
    const from = Math.max(-this.widest, Math.ceil(near - reach));
    const to = Math.min(this.widest, Math.floor(near + reach));
    for (let shift = from; shift <= to; shift++) {
      const here = this.at(shift);
      if (!(here > best.correlation)) continue;
      const [before, after] = [this.at(Math.max(-this.widest, shift - 1)), this.at(Math.min(this.widest, shift + 1))];
      const bend = before - 2 * here + after;
      const offset = bend < 0 && here >= before && here >= after ? (before - after) / (2 * bend) : 0;
      best = { shift: shift + offset, correlation: here - 0.25 * (before - after) * offset };
    }
    return best;
  }
}

function followPath(
  byLag: readonly ShiftSums[],
  lagDays: Float64Array,
  cellMetres: number,
): Pick<BeltDrift, "speedMetresPerSecond" | "correlation"> {
  const correlation = new Float64Array(byLag.length).fill(Number.NaN);
  let [across, along] = [0, 0];
  let following = true;
  byLag.forEach((sums, index) => {
    const days = lagDays[index];
    // Half an eddy either side of the path so far; on the first lag, as far as the fastest eddy goes.
    const first = along === 0;
    const travelled = (fastestMetresPerSecond * 86400 * days) / Math.abs(cellMetres);
    const path = first ? 0 : (across / along) * days;
    const peak = sums.peak(
      path,
      first ? Math.max(1, Math.min(travelled, 60e3 / Math.abs(cellMetres))) : Math.max(2, 50e3 / Math.abs(cellMetres)),
    );
    correlation[index] = peak.correlation === Number.NEGATIVE_INFINITY ? Number.NaN : peak.correlation;
    if (!(peak.correlation >= leastCorrelation)) following = false;
    if (!following) return;
    const weight = peak.correlation ** 2;
    across += weight * peak.shift * days;
    along += weight * days * days;
  });
  const cellsPerDay = along > 0 ? across / along : Number.NaN;
  return { speedMetresPerSecond: (cellsPerDay * cellMetres) / 86400, correlation };
}
