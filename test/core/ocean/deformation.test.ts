import { describe, expect, test } from "vitest";
import type { StencilPoints } from "../../../core/numeric/stencils";
import { absoluteVorticityGradient, laplacian } from "../../../core/ocean/curvature";
import { divergence, normalStrain, shearStrain } from "../../../core/ocean/deformation";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { planesFrom } from "../../../core/ocean/quantities/evaluate";
import { relativeVorticity } from "../../../core/ocean/vorticity";
import { expectClose } from "../../expect-close";
import { evenAxes, fPlane, planeFrom, sphere } from "./grids";
import { waveHeight } from "./spherical-wave";

const degree = Math.PI / 180;
const R = sphere.radius;

describe("on the sphere, away from the grid's edges", () => {
  const axes = evenAxes({ west: -10, south: 25, step: 0.25, columns: 41, rows: 61 });
  const geometry = gridGeometry(axes, { ...sphere, stencil: 9 }, "test");
  const inside = [30 * 41 + 20, 20 * 41 + 12, 44 * 41 + 30];
  const latitude = (i: number) => axes.latitude.values[Math.floor(i / 41)] * degree;
  const longitude = (i: number) => axes.longitude.values[i % 41] * degree;

  test("solid rotation about the pole neither strains nor diverges, and rotates", () => {
    const velocity = { u: planeFrom(axes, (_, p) => Math.cos(p * degree)), v: new Float64Array(41 * 61) };
    for (const i of inside) {
      for (const field of [divergence, normalStrain, shearStrain]) {
        expectClose(field(velocity, geometry)[i], 0, { absolute: 1e-16, because: "vorticity there is 1.6e-7 s-1" });
      }
      const truth = { relative: 1e-9, because: "eighth order" };
      expectClose(relativeVorticity(velocity, geometry)[i], (2 * Math.sin(latitude(i))) / R, truth);
    }
  });

  test("solid rotation about an axis in the equator neither strains nor diverges either", () => {
    // u = -sin p cos a, v = sin a: the axis through 0° E; all metric terms are at work.
    const velocity = {
      u: planeFrom(axes, (a, p) => -Math.sin(p * degree) * Math.cos(a * degree)),
      v: planeFrom(axes, (a) => Math.sin(a * degree)),
    };
    for (const i of inside) {
      for (const field of [divergence, normalStrain, shearStrain]) {
        expectClose(field(velocity, geometry)[i], 0, { absolute: 1e-16, because: "vorticity there is 2.6e-7 s-1" });
      }
      const truth = (2 * Math.cos(latitude(i)) * Math.cos(longitude(i))) / R;
      expectClose(relativeVorticity(velocity, geometry)[i], truth, { relative: 1e-9, because: "eighth order" });
    }
  });

  test("flow down a potential sin p has normal strain and divergence of the closed form", () => {
    // v = cos p / R, u = 0: divergence -2 sin p / R^2, normal strain 0; a dipole across: u_p and tan terms cancel.
    const v = planeFrom(axes, (_, p) => Math.cos(p * degree));
    const velocity = { u: new Float64Array(v.length), v };
    for (const i of inside) {
      const sine = Math.sin(latitude(i));
      expectClose(divergence(velocity, geometry)[i], (-2 * sine) / R, { relative: 1e-9, because: "eighth order" });
      expectClose(normalStrain(velocity, geometry)[i], 0, { absolute: 1e-16, because: "divergence is 1.6e-7 s-1" });
    }
  });

  test("a meridional jet v(a) shears by v_a/(R cos p), an eastward one u(p) by u_p/R + u tan p/R", () => {
    const none = new Float64Array(41 * 61);
    const v = planeFrom(axes, (a) => Math.sin(9 * a * degree));
    const u = planeFrom(axes, (_, p) => Math.sin(7 * p * degree));
    for (const i of inside) {
      const [a, p] = [longitude(i), latitude(i)];
      const close = { absolute: 1e-14, because: "eighth order at a scale of 1e-6 s-1" };
      expectClose(shearStrain({ u: none, v }, geometry)[i], (9 * Math.cos(9 * a)) / (R * Math.cos(p)), close);
      const truth = (7 * Math.cos(7 * p) + Math.sin(7 * p) * Math.tan(p)) / R;
      expectClose(shearStrain({ u, v: none }, geometry)[i], truth, close);
    }
  });

  test("the Laplacian of a spherical harmonic of degree 2 is -6/R² times it", () => {
    const harmonic = planeFrom(axes, (a, p) => Math.sin(2 * p * degree) * Math.cos(a * degree));
    const result = laplacian(harmonic, geometry);
    for (const i of inside) {
      expectClose(result[i], (-6 / R ** 2) * harmonic[i], { relative: 1e-7, because: "rounding of two differences" });
    }
  });

  test("the vorticity gradient of solid rotation is beta + 2 U cos p / R²", () => {
    const result = absoluteVorticityGradient(
      planeFrom(axes, (_, p) => 20 * Math.cos(p * degree)),
      geometry,
    );
    for (const i of inside) {
      const truth = (2 * sphere.omega * Math.cos(latitude(i))) / R + (40 * Math.cos(latitude(i))) / R ** 2;
      expectClose(result[i], truth, { relative: 1e-9, because: "rounding of two differences" });
    }
  });
});

describe("on a beta plane", () => {
  test("the vorticity gradient of a Bickley jet lies between beta - 2/3 U/L² and beta + 2 U/L²", () => {
    const [U, L, beta] = [0.1, 100e3, 2e-11];
    const flat = fPlane({ points: 9, cells: 161, spacingMetres: 5000, coriolis: 7e-5, gravity: 9.81 });
    const geometry = { ...flat, beta: new Float64Array(161).fill(beta) };
    const u = Float64Array.from({ length: 161 * 161 }, (_, i) => U / Math.cosh(flat.x[Math.floor(i / 161)] / L) ** 2);
    const result = absoluteVorticityGradient(u, geometry);
    expectClose(Math.max(...result), beta + (2 * U) / L ** 2, { relative: 1e-6, because: "eighth order" });
    expectClose(Math.min(...result), beta - (2 * U) / (3 * L ** 2), {
      relative: 1e-3,
      because: "the dip lies between cells",
    });
  });
});

describe("identities of geostrophic flow on the sphere, with observed order of accuracy", () => {
  const worst = (points: StencilPoints, step: number) => {
    const size = Math.round(24 / step) + 1;
    const axes = evenAxes({ west: -12, south: 30, step, columns: size, rows: size });
    const geometry = gridGeometry(axes, { ...sphere, stencil: points }, "test");
    const planes = planesFrom(planeFrom(axes, waveHeight), geometry);
    const errors = { divergence: 0, vorticity: 0 };
    for (let p = 38; p <= 46; p++) {
      for (let a = -4; a <= 4; a++) {
        const row = Math.round((p - 30) / step);
        const i = row * size + Math.round((a + 12) / step);
        const { gravity, coriolis, beta } = geometry;
        const byDivergence = planes("divergence")[i] + (beta[row] * planes("v")[i]) / coriolis[row];
        const balanced = (gravity[row] * planes("height-laplacian")[i] + beta[row] * planes("u")[i]) / coriolis[row];
        errors.divergence = Math.max(errors.divergence, Math.abs(byDivergence));
        errors.vorticity = Math.max(errors.vorticity, Math.abs(planes("vorticity")[i] - balanced));
      }
    }
    return errors;
  };

  test.each([
    [3, 2],
    [5, 4],
    [7, 6],
    [9, 8],
  ] as const)(
    "with %i points divergence = -beta v/f and vorticity = (g/f) Laplacian + beta u/f hold to order %i",
    (points, order) => {
      const [coarse, fine] = [worst(points, 1), worst(points, 0.5)];
      for (const key of ["divergence", "vorticity"] as const) {
        const observed = Math.log2(coarse[key] / fine[key]);
        expectClose(observed, order, { absolute: 0.15, because: "the bound asked of an observed order" }, key);
      }
    },
  );

  test("the identities hold on the ellipsoid as well, with constant gravity", () => {
    const axes = evenAxes({ west: -4, south: 36, step: 0.25, columns: 33, rows: 33 });
    const geometry = gridGeometry(axes, { ...sphere, earth: "ellipsoid", stencil: 9 }, "test");
    const planes = planesFrom(planeFrom(axes, waveHeight), geometry);
    for (const i of [16 * 33 + 16, 12 * 33 + 20]) {
      const row = Math.floor(i / 33);
      const { gravity, coriolis, beta } = geometry;
      const close = { relative: 1e-6, because: "eighth-order differences" };
      expectClose(planes("divergence")[i], (-beta[row] * planes("v")[i]) / coriolis[row], close, "divergence");
      const balanced = (gravity[row] * planes("height-laplacian")[i] + beta[row] * planes("u")[i]) / coriolis[row];
      expectClose(planes("vorticity")[i], balanced, close, "vorticity");
    }
  });
});

describe("eddy kinetic energy", () => {
  const axes = evenAxes({ west: 0, south: 30, step: 0.5, columns: 16, rows: 12 });
  const geometry = gridGeometry(axes, sphere, "test");
  const mean = planeFrom(axes, (a, p) => 0.3 * Math.sin(a / 4) + 0.05 * p);
  const eddies = planeFrom(axes, (a, p) => 0.1 * Math.cos(a / 2 + p));
  const height = mean.map((value, i) => value + eddies[i]);

  test("is the kinetic energy of the anomaly given, whatever mean the height carries", () => {
    const withMean = planesFrom(height, geometry, () => eddies)("eddy-kinetic-energy");
    expect(withMean).toEqual(planesFrom(eddies, geometry)("kinetic-energy"));
    expect(planesFrom(height, geometry, () => eddies)("kinetic-energy")).toEqual(
      planesFrom(height, geometry)("kinetic-energy"),
    );
  });

  test("without an anomaly the height is its own", () => {
    expect(planesFrom(height, geometry)("height-anomaly")).toBe(height);
    expect(planesFrom(height, geometry)("eddy-kinetic-energy")).toEqual(planesFrom(height, geometry)("kinetic-energy"));
  });
});
