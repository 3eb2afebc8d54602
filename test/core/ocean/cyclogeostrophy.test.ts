import { describe, expect, test } from "vitest";
import { balance, circularFlowSpeed, cyclogeostrophicFlow, iterateFully } from "../../../core/ocean/cyclogeostrophy";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { expectClose } from "../../expect-close";
import { evenAxes, fPlane, planeFrom, sphere } from "./grids";

const [A, L, f, g] = [0.3, 50e3, 1e-4, 9.81];
const cells = 81;
const spacing = 10e3;
const middle = (cells - 1) / 2;
/** The cell one radius east of the centre. */
const oneRadius = middle * cells + middle + L / spacing;

function eddy(amplitude: number, coriolis = f) {
  const geometry = fPlane({ points: 9, cells, spacingMetres: spacing, coriolis, gravity: g });
  const height = Float64Array.from({ length: cells * cells }, (_, i) => {
    const r2 = geometry.x[i % cells] ** 2 + geometry.x[Math.floor(i / cells)] ** 2;
    return amplitude * Math.exp(-r2 / (2 * L * L));
  });
  return { geometry, velocity: geostrophicVelocity(height, geometry) };
}

describe("the closed form of a circular eddy (f = 1e-4, A = 0.3 m, L = 50 km, at one radius)", () => {
  const geostrophic = (-g * A * Math.exp(-0.5)) / (f * L);

  test("anticyclone 0.386950 m/s and cyclone 0.334611 m/s, from 0.357004 m/s", () => {
    const digits = { absolute: 1e-6, because: "printed digits" };
    expectClose(geostrophic, -0.357004, digits);
    expectClose(circularFlowSpeed(geostrophic, L, f), -0.38695, digits);
    expectClose(circularFlowSpeed(-geostrophic, L, f), 0.334611, digits);
  });

  test("it solves V²/r + fV = f Vg in either hemisphere", () => {
    for (const coriolis of [f, -f]) {
      for (const speed of [-1.2, -0.1, 0.2, 1.2]) {
        const V = circularFlowSpeed(speed, L, coriolis);
        expectClose((V * V) / L + coriolis * V, coriolis * speed, { relative: 1e-12, because: "rounding" });
      }
    }
  });

  test("beyond |Vg| = fr/4 an anticyclone has none", () => {
    expect(circularFlowSpeed((-f * L) / 4.001, L, f)).not.toBeNaN();
    expect(circularFlowSpeed((-f * L) / 3.999, L, f)).toBeNaN();
  });
});

describe("the iteration on a grid of 10 km", () => {
  const truncation = { relative: 2e-4, because: "nine-point differences at five cells a radius" };

  test.each([
    ["an anticyclone", A, -0.38695, -0.386264],
    ["a cyclone", -A, 0.334611, 0.335024],
  ] as const)("turns %s into the closed form's, two steps into two steps", (_, amplitude, full, twice) => {
    const { geometry, velocity } = eddy(amplitude);
    const settled = cyclogeostrophicFlow(velocity, geometry, iterateFully);
    expectClose(settled.v[oneRadius], full, truncation, "fully iterated");
    expect(settled.status[oneRadius]).toBe(balance.converged);
    const two = cyclogeostrophicFlow(velocity, geometry, { tolerance: 0, mostIterations: 2 });
    expectClose(two.v[oneRadius], twice, truncation, "two steps");
    expect(two.status[oneRadius]).toBe(balance.unsettled);
    expect(two.iterations).toBe(2);
  });

  test("fully iterated it is the closed form at every radius of the eddy", () => {
    const { geometry, velocity } = eddy(A);
    const { v } = cyclogeostrophicFlow(velocity, geometry, iterateFully);
    for (let k = 1; k <= 15; k++) {
      const r = k * spacing;
      const geostrophic = ((-g * A * r) / (f * L * L)) * Math.exp((-r * r) / (2 * L * L));
      const i = middle * cells + middle + k;
      const close = { absolute: 2e-4, because: "eighth-order differences at five cells a radius" };
      expectClose(v[i], circularFlowSpeed(geostrophic, r, f), close, `${r} m`);
    }
  });

  test("frozen at a change below 1 cm/s it is within 1 cm/s of the closed form", () => {
    const { geometry, velocity } = eddy(A);
    const { v, status } = cyclogeostrophicFlow(velocity, geometry);
    expectClose(v[oneRadius], -0.38695, { absolute: 0.01, because: "the tolerance of the setting" });
    expect(status.every((each) => each === balance.converged)).toBe(true);
  });

  test("south of the equator a high is fast and a low slow as well", () => {
    const { geometry, velocity } = eddy(A, -f);
    const { v } = cyclogeostrophicFlow(velocity, geometry, iterateFully);
    expectClose(v[oneRadius], 0.38695, truncation);
  });

  test("straight flow is left as it is", () => {
    const { geometry } = eddy(A);
    const height = Float64Array.from(
      { length: cells * cells },
      (_, i) => 0.2 * Math.tanh(geometry.x[Math.floor(i / cells)] / 60e3),
    );
    const velocity = geostrophicVelocity(height, geometry);
    const { u, status } = cyclogeostrophicFlow(velocity, geometry);
    u.forEach((value, i) => {
      expectClose(value, velocity.u[i], { absolute: 1e-12, because: "rounding of a zero eastward difference" });
    });
    expect(status.every((each) => each === balance.converged)).toBe(true);
  });
});

describe("eddies beyond any balance", () => {
  const limit = (f * f * L * L) / (4 * g);
  const centre = middle * cells + middle;

  test.each([
    ["just within gA/(f²L²) = 1/4 is not marked", 0.98, false],
    ["just beyond is marked", 1.02, true],
  ] as const)("an anticyclone %s at its centre", (_, share, isMarked) => {
    const { geometry, velocity } = eddy(share * limit);
    const { status } = cyclogeostrophicFlow(velocity, geometry);
    expect(status[centre] === balance.cannotConverge).toBe(isMarked);
    expect(status[centre + 1] === balance.cannotConverge).toBe(isMarked && share * Math.exp(-0.02) > 1);
  });

  test("far beyond, the marked disc is the one where |Vg| > fr/4, and values stay finite", () => {
    const { geometry, velocity } = eddy(2 * limit);
    const { u, v, status } = cyclogeostrophicFlow(velocity, geometry);
    const reach = L * Math.sqrt(2 * Math.log(2));
    for (let k = 0; k <= 20; k++) {
      expect(status[centre + k] === balance.cannotConverge, `${k} cells`).toBe(k * spacing < reach);
    }
    expect(u.every(Number.isFinite) && v.every(Number.isFinite)).toBe(true);
  });

  test("a cyclone of the same size is not marked", () => {
    const { geometry, velocity } = eddy(-2 * limit);
    const { status } = cyclogeostrophicFlow(velocity, geometry);
    expect(status).not.toContain(balance.cannotConverge);
  });

  test("a cell whose second change outgrows its first keeps its first value; the others changed no more than before", () => {
    const { geometry, velocity } = eddy(-12 * limit);
    const one = cyclogeostrophicFlow(velocity, geometry, { tolerance: 0, mostIterations: 1 });
    const two = cyclogeostrophicFlow(velocity, geometry, { tolerance: 0, mostIterations: 2 });
    expect(two.status).toContain(balance.stoppedGrowing);
    two.status.forEach((each, i) => {
      const first = Math.hypot(one.u[i] - velocity.u[i], one.v[i] - velocity.v[i]);
      const second = Math.hypot(two.u[i] - one.u[i], two.v[i] - one.v[i]);
      if (each === balance.stoppedGrowing) expect(second).toBe(0);
      else expect(second).toBeLessThanOrEqual(first);
    });
  });
});

describe("gaps and the equator", () => {
  test("a gap has no value and its neighbours keep theirs however long it iterates", () => {
    const { geometry, velocity } = eddy(A);
    const hole = oneRadius + 1;
    for (const plane of [velocity.u, velocity.v]) plane[hole] = Number.NaN;
    const { v, status } = cyclogeostrophicFlow(velocity, geometry, iterateFully);
    expect([v[hole], status[hole]]).toEqual([Number.NaN, balance.none]);
    expect([...v.keys()].filter((i) => Number.isNaN(v[i]))).toEqual([hole]);
  });

  test("the belt at the equator is blank even where the geostrophic flow is blended", () => {
    const axes = evenAxes({ west: 0, south: -8, step: 0.5, columns: 9, rows: 33 });
    const geometry = gridGeometry(axes, { ...sphere, equator: "blend" }, "test");
    const velocity = geostrophicVelocity(
      planeFrom(axes, (a, p) => 0.1 * Math.cos(p / 4) * Math.cos(a / 4)),
      geometry,
    );
    const { u } = cyclogeostrophicFlow(velocity, geometry);
    axes.latitude.values.forEach((latitude, row) => {
      expect(velocity.u[row * 9 + 4]).not.toBeNaN();
      expect(Number.isNaN(u[row * 9 + 4])).toBe(Math.abs(latitude) < 5);
    });
  });
});
