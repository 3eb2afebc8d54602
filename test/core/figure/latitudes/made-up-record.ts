import type { LatitudesInput } from "../../../../core/figure/latitudes/input";
import { makeAxis, makeTimeAxis } from "../../../../core/model/axis";

export interface MadeUpShape {
  readonly rows?: number;
  readonly columns?: number;
  readonly dates?: number;
  readonly inBand?: boolean;
}

/** Reproducible numbers in 0..1 (mulberry32), so that a failing picture can be drawn again. */
function randomNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

/** Waves of many lengths that sum to jets with eddies; no measured data. */
function madeUpField(seed: number) {
  const random = randomNumbers(seed);
  const waves = Array.from({ length: 40 }, () => ({
    x: (random() - 0.5) * 1.6,
    y: (random() - 0.5) * 5,
    t: (random() - 0.5) * 0.05,
    phase: random() * 2 * Math.PI,
  }));
  return (longitude: number, latitude: number, day: number) => {
    let sum = 0.9 * Math.sin(2.2 * latitude + 0.4 * Math.sin(day / 60));
    for (const wave of waves) {
      sum += 0.28 * Math.cos(wave.x * longitude + wave.y * latitude + wave.t * day + wave.phase);
    }
    return 0.05 * sum;
  };
}

/** A basin with a land blob, two gaps in time, a cloud of missing cells and a red spectrum, all made up. */
export function madeUpInput(shape: MadeUpShape = {}): LatitudesInput {
  const { rows = 84, columns = 100, dates = 300, inBand = true } = shape;
  const latitude = makeAxis(
    "latitude",
    Float64Array.from({ length: rows }, (_, row) => 20 + (21 * (row + 0.5)) / rows),
    "made up",
  );
  const longitude = makeAxis(
    "longitude",
    Float64Array.from({ length: columns }, (_, column) => -150 + (25 * (column + 0.5)) / columns),
    "made up",
  );
  const time = makeTimeAxis(
    Float64Array.from({ length: dates }, (_, date) => 22339 + 3 * date),
    "standard",
    "made up",
  );
  const dateIndex = Math.floor(dates / 2);
  const isGap = (date: number) => (date > 60 && date < 64) || (date > 168 && date < 177) || date === 255;
  const field = madeUpField(7);
  const ocean = new Uint8Array(rows * columns).fill(1);
  const map = new Float32Array(rows * columns);
  const onDate = new Float64Array(rows);
  for (let row = 0; row < rows; row++) {
    let sum = 0;
    let count = 0;
    for (let column = 0; column < columns; column++) {
      const [x, y] = [longitude.values[column], latitude.values[row]];
      const cell = row * columns + column;
      map[cell] = field(x, y, time.values[dateIndex]);
      if (Math.hypot((x + 128.5) / 2.4, (y - 38) / 3.2) < 1 + 0.2 * Math.sin(3 * y)) ocean[cell] = 0;
      if (ocean[cell] === 0 || Math.hypot(x + 142, y - 25) < 0.9) map[cell] = Number.NaN;
      if (Number.isNaN(map[cell])) continue;
      sum += map[cell];
      count += 1;
    }
    onDate[row] = sum / count;
  }
  const latitudeTime = new Float32Array(rows * dates);
  const mean = new Float64Array(rows);
  const half95 = new Float64Array(rows);
  for (let row = 0; row < rows; row++) {
    for (let date = 0; date < dates; date++) {
      let sum = 0;
      for (let sample = 0; sample < 6; sample++) {
        sum += field(-149 + 4.6 * sample, latitude.values[row], time.values[date]) / 6;
      }
      latitudeTime[row * dates + date] = isGap(date) ? Number.NaN : sum;
      mean[row] += sum / dates;
    }
    half95[row] = 0.014 + 0.006 * Math.sin(row);
  }
  const frequency = Float64Array.from({ length: 150 }, (_, index) => (index + 1) / 900);
  return {
    record: {
      latitude,
      longitude,
      time,
      ocean,
      hasData: Uint8Array.from({ length: dates }, (_, date) => (isGap(date) ? 0 : 1)),
      coverage: Float64Array.from({ length: dates }, (_, date) =>
        isGap(date) ? 0 : 0.97 - 0.12 * Math.sin(date / 40) ** 8,
      ),
    },
    result: {
      choice: { inBand },
      dateIndex,
      map: { rows, columns, values: map },
      onDate,
      profile: { mean, half95 },
      latitudeTime: { rows, columns: dates, values: latitudeTime },
      columnDates: Int32Array.from({ length: dates }, (_, date) => date),
      filterEnd: Uint8Array.from({ length: dates }, (_, date) => (date < 20 || date >= dates - 20 ? 1 : 0)),
      limits: [-0.118, 0.118],
      pictureLimits: [-0.04, 0.04],
      response: {
        frequency,
        amplitude: frequency.map((value) => 1 / (1 + (value * 85) ** 12) / (1 + (1 / (value * 560)) ** 12)),
        daysLostEachEnd: 60,
      },
    },
    spectrum: {
      frequency,
      density: frequency.map((value, index) => (0.02 / (1 + (value * 160) ** 2)) * (1 + 0.12 * Math.sin(index * 1.7))),
    },
    quantity: { title: "Eastward velocity", units: "m s-1", signed: true },
    band: { shortestDays: 90, longestDays: 540, filter: "lanczos" },
    region: "20–41° N, 150–125° W",
    grid: "Grid A · 0.25° · 3 d",
    date: "24 May 2032",
  };
}

/** The same with height errors that a third of the cells do not exceed, rows of an equatorial blend and a bridge over gaps. */
export function withDoubts(input: LatitudesInput): LatitudesInput {
  const { map, onDate } = input.result;
  return {
    ...input,
    record: {
      ...input.record,
      blendedRows: Uint8Array.from(onDate, (_, row) => (row < 5 || (row > 10 && row < 14) ? 1 : 0)),
    },
    result: {
      ...input.result,
      error: {
        map: { ...map, values: new Float32Array(map.values.length).fill(0.012) },
        onDate: onDate.map(() => 0.002),
      },
    },
    band: { ...input.band, order: 4, bridgeDays: 20 },
    errorSource: "a 2 cm height error",
  };
}
