import { describe, expect, test } from "vitest";
import type { StencilPoints } from "../../../core/numeric/stencils";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { eastwardDerivative, northwardDerivative } from "../../../core/ocean/gradients";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { relativeVorticity } from "../../../core/ocean/vorticity";
import { expectClose } from "../../expect-close";
import { evenAxes, fPlane, planeFrom, sphere } from "./grids";

const degree = Math.PI / 180;
const R = sphere.radius;

describe("a Gaussian eddy on an f-plane (f = 1e-4, A = 0.3 m, L = 50 km; closed form)", () => {
  const [A, L, f, g] = [0.3, 50e3, 1e-4, 9.81];
  const geometry = fPlane({ points: 9, cells: 161, spacingMetres: 2500, coriolis: f, gravity: g });
  const { x } = geometry;
  const height = Float64Array.from({ length: 161 * 161 }, (_, i) => {
    const r2 = x[i % 161] ** 2 + x[Math.floor(i / 161)] ** 2;
    return A * Math.exp(-r2 / (2 * L * L));
  });
  const velocity = geostrophicVelocity(height, geometry);
  const vorticity = relativeVorticity(velocity, geometry);
  const at = (column: number, row: number) => (80 + row) * 161 + 80 + column;
  const fine = { relative: 1e-5, because: "eighth-order truncation at 20 cells a radius" };

  test("the fastest flow is 0.60653 gA/(fL) = 0.357004 m/s at one radius, clockwise in the north", () => {
    expectClose(velocity.u[at(0, 20)], 0.35700394630685606, fine);
    expectClose(velocity.v[at(20, 0)], -0.35700394630685606, fine);
  });

  test("vorticity at the centre is -2gA/(fL²) = -2.3544e-5 s-1 and vanishes at √2 L", () => {
    expectClose(vorticity[at(0, 0)], -2.3544e-5, { relative: 1e-5, because: "two eighth-order differences" });
    const exact = (r: number) => ((g * A) / (f * L * L)) * (r ** 2 / L ** 2 - 2) * Math.exp(-(r ** 2) / (2 * L ** 2));
    expectClose(vorticity[at(28, 0)], exact(28 * 2500), { absolute: 3e-10, because: "two eighth-order differences" });
  });
});

describe("a Bickley jet (U0 = 0.1 m/s, L = 100 km, at 30 degrees; closed form)", () => {
  const f = 7.292115e-5;
  const geometry = fPlane({ points: 7, cells: 241, spacingMetres: 5000, coriolis: f, gravity: 9.81 });
  const { x } = geometry;
  const height = Float64Array.from(
    { length: 241 * 241 },
    (_, i) => (-(f * 0.1 * 100e3) / 9.81) * Math.tanh(x[Math.floor(i / 241)] / 100e3),
  );
  test("its height step is 0.14867 m, its speed sech², its largest vorticity 7.6980e-7 s-1", () => {
    expectClose(height[0] - height[240 * 241], 0.14866697, { relative: 2e-5, because: "tanh of six widths" });
    const velocity = geostrophicVelocity(height, geometry);
    const vorticity = relativeVorticity(velocity, geometry);
    for (let row = 10; row < 231; row++) {
      const cell = row * 241 + 120;
      expectClose(velocity.u[cell], 0.1 / Math.cosh(x[row] / 100e3) ** 2, {
        absolute: 1e-7,
        because: "sixth-order truncation",
      });
    }
    const largest = vorticity.reduce((most, value) => (Number.isNaN(value) ? most : Math.max(most, value)), 0);
    expectClose(largest, 7.698003589195011e-7, { relative: 1e-3, because: "the crest lies between two cells" });
  });
});

describe("plane wave on an f-plane", () => {
  test("u, v and vorticity have the closed form's amplitude times the stencil's response", () => {
    const [A, f, g, k, l] = [0.1, 1e-4, 9.81, (2 * Math.PI) / 500e3, (2 * Math.PI) / 300e3];
    const geometry = fPlane({ points: 9, cells: 101, spacingMetres: 5000, coriolis: f, gravity: g });
    const { x } = geometry;
    const phase = (i: number) => k * x[i % 101] + l * x[Math.floor(i / 101)];
    const height = Float64Array.from({ length: 101 * 101 }, (_, i) => A * Math.cos(phase(i)));
    const velocity = geostrophicVelocity(height, geometry);
    const vorticity = relativeVorticity(velocity, geometry);
    for (let row = 8; row < 93; row++) {
      const i = row * 101 + 37;
      const close = { relative: 1e-6, absolute: 1e-9, because: "eighth order at 60 cells a wavelength" };
      expectClose(velocity.u[i], ((g * A) / f) * l * Math.sin(phase(i)), close);
      expectClose(velocity.v[i], (-(g * A) / f) * k * Math.sin(phase(i)), close);
      expectClose(vorticity[i], (-(g * A) / f) * (k * k + l * l) * Math.cos(phase(i)), {
        absolute: 1e-12,
        because: "same",
      });
    }
  });
});

describe("on the sphere", () => {
  const axes = evenAxes({ west: -150, south: 20, step: 0.5, columns: 30, rows: 41 });
  const geometry = gridGeometry(axes, sphere, "test");

  test("a slope of 1 cm in 100 km gives 3.8736, 1.3453 and 0.9513 cm/s at 10, 30 and 45 degrees", () => {
    for (const [latitude, wanted] of [
      [10, 0.038736],
      [30, 0.013453],
      [45, 0.009513],
    ]) {
      const local = evenAxes({ west: 0, south: latitude - 1, step: 0.5, columns: 5, rows: 5 });
      const tilted = planeFrom(local, (_, at) => (-1e-7 * R * (at - latitude) * Math.PI) / 180);
      const { u } = geostrophicVelocity(tilted, gridGeometry(local, { ...sphere, stencil: 3 }, "test"));
      expectClose(u[2 * 5 + 2], wanted, { absolute: 6e-7, because: "printed digits" }, `${latitude}°`);
    }
  });

  test("solid rotation u = U0 cos(latitude) has vorticity 2 U0 sin(latitude) / R = 1.56961e-7 s-1 at 30 degrees", () => {
    const u = planeFrom(axes, (_, latitude) => Math.cos(latitude * degree));
    const vorticity = relativeVorticity({ u, v: new Float64Array(u.length) }, geometry);
    expectClose(vorticity[20 * 30 + 15], 1.569612305760477e-7, {
      relative: 1e-9,
      because: "sixth order at half a degree",
    });
    for (let row = 0; row < 41; row++) {
      const truth = (2 * Math.sin(axes.latitude.values[row] * degree)) / R;
      expectClose(vorticity[row * 30 + 3], truth, { relative: 2e-4, because: "second order at the edge rows" });
    }
  });

  test("geostrophic flow with varying f diverges as -beta v / f: 2.71865e-8 s-1 for 0.1 m/s at 30 degrees", () => {
    // Height whose v is 0.1 m/s along 30° N; divergence = u_x + v_y - v tan/R.
    const height = planeFrom(axes, (longitude) => 2e-3 * Math.sin((longitude + 150) * degree * 3));
    const { u, v } = geostrophicVelocity(height, geometry);
    const across = eastwardDerivative(u, geometry);
    const along = northwardDerivative(v, geometry);
    const row = 20;
    for (let column = 6; column < 24; column++) {
      const i = row * 30 + column;
      const divergence = across[i] + along[i] - v[i] * geometry.convergence[row];
      expectClose(divergence / v[i], -geometry.beta[row] / geometry.coriolis[row], {
        relative: 1e-6,
        because: "sixth order",
      });
    }
    expectClose((0.1 * geometry.beta[row]) / geometry.coriolis[row], 2.718648e-8, {
      relative: 1e-6,
      because: "printed digits",
    });
  });

  test.each([
    [3, 2],
    [5, 4],
    [7, 6],
    [9, 8],
  ] as const)("the %i-point stencil's observed order for u, v and vorticity is %i", (points, order) => {
    const wave = (a: number, p: number) => 0.3 * Math.sin(9 * a) * Math.cos(7 * p) + 0.1 * Math.sin(11 * p);
    const f = (p: number) => 2 * sphere.omega * Math.sin(p);
    const hP = (a: number, p: number) => -2.1 * Math.sin(9 * a) * Math.sin(7 * p) + 1.1 * Math.cos(11 * p);
    const hPP = (a: number, p: number) => -14.7 * Math.sin(9 * a) * Math.cos(7 * p) - 12.1 * Math.sin(11 * p);
    const hA = (a: number, p: number) => 2.7 * Math.cos(9 * a) * Math.cos(7 * p);
    const hAA = (a: number, p: number) => -24.3 * Math.sin(9 * a) * Math.cos(7 * p);
    const g = 9.81;
    const exactU = (a: number, p: number) => (-g / f(p)) * (hP(a, p) / R);
    const exactV = (a: number, p: number) => (g / f(p)) * (hA(a, p) / (R * Math.cos(p)));
    // zeta = (g/f) Laplacian(height) + beta u / f on the sphere (re-derived; checked numerically elsewhere).
    const exactVorticity = (a: number, p: number) => {
      const laplacian = hAA(a, p) / (R * Math.cos(p)) ** 2 + hPP(a, p) / R ** 2 - (Math.tan(p) / R ** 2) * hP(a, p);
      const beta = (2 * sphere.omega * Math.cos(p)) / R;
      return (g / f(p)) * laplacian + (beta * exactU(a, p)) / f(p);
    };
    const worst = (step: number) => {
      const size = Math.round(24 / step) + 1;
      const grid = evenAxes({ west: -12, south: 30, step, columns: size, rows: size });
      const local = gridGeometry(grid, { ...sphere, stencil: points }, "test");
      const { u, v } = geostrophicVelocity(
        planeFrom(grid, (a, p) => wave(a * degree, p * degree)),
        local,
      );
      const vorticity = relativeVorticity({ u, v }, local);
      const errors = [0, 0, 0];
      // Only points common to both grids and clear of narrowed stencils.
      for (let p = 38; p <= 46; p++) {
        for (let a = -4; a <= 4; a++) {
          const i = Math.round((p - 30) / step) * size + Math.round((a + 12) / step);
          const [la, ph] = [a * degree, p * degree];
          [u[i] - exactU(la, ph), v[i] - exactV(la, ph), vorticity[i] - exactVorticity(la, ph)].forEach((error, k) => {
            errors[k] = Math.max(errors[k], Math.abs(error));
          });
        }
      }
      return errors;
    };
    const [coarse, fine] = [worst(1), worst(0.5)];
    coarse.forEach((error, k) => {
      const observed = Math.log2(error / fine[k]);
      expectClose(
        observed,
        order,
        { absolute: 0.1, because: "the bound asked of an observed order" },
        ["u", "v", "vorticity"][k],
      );
    });
  });

  test("the belt within 5 degrees of the equator is blank, rows outside are not", () => {
    const belt = evenAxes({ west: 0, south: -8, step: 1, columns: 5, rows: 17 });
    const { u } = geostrophicVelocity(
      planeFrom(belt, (a, p) => 0.01 * a + 0.02 * p),
      gridGeometry(belt, sphere, "test"),
    );
    belt.latitude.values.forEach((latitude, row) => {
      expect(Number.isNaN(u[row * 5 + 2]), `${latitude}°`).toBe(Math.abs(latitude) < 5);
    });
  });

  test("south of the equator a high turns the other way", () => {
    const local = evenAxes({ west: 0, south: -32, step: 0.25, columns: 17, rows: 17 });
    const bump = planeFrom(local, (a, p) => 0.2 * Math.exp(-((a - 2) ** 2 + (p + 30) ** 2)));
    const { u } = geostrophicVelocity(bump, gridGeometry(local, sphere, "test"));
    expect(u[12 * 17 + 8]).toBeLessThan(0);
  });

  test("flipping the order of latitude changes nothing", () => {
    const values = planeFrom(axes, (a, p) => Math.sin(a / 7) * Math.cos(p / 5));
    const flippedAxes = {
      ...axes,
      latitude: { ...axes.latitude, values: axes.latitude.values.toReversed(), step: -0.5 },
    };
    const flipped = planeFrom(flippedAxes, (a, p) => Math.sin(a / 7) * Math.cos(p / 5));
    const up = geostrophicVelocity(values, geometry);
    const down = geostrophicVelocity(flipped, gridGeometry(flippedAxes, sphere, "test"));
    for (let row = 0; row < 41; row++) {
      for (let column = 0; column < 30; column++) {
        const [i, j] = [row * 30 + column, (40 - row) * 30 + column];
        expectClose(down.u[j], up.u[i], { absolute: 1e-12, because: "same sums in another order" });
        expectClose(down.v[j], up.v[i], { absolute: 1e-12, because: "same sums in another order" });
      }
    }
  });

  test("shifting longitudes round a global grid changes nothing, seam included", () => {
    const global = evenAxes({ west: 0, south: 30, step: 10, columns: 36, rows: 5 });
    const shifted = evenAxes({ west: -170, south: 30, step: 10, columns: 36, rows: 5 });
    const wave = (a: number, p: number) => Math.sin(2 * a * degree) * Math.cos(p * degree);
    const points: StencilPoints = 9;
    const one = geostrophicVelocity(
      planeFrom(global, wave),
      gridGeometry(global, { ...sphere, stencil: points }, "test"),
    );
    const two = geostrophicVelocity(
      planeFrom(shifted, wave),
      gridGeometry(shifted, { ...sphere, stencil: points }, "test"),
    );
    for (let column = 0; column < 36; column++) {
      const other = (column + 17) % 36;
      expectClose(two.v[2 * 36 + other], one.v[2 * 36 + column], { absolute: 1e-10, because: "rounding of the sine" });
    }
  });

  test("a cell that touches the pole is refused with a reason", () => {
    const polar = evenAxes({ west: 0, south: 88, step: 0.5, columns: 5, rows: 5 });
    expect(() => gridGeometry(polar, sphere, "grid A")).toThrow(/touch a pole/);
  });
});
