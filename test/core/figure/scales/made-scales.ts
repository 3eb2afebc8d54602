import type { ScalesInput } from "../../../../core/figure/scales-figure";
import type { Drift, Estimate, ScalesResult } from "../../../../core/model/scales-result";

const axis = (first: number, step: number, count: number) =>
  Float64Array.from({ length: count }, (_, i) => first + i * step);
const estimate = (value: number, half: number): Estimate => ({ value, low95: value - half, high95: value + half });
const alone = (value: number): Estimate => estimate(value, Number.NaN);

const rows = 84;
const latitude = axis(20.125, 0.25, rows);
const columns = 100;
export const madeLongitude = axis(-149.875, 0.25, columns);
/** Land in the north-east. */
export const madeOcean = Uint8Array.from({ length: rows * columns }, (_, cell) =>
  Math.floor(cell / columns) > 70 && cell % columns > 80 ? 0 : 1,
);

/** A pattern that moves with `speed` (m s-1) along positions `metres` apart. */
function movingPattern(quantity: string, position: Float64Array, metres: number, speed: number): Drift {
  const days = axis(22_341, 3, 200);
  const values = new Float32Array(position.length * days.length);
  for (let row = 0; row < position.length; row++) {
    for (let date = 0; date < days.length; date++) {
      const place = row * metres - speed * 86_400 * (days[date] - days[0]);
      values[row * days.length + date] = 0.06 * Math.sin((2 * Math.PI * place) / 400_000);
    }
  }
  return {
    quantity,
    speed: estimate(speed, 0.003),
    limits: "bootstrap",
    share: 0.4,
    medianShare: 0.01,
    picture: { rows: position.length, columns: days.length, values },
    position,
    days,
  };
}

function hump(wavelength: number, height: number) {
  const wavenumber = axis(0, 1 / 2_400_000, 40);
  const density = wavenumber.map((k) =>
    k > 0 ? (height / k) * Math.exp(-((Math.log(k * wavelength) / 0.4) ** 2)) : 0,
  );
  return { wavenumber, density };
}

/** Density that falls off about the origin, on a plane of wavenumbers. */
function energyPlane(): NonNullable<ScalesResult["plane"]> {
  const zonal = axis(-40 / 2_400_000, 1 / 2_400_000, 81);
  const meridional = axis(-30 / 2_400_000, 1 / 2_400_000, 61);
  const values = new Float32Array(81 * 61);
  meridional.forEach((l, row) => {
    zonal.forEach((k, column) => {
      values[row * 81 + column] = 1e7 * Math.exp(-Math.hypot(k, l) * 500_000);
    });
  });
  const scale = Math.sqrt(2e-11 / 0.08) / (2 * Math.PI);
  const angle = axis(-Math.PI / 2, Math.PI / 90, 91);
  return {
    zonal,
    meridional,
    density: { rows: 61, columns: 81, values },
    boundary: {
      zonal: angle.map((each) => scale * Math.max(0, Math.cos(each)) ** 1.5),
      meridional: angle.map((each) => scale * Math.sin(each) * Math.sqrt(Math.max(0, Math.cos(each)))),
    },
    speed: 0.08,
    shareInside: 0.31,
  };
}

function waves(): NonNullable<ScalesResult["frequencyWavenumber"]> {
  const frequency = axis(0, 1 / 900, 150);
  const wavenumber = axis(-50 / 2_400_000, 1 / 2_400_000, 100);
  const values = Float32Array.from({ length: 15_000 }, (_, i) => {
    const [f, k] = [frequency[Math.floor(i / 100)], wavenumber[i % 100]];
    return Math.exp(-(((f * 250 + k * 900_000) / 0.8) ** 2) - f * 60);
  });
  const cycles = axis(1 / 9_000_000, 1 / 9_000_000, 80);
  const curve = (id: "at-rest" | "in-flow", meridionalWavelength: number, speed: number) => ({
    id,
    meridionalWavelength,
    wavenumber: cycles.map((each) => -each),
    frequency: cycles.map((each) => (each * speed * 86_400) / (1 + (each * 250_000) ** 2)),
  });
  return {
    frequency,
    wavenumber,
    density: { rows: 150, columns: 100, values },
    curves: [curve("at-rest", Number.POSITIVE_INFINITY, 0.027), curve("in-flow", 480_000, 0.015)],
  };
}

const rhines = Object.fromEntries(
  ["root", "root-width", "root-wavelength", "root-two", "root-two-width", "root-two-wavelength"].map((id, i) => [
    id,
    { total: 71_000 * (i + 1), eddy: 60_000 * (i + 1) },
  ]),
);

/** Numbers of a made-up sea in every part of a result; none was measured or computed from data. */
export function madeScales(): ScalesResult {
  const profile = latitude.map((degrees) => 0.06 * Math.sin(1.4 * degrees));
  const ruler = [
    ["spacing", "Jets of the mean", alone(232_000)],
    ["band-spacing", "Jets in the band", alone(215_000)],
    ["peak", "Peak of each map's u", estimate(240_000, 12_000)],
    ["mean-peak", "Peak of the mean's u", alone(236_000)],
    ["rhines", "π √(U/β)", alone(174_000)],
    ["rhines-two", "π √(2U/β)", alone(247_000)],
    ["deformation", "π times deformation radius", alone(113_000)],
    ["resolved", "Resolved by the mapping", alone(90_000)],
    ["grid", "Resolved by the grid", alone(27_700)],
  ] as const;
  const frequency = axis(0, 1 / 900, 150);
  const nan = new Float64Array(rows).fill(Number.NaN);
  return {
    latitude,
    middleLatitude: 30.625,
    alongLatitude: 30.625,
    period: {
      quantity: "u",
      frequency,
      density: frequency.map((f) => 0.02 / (1 + (f * 160) ** 2)),
      segments: 5,
      segmentDays: 300,
      window: "hann",
      units: "m2 s-2 day",
      degreesOfFreedom: 9,
      lowFactor: 0.5,
      highFactor: 3,
    },
    zonal: { eachMap: null, timeMean: null, inBand: null },
    meridional: { eachMap: hump(420_000, 0.008), timeMean: hump(470_000, 0.006), inBand: hump(440_000, 0.003) },
    mapDates: Int32Array.of(0, 10, 20),
    plane: energyPlane(),
    frequencyWavenumber: waves(),
    lengths: {
      ruler: ruler.map(([id, title, halfWavelength]) => ({ id, title, halfWavelength, basis: "made up" })),
      meanSpacing: 464_000,
      bandSpacing: 430_000,
      peakWavelength: estimate(480_000, 24_000),
      timeMeanPeakWavelength: 472_000,
      totalSpeed: 0.09,
      eddySpeed: 0.06,
      rhinesSpeed: "eddy",
      rhines,
      beta: 2e-11,
      deformationRadius: 36_000,
      deformationSource: "table",
      resolvedWavelength: 180_000,
      gridWavelength: 55_400,
    },
    byLatitude: {
      totalSpeed: nan,
      eddySpeed: nan,
      beta: nan,
      deformationRadius: nan,
      longWaveSpeed: nan,
      rhines: {},
    },
    zonality: {
      days: Float64Array.of(3, 9, 30, 90, 180, 450),
      zonality: Float64Array.of(0.02, 0.05, 0.2, 0.3, 0.36, 0.4),
    },
    energy: { total: 0.0033, weeksDays: 30, monthsDays: 540, weeksShare: 0.12, monthsShare: 0.5, longerShare: 0.38 },
    drift: {
      alongLatitude: movingPattern("v", madeLongitude, 23_900, -0.024),
      acrossLatitudes: movingPattern("u", latitude, 27_800, 0.006),
    },
    waves: {
      longWave: -0.0257,
      longWaveInFlow: -0.0125,
      atPeak: -0.0186,
      atPeakInFlow: -0.0053,
      zonalWavelength: 555_000,
      meridionalWavelength: 480_000,
      shortestPeriodDays: 205,
      meanFlow: 0.0137,
    },
    forcing: {
      meanFlow: profile,
      flux: profile.map((value) => 0.001 * value),
      convergence: profile.map((value, row) => 1e-8 * value + 2e-10 * Math.sin(3 * row)),
      latitudeTime: { rows: 0, columns: 0, values: new Float32Array(0) },
      days: new Float64Array(0),
      push: { perDay: estimate(0.042, 0.011), correlation: 0.71, effectivePairs: 80 },
      pushOfMeans: { perDay: estimate(0.06, 0.02), correlation: 0.8, effectivePairs: 12 },
      pushInTime: { perDay: estimate(0.01, 0.02), correlation: 0.1, effectivePairs: 200 },
      conversion: estimate(3.1e-9, 0.9e-9),
      gradient: profile.map((value, row) => (row < 2 ? Number.NaN : 1.6e-11 + 3e-10 * value)),
      signChanges: [23.4, 28.1],
    },
    persistence: persistence(profile),
    notes: ["The deformation radius is from a built-in table of zonal means that is off by up to 15 %."],
  };
}

/** Steady where the mean flow is strong; more so in the east. */
function persistence(profile: Float64Array): ScalesResult["persistence"] {
  const strength = profile.map((value) => Math.abs(value) / 0.06);
  const share = Float32Array.from({ length: rows * columns }, (_, cell) =>
    madeOcean[cell] === 0
      ? Number.NaN
      : 0.5 + 0.5 * strength[Math.floor(cell / columns)] * ((cell % columns) / columns),
  );
  return {
    inBand: true,
    stepDays: 9,
    share: { rows, columns, values: share },
    longestDays: { rows, columns, values: share.map((value) => 900 * (value - 0.5)) },
    sign: Int8Array.from({ length: rows * columns }, (_, cell) => Math.sign(profile[Math.floor(cell / columns)])),
    byLatitude: {
      share: strength.map((value) => 0.5 + 0.4 * value),
      longestDays: strength.map((value) => 1230 * value),
      sign: Int8Array.from(profile, Math.sign),
    },
  };
}

/** The notes of a result that lacks everything it may lack. */
export const reasons = {
  space: "No spectrum in space: the grid's steps are uneven, or no line across it has values on half its length.",
  period: "No spectrum by period: fewer than 16 dates an even step apart, or gaps in every segment.",
  waves: "No frequency-wavenumber spectrum along 30.63° N: too few dates, uneven steps, or values on under half of it.",
  along: "No drift along 30.63° N: nothing that varies there, or too few dates.",
  across: "No drift across latitudes: nothing that varies, or too few dates.",
} as const;

/** A result of one date on an uneven grid: every part that may be missing is. */
export function bareScales(): ScalesResult {
  const made = madeScales();
  const nan = latitude.map(() => Number.NaN);
  const unknown = { value: Number.NaN, low95: Number.NaN, high95: Number.NaN };
  const nothing = { eachMap: null, timeMean: null, inBand: null };
  return {
    ...made,
    period: null,
    meridional: nothing,
    plane: null,
    frequencyWavenumber: null,
    lengths: {
      ...made.lengths,
      ruler: [],
      meanSpacing: Number.NaN,
      bandSpacing: Number.NaN,
      peakWavelength: unknown,
      deformationRadius: Number.NaN,
    },
    zonality: { days: new Float64Array(0), zonality: new Float64Array(0) },
    energy: null,
    drift: { alongLatitude: null, acrossLatitudes: null },
    waves: {
      ...made.waves,
      longWave: Number.NaN,
      atPeak: Number.NaN,
      zonalWavelength: Number.NaN,
      shortestPeriodDays: Number.NaN,
    },
    forcing: {
      ...made.forcing,
      meanFlow: nan,
      convergence: nan,
      gradient: nan,
      push: { perDay: unknown, correlation: Number.NaN, effectivePairs: Number.NaN },
      pushOfMeans: { perDay: unknown, correlation: Number.NaN, effectivePairs: Number.NaN },
      conversion: unknown,
      signChanges: [],
    },
    persistence: {
      ...made.persistence,
      share: { rows, columns, values: new Float32Array(rows * columns).fill(Number.NaN) },
      longestDays: { rows, columns, values: new Float32Array(rows * columns).fill(Number.NaN) },
      byLatitude: { share: nan, longestDays: nan, sign: new Int8Array(rows) },
    },
    notes: Object.values(reasons),
  };
}

export function madeInput(result: ScalesResult = madeScales(), rest: Partial<ScalesInput> = {}): ScalesInput {
  return {
    result,
    longitude: madeLongitude,
    ocean: madeOcean,
    calendar: "standard",
    region: "20–41° N, 150–125° W",
    grid: "Grid A · 0.25° · 3 d",
    band: "periods 90–540 days",
    ...rest,
  };
}
