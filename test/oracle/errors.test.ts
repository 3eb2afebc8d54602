import { describe, expect, test } from "vitest";
import { makeAxis } from "../../core/model/axis";
import type { StencilPoints } from "../../core/numeric/stencils";
import { errorPlanes } from "../../core/ocean/errors/error-planes";
import { errorOfTimeMean, errorOfZonalMean } from "../../core/ocean/errors/mean-error";
import { gridGeometry } from "../../core/ocean/grid-geometry";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

type Values = (number | null)[];

interface MeanCase {
  readonly length: number;
  readonly standardError: number;
  readonly effectiveCount: number;
  readonly count: number;
}

interface Reference {
  readonly composedOverF: Record<string, number>;
  readonly grids: Record<
    string,
    {
      readonly latitude: number[];
      readonly longitude: number[];
      readonly periodic: boolean;
      readonly earth: "ellipsoid" | "sphere";
      readonly blankDegrees: number;
      readonly valid: boolean[];
      readonly sigmaMetres: number[];
      readonly cases: {
        readonly stencil: StencilPoints;
        readonly correlationKm: number;
        readonly u: Values;
        readonly v: Values;
        readonly vorticity: Values;
      }[];
    }
  >;
  readonly means: {
    readonly days: number[];
    readonly sigmaInTime: Values;
    readonly inTime: MeanCase[];
    readonly ringLatitude: number;
    readonly ringLongitude: number[];
    readonly sigmaOnRing: Values;
    readonly onRing: MeanCase[];
  };
}

const reference = referenceJson<Reference>("error-propagation");
const rounding = { relative: 1e-9, because: "both in float64; correlated errors cancel to about 1e-3 of their terms" };

describe.each(Object.keys(reference.grids))("errors equal numpy's sqrt(diag(A C A')) on the %s grid", (name) => {
  const grid = reference.grids[name];
  const axes = {
    latitude: makeAxis("latitude", grid.latitude, "test"),
    longitude: makeAxis("longitude", grid.longitude, "test"),
  };
  // Errors depend on where heights are, not on what they are.
  const height = Float64Array.from(grid.valid, (valid, i) => (valid ? Math.sin(i) : Number.NaN));

  test.each(grid.cases.map((each) => [each.stencil, each.correlationKm, each] as const))(
    "%i points, correlated over %f km",
    (stencil, correlationKm, each) => {
      const settings = {
        stencil,
        earth: grid.earth,
        radius: 6371000,
        gravity: grid.earth === "sphere" ? 9.81 : ("latitude" as const),
        omega: 7.292115e-5,
        equatorDegrees: grid.blankDegrees,
      };
      expect(axes.longitude.periodic).toBe(grid.periodic);
      const geometry = gridGeometry(axes, settings, "test");
      const sigmaMetres = Float64Array.from(grid.sigmaMetres);
      const errors = errorPlanes(height, axes, geometry, { sigmaMetres, correlationKm });
      expectAllClose(errors.u, each.u, rounding, "u");
      expectAllClose(errors.v, each.v, rounding, "v");
      expectAllClose(errors.vorticity, each.vorticity, rounding, "vorticity");
    },
  );
});

test("1 cm at 0.25 degrees and 30 degrees north gives numpy's sigma(vorticity)/f for each stencil", () => {
  const line = (centre: number) => Array.from({ length: 19 }, (_, i) => centre + 0.25 * (i - 9));
  const axes = {
    latitude: makeAxis("latitude", line(30), "test"),
    longitude: makeAxis("longitude", line(200), "test"),
  };
  for (const stencil of [3, 5, 7, 9] as const) {
    const settings = { stencil, earth: "sphere", radius: 6371000, gravity: 9.81, omega: 7.292115e-5 } as const;
    const geometry = gridGeometry(axes, { ...settings, equatorDegrees: 5 }, "test");
    const error = { sigmaMetres: 0.01, correlationKm: 0 };
    const { vorticity } = errorPlanes(new Float64Array(361), axes, geometry, error);
    const middle = 9 * 19 + 9;
    expectClose(vorticity[middle] / geometry.coriolis[9], reference.composedOverF[stencil], rounding);
  }
});

describe("errors of means equal numpy's sqrt(w'Cw), gaps left out", () => {
  const { means } = reference;

  test.each(means.inTime.map((each) => [each.length, each] as const))("in time, over %f days", (length, each) => {
    const got = errorOfTimeMean(withNaN(means.sigmaInTime), Float64Array.from(means.days), length);
    expect(got.count).toBe(each.count);
    expectClose(got.standardError, each.standardError, rounding);
    expectClose(got.effectiveCount, each.effectiveCount, rounding);
  });

  test.each(means.onRing.map((each) => [each.length, each] as const))(
    "round a parallel, over %f km",
    (length, each) => {
      const axes = {
        latitude: makeAxis("latitude", [means.ringLatitude], "test"),
        longitude: makeAxis("longitude", means.ringLongitude, "test"),
      };
      const got = errorOfZonalMean(withNaN(means.sigmaOnRing), axes, length);
      expectClose(got.standardError[0], each.standardError, rounding);
      expectClose(got.effectiveCount[0], each.effectiveCount, rounding);
    },
  );
});
