import { describe, expect, test } from "vitest";
import { driftOf } from "../../../../core/study/scales/drift-picture";
import { waveSpectrum } from "../../../../core/study/scales/wave-picture";
import {
  dispersionCurves,
  waveSettingAt,
  waveSpeeds,
  withCurves,
  zonalPeak,
} from "../../../../core/study/scales/waves";
import { expectClose } from "../../../expect-close";

const beta = 1.98247e-11;
const still = { beta, deformationRadius: 40_000, flow: { speed: 0, curvature: 0 } };
const days = Float64Array.from({ length: 300 }, (_, i) => 3 * i);
const metres = Float64Array.from({ length: 80 }, (_, i) => 25_000 * i);

/** A wave of 400 km that moves at `speed` m s-1, `values[position * dates + date]`. */
function moving(speed: number) {
  const values = new Float64Array(80 * 300);
  metres.forEach((x, position) => {
    days.forEach((day, date) => {
      values[position * 300 + date] = Math.cos((2 * Math.PI * (x - speed * day * 86400)) / 400_000);
    });
  });
  return { quantity: "v", values, degrees: metres.map((x) => x / 1e5), metres, days };
}

describe("waves along a latitude", () => {
  test("published numbers: 40 km at 30 degrees, long waves -3.172 cm/s, 183.4 days at least; 500 by 300 km -1.623 cm/s", () => {
    const speeds = waveSpeeds(still, 500_000, 300_000);
    const because = "four published digits";
    expectClose(speeds.longWave, -0.03172, { relative: 3e-4, because });
    expectClose(speeds.shortestPeriodDays, 183.4, { relative: 3e-4, because });
    expectClose(speeds.atPeak, -0.01623, { relative: 4e-4, because });
  });

  test("a flow without curvature carries the waves, and its curvature takes from beta", () => {
    const gradient = Float64Array.of(beta, beta - 5e-12, Number.NaN);
    const flow = Float64Array.of(0.02, 0.02, 0.02);
    const at = (row: number) => waveSpeeds(waveSettingAt(row, beta, 40_000, flow, gradient), 500_000, 300_000);
    expectClose(at(0).longWaveInFlow, at(0).longWave + 0.02, { relative: 1e-9, because: "a shift" });
    expectClose(at(1).longWaveInFlow, -(beta - 5e-12) * 1.6e9 + 0.02, { relative: 1e-9, because: "beta - U_yy" });
    expect(at(2).longWaveInFlow).toBe(at(0).longWaveInFlow);
  });

  test("dispersion curves go west at rest; in a strong eastward flow they go east", () => {
    const curves = dispersionCurves({ ...still, flow: { speed: 0.2, curvature: 0 } }, 1e-5, 300_000);
    expect(curves.map(({ id }) => id)).toEqual(["at-rest", "in-flow", "at-rest", "in-flow"]);
    expect(curves[0].wavenumber.every((value) => value < 0)).toBe(true);
    expect(curves[1].wavenumber.every((value) => value > 0)).toBe(true);
    expect(curves.every(({ frequency }) => frequency.every((value) => value > 0))).toBe(true);
    const [longest] = curves[0].wavenumber;
    expectClose(curves[0].frequency[0] / 86400 / longest, -0.03172, {
      relative: 0.01,
      because: "long waves at the end",
    });
  });

  test("a wave of 400 km that moves west at 3 cm/s is found at its wavenumber, frequency and speed", () => {
    const picture = moving(-0.03);
    const spectrum = waveSpectrum(picture);
    if (!spectrum) throw new Error("no spectrum");
    let best = 0;
    spectrum.density.forEach((value, i) => {
      if (value > spectrum.density[best]) best = i;
    });
    const columns = spectrum.wavenumber.length;
    const frequency = spectrum.frequency[Math.floor(best / columns)];
    const wavenumber = spectrum.wavenumber[best % columns];
    const half = (axis: Float64Array) => Math.abs(axis[1] - axis[0]) / 2;
    expect(Math.abs(wavenumber + 1 / 400_000)).toBeLessThanOrEqual(half(spectrum.wavenumber));
    expect(Math.abs(frequency - (0.03 * 86400) / 400_000)).toBeLessThanOrEqual(half(spectrum.frequency));
    expectClose(zonalPeak(spectrum), 400_000, { relative: 0.05, because: "a parabola on a Hann window's bins" });
    expect(withCurves(spectrum, still, Number.NaN)?.curves.length).toBe(2);

    const drift = driftOf(picture, "row means");
    expectClose(drift?.speed.value ?? 0, -0.03, { relative: 0.01, because: "a fifth of the angle step" });
    expect(drift?.speed.low95).toBeLessThanOrEqual(-0.03 * 0.99);
  });

  test("a wave that moves east at 5 cm/s drifts east", () => {
    expectClose(driftOf(moving(0.05), "row means")?.speed.value ?? 0, 0.05, {
      relative: 0.01,
      because: "a fifth of the angle step",
    });
  });

  test("what does not vary, has few dates or half its picture missing has neither drift nor spectrum", () => {
    const picture = moving(-0.03);
    expect(driftOf({ ...picture, values: picture.values.map(() => 0.3) }, "row means")).toBeNull();
    const blank = { ...picture, values: picture.values.map(() => Number.NaN) };
    expect(driftOf(blank, "row means")).toBeNull();
    expect(waveSpectrum(blank)).toBeNull();
    const short = { ...picture, days: days.slice(0, 3), values: picture.values.slice(0, 240) };
    expect(waveSpectrum(short)).toBeNull();
    const halfGone = picture.values.map((value, i) => (Math.floor(i / 300) > 35 ? Number.NaN : value));
    expect(waveSpectrum({ ...picture, values: halfGone })).toBeNull();
  });
});
