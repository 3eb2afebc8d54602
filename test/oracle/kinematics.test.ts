import { describe, expect, test } from "vitest";
import { makeAxis } from "../../core/model/axis";
import type { StencilPoints } from "../../core/numeric/stencils";
import { circularFlowSpeed } from "../../core/ocean/cyclogeostrophy";
import { gridGeometry } from "../../core/ocean/grid-geometry";
import { planesFrom } from "../../core/ocean/quantities/evaluate";
import { fPlane } from "../core/ocean/grids";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

interface GridReference {
  readonly latitude: number[];
  readonly longitude: number[];
  readonly blankDegrees: number;
  readonly heightMetres: (number | null)[];
}

interface Reference {
  readonly grids: {
    readonly grid: string;
    readonly earth: "ellipsoid" | "sphere";
    readonly stencil: StencilPoints;
    readonly row: number[];
    readonly column: number[];
    readonly divergence: (number | null)[];
    readonly normalStrain: (number | null)[];
    readonly shearStrain: (number | null)[];
    readonly okuboWeiss: (number | null)[];
  }[];
  readonly gaussianEddy: {
    readonly coriolis: number;
    readonly amplitudeMetres: number;
    readonly sizeMetres: number;
    readonly gravity: number;
    readonly centreVorticity: number;
    readonly centreOkuboWeiss: number;
    readonly centreRossby: number;
    readonly eddies: {
      readonly kind: "anticyclone" | "cyclone";
      readonly radiusMetres: number[];
      readonly geostrophic: number[];
      readonly gradientWind: number[];
      readonly vorticity: number[];
    }[];
  };
}

const { grids, gaussianEddy } = referenceJson<Reference>("kinematics");
const rounding = { relative: 1e-9, because: "both in float64; weights and trigonometry differ by rounding" };

describe.each(grids.map((each) => [each.grid, each.earth, each] as const))(
  "on the %s grid, %s, divergence and strain equal numpy's",
  (name, earth, each) => {
    const reference = referenceJson<GridReference>(`geostrophy-${name}`);
    const axes = {
      latitude: makeAxis("latitude", reference.latitude, "test"),
      longitude: makeAxis("longitude", reference.longitude, "test"),
    };
    const geometry = gridGeometry(
      axes,
      {
        stencil: each.stencil,
        earth,
        radius: 6371000,
        gravity: earth === "sphere" ? 9.81 : "latitude",
        omega: 7.292115e-5,
        equatorDegrees: reference.blankDegrees,
      },
      "test",
    );
    const planes = planesFrom(withNaN(reference.heightMetres), geometry);
    const shown = (id: string) => {
      const plane = planes(id);
      return each.row.map((row, k) => plane[row * geometry.columns + each.column[k]]);
    };

    test.each([
      ["divergence", each.divergence],
      ["normal-strain", each.normalStrain],
      ["shear-strain", each.shearStrain],
      ["okubo-weiss", each.okuboWeiss],
    ] as const)("%s", (id, wanted) => {
      expect(wanted.some((value) => value !== null)).toBe(true);
      expectAllClose(shown(id), wanted, rounding, id);
    });

    test("strain rate is the root of the two strains' squares", () => {
      const wanted = each.normalStrain.map((normal, k) => {
        const shear = each.shearStrain[k];
        return normal === null || shear === null ? null : Math.hypot(normal, shear);
      });
      expectAllClose(shown("strain-rate"), wanted, rounding);
    });
  },
);

describe.each(gaussianEddy.eddies.map((eddy) => [eddy.kind, eddy] as const))("a Gaussian %s", (kind, eddy) => {
  const { coriolis, amplitudeMetres, sizeMetres, gravity } = gaussianEddy;
  const sign = kind === "anticyclone" ? 1 : -1;

  test("the closed form of its balanced speed equals numpy's", () => {
    const speeds = eddy.radiusMetres.map((r, k) => circularFlowSpeed(eddy.geostrophic[k], r, coriolis));
    expectAllClose(speeds, eddy.gradientWind, { relative: 1e-12, because: "the same root in float64" });
  });

  test("speed, vorticity, Okubo–Weiss and Rossby number by differences equal the closed form", () => {
    const [cells, spacingMetres] = [161, 2500];
    const geometry = fPlane({ points: 9, cells, spacingMetres, coriolis, gravity });
    const height = Float64Array.from({ length: cells * cells }, (_, i) => {
      const r2 = geometry.x[i % cells] ** 2 + geometry.x[Math.floor(i / cells)] ** 2;
      return sign * amplitudeMetres * Math.exp(-r2 / (2 * sizeMetres ** 2));
    });
    const planes = planesFrom(height, geometry);
    const truncation = { relative: 1e-5, because: "eighth-order differences at 20 cells a radius" };
    const along = (id: string) =>
      eddy.radiusMetres.map((r) => planes(id)[80 * cells + 80 + Math.round(r / spacingMetres)]);
    expectAllClose(along("v"), eddy.geostrophic, truncation, "v");
    const vorticity = { ...truncation, relative: 2e-5 };
    expectAllClose(along("vorticity"), eddy.vorticity, vorticity, "vorticity");
    const centre = (id: string) => planes(id)[80 * cells + 80];
    expectClose(centre("vorticity"), sign * gaussianEddy.centreVorticity, vorticity);
    expectClose(centre("rossby-number"), sign * gaussianEddy.centreRossby, vorticity);
    expectClose(centre("okubo-weiss"), gaussianEddy.centreOkuboWeiss, { ...vorticity, relative: 4e-5 });
    // Largest kinetic energy is half the square of 0.60653 gA/(fL) = 0.357004 m/s, at one radius.
    const largest = planes("kinetic-energy").reduce((most, value) => Math.max(most, value), 0);
    expectClose(largest, 0.063726, { absolute: 1e-6, because: "printed digits" });
  });
});
