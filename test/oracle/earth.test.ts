import { describe, test } from "vitest";
import {
  meridionalRadiusMetres,
  primeVerticalRadiusMetres,
  sphericalDistanceMetres,
} from "../../core/numeric/ellipsoid";
import { coriolisParameter, gravityAt, planetaryVorticityGradient } from "../../core/ocean/earth";
import { crossTrackVelocity } from "../../core/ocean/geostrophy";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson } from "../reference-json";

interface Earth {
  readonly constants: { readonly omega: number; readonly gswDistanceRadiusMetres: number };
  readonly latitude: number[];
  readonly gswCoriolis: number[];
  readonly betaSphere: number[];
  readonly gswGravity: number[];
  readonly meridianRadiusMetres: number[];
  readonly primeVerticalRadiusMetres: number[];
  readonly distances: {
    readonly name: string;
    readonly longitude: [number, number];
    readonly latitude: [number, number];
    readonly gswDistanceMetres: number;
  }[];
}

interface Sections {
  readonly sections: {
    readonly name: string;
    readonly longitude: number[];
    readonly latitude: number[];
    readonly midLatitude: number[];
    readonly levels: {
      readonly geopotentialAnomaly: (number | null)[];
      readonly velocityLeftMetresPerSecond: (number | null)[];
    }[];
  }[];
}

const rounding = { relative: 1e-12, because: "the same closed formula in float64" };

describe("the earth against gsw 3.6.16 (TEOS-10)", () => {
  const reference = referenceJson<Earth>("sphere-and-gravity");
  const settings = { earth: "sphere", radius: 6371000, gravity: "latitude", omega: reference.constants.omega } as const;
  const radians = reference.latitude.map((value) => (value * Math.PI) / 180);

  test("f equals gsw.f and gravity equals gsw.grav at the surface", () => {
    expectAllClose(
      reference.latitude.map((at) => coriolisParameter(at, settings.omega)),
      reference.gswCoriolis,
      rounding,
      "f",
    );
    expectAllClose(
      reference.latitude.map((at) => gravityAt(at, settings)),
      reference.gswGravity,
      rounding,
      "g",
    );
  });

  test("beta and the WGS-84 radii equal the formulas in numpy", () => {
    const beta = reference.latitude.map((at) => planetaryVorticityGradient(at, settings));
    expectAllClose(beta, reference.betaSphere, rounding, "beta");
    expectAllClose(radians.map(meridionalRadiusMetres), reference.meridianRadiusMetres, rounding, "meridian");
    expectAllClose(
      radians.map(primeVerticalRadiusMetres),
      reference.primeVerticalRadiusMetres,
      rounding,
      "prime vertical",
    );
  });

  test.each(reference.distances.map((each) => [each.name, each] as const))(
    "distance equals gsw.distance: %s",
    (_, each) => {
      const end = (i: 0 | 1) => ({ longitude: each.longitude[i], latitude: each.latitude[i] });
      const distance = sphericalDistanceMetres(end(0), end(1), reference.constants.gswDistanceRadiusMetres);
      expectClose(distance, each.gswDistanceMetres, {
        relative: 1e-9,
        absolute: 0.1,
        because: "near antipodes an arcsine loses half its digits: 0.1 m of 20 000 km",
      });
    },
  );
});

describe("velocity between stations against gsw.geostrophic_velocity", () => {
  const { sections } = referenceJson<Sections>("dynamic-height");
  test.each(sections.map((each) => [each.name, each] as const))(
    "%s: the two-point formula gives gsw's velocities from gsw's dynamic heights",
    (_, section) => {
      let compared = 0;
      for (const level of section.levels) {
        for (let i = 0; i + 1 < section.longitude.length; i++) {
          const [from, to] = [level.geopotentialAnomaly[i], level.geopotentialAnomaly[i + 1]];
          const wanted = level.velocityLeftMetresPerSecond[i];
          if (from === null || to === null || wanted === null) continue;
          const end = (k: number) => ({ longitude: section.longitude[k], latitude: section.latitude[k] });
          const distance = sphericalDistanceMetres(end(i), end(i + 1), 6371000);
          const f = coriolisParameter(section.midLatitude[i], 7.292115e-5);
          const velocity = crossTrackVelocity(to - from, distance, f);
          expectClose(velocity, wanted, {
            relative: 1e-9,
            absolute: 1e-12,
            because: "the same formula; heights stored whole",
          });
          compared++;
        }
      }
      if (compared === 0) throw new Error("no level to compare");
    },
  );
});
