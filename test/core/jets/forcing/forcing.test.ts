import { describe, expect, test } from "vitest";
import { eddyPush } from "../../../../core/jets/forcing/eddy-push";
import { eddyToMeanConversion, fluxConvergence } from "../../../../core/jets/forcing/flux-convergence";
import { areaMean, planMeridian } from "../../../../core/jets/forcing/meridian";
import { eddyMomentumFlux } from "../../../../core/jets/forcing/momentum-flux";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { metresPerRadianEast, metresPerRadianNorth } from "../../../../core/ocean/earth";
import { expectAllClose, expectClose } from "../../../expect-close";
import { ellipsoid, sphere } from "../earths";

const radian = Math.PI / 180;
const latitude = Float64Array.from({ length: 101 }, (_, i) => 25 + i * 0.1);
const columns = 120;

/**
 * Tilted plane-wave packet from the stream function A(y) cos(kx + ly): u = -psi_y, v = psi_x with the envelope taken as slow,
 * so that u'v' averages to -k l A² / 2. A flow U(y) and a mean v are laid over it.
 */
function packet(amplitude: (row: number) => number, k: number, l: number) {
  const u = new Float64Array(latitude.length * columns);
  const v = new Float64Array(u.length);
  for (let i = 0; i < u.length; i++) {
    const row = Math.floor(i / columns);
    const phase = (2 * Math.PI * k * (i % columns)) / columns + l * row;
    u[i] = 0.2 + 0.01 * row + l * amplitude(row) * Math.sin(phase);
    v[i] = 0.03 - k * amplitude(row) * Math.sin(phase);
  }
  return { u, v };
}

const shape = {
  rows: latitude.length,
  columns,
  ocean: new Uint8Array(latitude.length * columns).fill(1),
  weights: null,
  leastShare: 0.5,
};
const envelope = (row: number) => 0.1 * Math.exp(-((latitude[row] - 30) ** 2) / 2);

describe("eddy momentum flux of a tilted plane-wave packet", () => {
  const planes = packet(envelope, 3, 0.4);
  const analytic = Float64Array.from(latitude, (_, row) => (-3 * 0.4 * envelope(row) ** 2) / 2);

  test("from the zonal mean is -k l A² / 2", () => {
    const flux = eddyMomentumFlux(planes, "zonal mean", shape);
    expectAllClose(flux, analytic, { relative: 1e-12, because: "whole waves on the grid average exactly" });
  });

  test("from a time mean equal to the mean flow is the same", () => {
    const mean = packet(() => 0, 3, 0.4);
    expectAllClose(eddyMomentumFlux(planes, mean, shape), analytic, { relative: 1e-12, because: "same" });
  });

  test("a row with too few cells has none, a cell missing in v is missing in u", () => {
    const v = planes.v.map((value, i) => (i < 61 ? Number.NaN : value));
    expect(eddyMomentumFlux({ u: planes.u, v }, "zonal mean", shape)[0]).toBeNaN();
    const halved = planes.v.map((value, i) => (i < 40 ? Number.NaN : value));
    const flux = eddyMomentumFlux({ u: planes.u, v: halved }, "zonal mean", shape);
    expectClose(flux[0], analytic[0], { relative: 1e-9, because: "a whole wave of three is left out" });
  });

  test("converges as the envelope's slope says, with the metric of the earth chosen", () => {
    for (const earth of [sphere, ellipsoid]) {
      const got = fluxConvergence(analytic, planMeridian(latitude, 7, earth));
      const wanted = latitude.map((value, row) => {
        const phi = value * radian;
        const north = metresPerRadianNorth(phi, earth);
        const slope = (-2 * (value - 30)) / radian / north;
        // The parallel's radius N cos(phi) has the slope -M sin(phi) in latitude, on the sphere -R sin(phi).
        const metric = (-2 * Math.sin(phi)) / metresPerRadianEast(phi, earth);
        return -analytic[row] * (slope + metric);
      });
      const inside = (values: Float64Array) => values.subarray(3, -3);
      expectAllClose(inside(got), inside(wanted), {
        relative: 5e-6,
        because: "h⁶ / 140 of the seventh derivative, seven points",
      });
    }
  });
});

test("on the sphere a flux that goes as 1 / cos² converges nowhere", () => {
  const flux = latitude.map((value) => 0.01 / Math.cos(value * radian) ** 2);
  const got = fluxConvergence(flux, planMeridian(latitude, 3, sphere));
  expectAllClose(got, new Float64Array(latitude.length), { absolute: 1e-18, because: "rounding over 11 km" });
});

test("the area mean weighs by the parallels' lengths, and conversion is its mean of flow times push", () => {
  const meridian = planMeridian(latitude, 7, sphere);
  const cosine = latitude.map((value) => Math.cos(value * radian));
  const [south, north] = [25 * radian, 35 * radian];
  const integral = (north - south) / 2 + (Math.sin(2 * north) - Math.sin(2 * south)) / 4;
  const wanted = integral / (Math.sin(north) - Math.sin(south));
  expectClose(areaMean(cosine, meridian), wanted, { relative: 1e-6, because: "trapezoids of 0.1 degrees" });
  expectClose(eddyToMeanConversion(cosine, new Float64Array(101).fill(-2), meridian), -2 * wanted, {
    relative: 1e-6,
    because: "same",
  });
  const gappy = cosine.slice();
  gappy[50] = Number.NaN;
  expectClose(areaMean(gappy, meridian), wanted, { relative: 1e-3, because: "two intervals of a hundred left out" });
});

describe("do eddies push the jets", () => {
  const [rows, dates] = [20, 150];

  /** AR(1) in time for each row: flow, and a push of `perDay` times it under noise as large. */
  function made(perDay: number, seed: number) {
    const random = randomStream(seed);
    const flow = new Float64Array(rows * dates);
    const push = new Float64Array(rows * dates);
    for (let row = 0; row < rows; row++) {
      let u = random.normal();
      let noise = random.normal();
      for (let date = 0; date < dates; date++) {
        u = 0.8 * u + 0.6 * random.normal();
        noise = 0.8 * noise + 0.6 * random.normal();
        flow[row * dates + date] = 0.1 * u;
        push[row * dates + date] = (perDay / 86400) * 0.1 * u + (0.01 / 86400) * 0.1 * noise;
      }
    }
    return { flow, push };
  }

  test("limits hold the made rate for at least 90 of 100 seeds, whether there is a push or none", () => {
    for (const perDay of [0.02, 0]) {
      let held = 0;
      for (let seed = 0; seed < 100; seed++) {
        const { flow, push } = made(perDay, seed);
        const got = eddyPush(flow, push, rows, "each latitude");
        if (got.low95 <= perDay && perDay <= got.high95) held++;
      }
      expect(held).toBeGreaterThanOrEqual(90);
    }
  });

  test("serial correlation leaves about the AR(1) share of pairs (Bretherton et al. 1999)", () => {
    const { flow, push } = made(0, 1);
    const { pairs, effectivePairs } = eddyPush(flow, push, rows, "each latitude");
    expect(pairs).toBe(rows * dates);
    const wanted = ((1 - 0.64) / (1 + 0.64)) * pairs;
    expectClose(effectivePairs, wanted, { relative: 0.35, because: "sampled correlations, in both directions" });
  });

  test("a steady jet under a steady push shows only where all share one mean", () => {
    const flow = Float64Array.from({ length: rows * dates }, (_, i) => Math.sin(Math.floor(i / dates)));
    const random = randomStream(3);
    const push = flow.map((value) => (0.01 / 86400) * value + 1e-12 * random.normal());
    const wandering = flow.map((value) => value + 1e-3 * random.normal());
    const all = eddyPush(wandering, push, rows, "all");
    expectClose(all.perDay, 0.01, { relative: 1e-3, because: "noise of a thousandth" });
    expect(Math.abs(eddyPush(wandering, push, rows, "each latitude").correlation)).toBeLessThan(0.1);
  });

  test("pairs with a gap are left out of both", () => {
    const { flow, push } = made(0.02, 4);
    flow[3] = Number.NaN;
    push[700] = Number.NaN;
    expect(eddyPush(flow, push, rows, "all").pairs).toBe(rows * dates - 2);
  });
});
