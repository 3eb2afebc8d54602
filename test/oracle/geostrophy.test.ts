import { describe, expect, test } from "vitest";
import { makeAxis } from "../../core/model/axis";
import type { StencilPoints } from "../../core/numeric/stencils";
import { geostrophicVelocity } from "../../core/ocean/geostrophy";
import { gridGeometry } from "../../core/ocean/grid-geometry";
import { relativeVorticity } from "../../core/ocean/vorticity";
import { expectAllClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

interface Reference {
  readonly latitude: number[];
  readonly longitude: number[];
  readonly periodic: boolean;
  readonly blankDegrees: number;
  readonly heightMetres: (number | null)[];
  readonly shownColumns: number[];
  readonly cases: {
    readonly earth: "ellipsoid" | "sphere";
    readonly stencil: StencilPoints;
    readonly u: (number | null)[];
    readonly v: (number | null)[];
    readonly vorticity: (number | null)[];
  }[];
}

const tolerance = { relative: 1e-9, because: "both in float64; weights and trigonometry differ by rounding" };

describe.each(["northern", "southern", "band"])("u, v and vorticity equal numpy's on the %s grid", (name) => {
  const reference = referenceJson<Reference>(`geostrophy-${name}`);
  const height = withNaN(reference.heightMetres);
  const axes = {
    latitude: makeAxis("latitude", reference.latitude, "test"),
    longitude: makeAxis("longitude", reference.longitude, "test"),
  };
  const columns = axes.longitude.values.length;
  const shown = (plane: Float64Array) =>
    Float64Array.from(
      axes.latitude.values.length === 0
        ? []
        : Array.from(axes.latitude.values.keys()).flatMap((row) =>
            reference.shownColumns.map((column) => plane[row * columns + column]),
          ),
    );

  test("the grid is what it is meant to be", () => {
    expect(axes.longitude.periodic).toBe(reference.periodic);
    expect(height.some(Number.isNaN) || name === "band").toBe(true);
  });

  test.each(reference.cases.map((each) => [each.earth, each.stencil, each] as const))(
    "%s, %i points",
    (earth, stencil, each) => {
      const geometry = gridGeometry(
        axes,
        {
          stencil,
          earth,
          radius: 6371000,
          gravity: earth === "sphere" ? 9.81 : "latitude",
          omega: 7.292115e-5,
          equatorDegrees: reference.blankDegrees,
        },
        "test",
      );
      const velocity = geostrophicVelocity(height, geometry);
      expectAllClose(shown(velocity.u), each.u, tolerance, "u");
      expectAllClose(shown(velocity.v), each.v, tolerance, "v");
      expectAllClose(shown(relativeVorticity(velocity, geometry)), each.vorticity, tolerance, "vorticity");
    },
  );
});
