import { describe, expect, test } from "vitest";
import { type DriftSettings, driftSpeed } from "../../../../core/jets/radon/drift-speed";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { expectClose } from "../../../expect-close";

const settings: DriftSettings = { remove: "mean", angleStepDegrees: null, resamples: 200, seed: 1 };

/** cos(l (y - c t)) with unit amplitude, wavelength in km, speed in m/s; white noise; every valid cell kept by chance. */
function wave(wavelengthKm: number, speed: number, noise: number, kept: number, seed = 7) {
  const rows = 60;
  const columns = 180;
  const random = randomStream(seed);
  const positionMetres = Float64Array.from({ length: rows }, (_, i) => i * 27800);
  const days = Float64Array.from({ length: columns }, (_, i) => i * 10);
  const values = new Float64Array(rows * columns);
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const phase = ((2 * Math.PI) / (wavelengthKm * 1000)) * (positionMetres[row] - speed * 86400 * days[column]);
      const value = Math.cos(phase) + noise * random.normal();
      values[row * columns + column] = random.uniform() < kept ? value : Number.NaN;
    }
  }
  return { values, positionMetres, days };
}

describe("the Radon transform finds the speed of cos(l (y - c t)) within one angle step", () => {
  test.each([0.002, -0.002, 0.005, 0.01, -0.01, 0.03, -0.03, -0.08])("c = %f m/s", (speed) => {
    const got = driftSpeed(wave(400, speed, 0, 1), settings);
    expectClose(got.speed, speed, { absolute: got.speedStep, because: "one angle step" });
    expect(got.share).toBeGreaterThan(10 * got.medianShare);
  });

  test.each([0.005, -0.03])("c = %f m/s under noise as large as the wave, a third of the cells missing", (speed) => {
    const got = driftSpeed(wave(400, speed, 0.7, 2 / 3), settings);
    expectClose(got.speed, speed, { absolute: got.speedStep, because: "one angle step" });
    expect(got.low95).toBeLessThanOrEqual(speed + got.speedStep);
    expect(got.high95).toBeGreaterThanOrEqual(speed - got.speedStep);
  });

  test("a step chosen by hand is kept to, and the answer is still refined below it", () => {
    const got = driftSpeed(wave(400, 0.01, 0, 1), { ...settings, angleStepDegrees: 1 });
    expectClose(got.speed, 0.01, { absolute: got.speedStep / 4, because: "golden section below the step" });
  });

  test("a pattern that stands still has no speed, with the peak's width as its limits", () => {
    const got = driftSpeed(wave(400, 0, 0.3, 1), settings);
    expectClose(got.speed, 0, { absolute: got.speedStep, because: "one angle step" });
    expect(got.limits).toBe("peak width");
    expect(got.low95).toBeLessThan(0);
    expect(got.high95).toBeGreaterThan(0);
  });
});

test("unequal jets that stand still under red noise and gaps have zero inside their limits for 18 of 20 seeds", () => {
  let held = 0;
  for (let seed = 0; seed < 20; seed++) {
    const picture = wave(400, 0, 0.5, 0.9, seed);
    const columns = picture.days.length;
    const random = randomStream(100 + seed);
    for (let row = 0; row < picture.positionMetres.length; row++) {
      let red = random.normal();
      for (let column = 0; column < columns; column++) {
        red = 0.9 * red + Math.sqrt(1 - 0.9 ** 2) * random.normal();
        picture.values[row * columns + column] *= 0.6 + 0.4 * Math.cos(row / 12);
        picture.values[row * columns + column] += 0.5 * red;
      }
    }
    const got = driftSpeed(picture, { ...settings, angleStepDegrees: 0.5, resamples: 100, seed });
    if (got.low95 < 0 && 0 < got.high95) held++;
    expect(got.low95).toBeLessThan(got.speed);
    expect(got.high95).toBeGreaterThan(got.speed);
  }
  expect(held).toBeGreaterThanOrEqual(18);
});

test("taking each row's mean off leaves the moving part of a sum of standing and moving patterns", () => {
  const moving = wave(400, -0.02, 0, 1);
  const standing = wave(300, 0, 0, 1);
  const both = { ...moving, values: moving.values.map((value, i) => value + 3 * standing.values[i]) };
  expectClose(driftSpeed(both, settings).speed, 0, {
    absolute: 1e-3,
    because: "the standing part is nine times as strong",
  });
  const got = driftSpeed(both, { ...settings, remove: "row means" });
  expectClose(got.speed, -0.02, { absolute: got.speedStep, because: "one angle step" });
});

test("noise alone shows no share at any angle worth speaking of", () => {
  const got = driftSpeed(wave(400, 0.01, 1000, 1), settings);
  expect(got.share).toBeLessThan(0.05);
  expect(Math.abs(got.medianShare)).toBeLessThan(0.01);
});

test("bootstrap limits hold the true speed for at least 90 of 100 noisy records", () => {
  let held = 0;
  for (let seed = 0; seed < 100; seed++) {
    const whole = wave(400, 0.04, 1.5, 1, seed);
    const got = driftSpeed(whole, { ...settings, angleStepDegrees: 0.5, resamples: 100, seed });
    expect(got.limits).toBe("bootstrap");
    if (got.low95 <= 0.04 && 0.04 <= got.high95) held++;
  }

  expect(held).toBeGreaterThanOrEqual(90);
});

test("nothing that varies, or too few rows, gives no speed", () => {
  const whole = wave(400, 0.02, 0, 1);
  for (const value of [0, 3, Number.NaN]) {
    expect(driftSpeed({ ...whole, values: whole.values.map(() => value) }, settings).speed).toBeNaN();
  }
  const thin = { ...whole, values: whole.values.slice(0, 360), positionMetres: whole.positionMetres.slice(0, 2) };
  expect(driftSpeed(thin, settings)).toMatchObject({ speed: Number.NaN, low95: Number.NaN });
});
