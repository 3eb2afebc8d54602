import { describe, expect, test } from "vitest";
import { coriolis, gravity, heightOfStream, isLand, surfaceCurrent, toSquare } from "../../sample-data/make/geography";
import { groundPoint, headingDegrees, trackPoints } from "../../sample-data/make/ground-track";
import { periodicStencil, valueUnder } from "../../sample-data/make/interpolation";
import { mapNoise } from "../../sample-data/make/map-noise";
import { mapSmoother } from "../../sample-data/make/map-smoothing";
import { fullScenario } from "../../sample-data/make/scenario";
import { squareFourier } from "../../sample-data/model/fourier";
import { fieldPair, halfPlane } from "../../sample-data/model/half-plane";
import { expectClose } from "../expect-close";

const [plover, dunlin] = fullScenario.missions;
const radians = Math.PI / 180;

/** Direction between two neighbouring ground points, by differences on the sphere. */
function measuredHeading(mission: typeof plover, latitude: number): number {
  const inclination = mission.inclinationDegrees * radians;
  const phase = Math.asin(Math.sin(latitude * radians) / Math.sin(inclination));
  const a = groundPoint(mission, phase - 1e-5);
  const b = groundPoint(mission, phase + 1e-5);
  const east = (b.longitude - a.longitude) * Math.cos(latitude * radians);
  return Math.atan2(east, b.latitude - a.latitude) / radians;
}

describe("ground tracks", () => {
  const published = [
    { mission: plover, headings: [19.71, 24.4, 32.36, 52.95] },
    { mission: dunlin, headings: [-12.46, -13.26, -14.87, -19.19] },
  ];
  for (const { mission, headings } of published) {
    test.each(headings.map((heading, i) => [[0, 30, 45, 60][i], heading]))(
      `of ${mission.name} head at %i degrees north as computed independently: %f`,
      (latitude, heading) => {
        const because = "values are given to two decimals";
        expectClose(headingDegrees(mission, latitude, true), heading, { absolute: 0.006, because });
        expectClose(measuredHeading(mission, latitude), heading, { absolute: 0.006, because });
      },
    );
  }

  test("come back to the same places after a repeat", () => {
    for (const mission of [plover, dunlin]) {
      const phase = 2 * Math.PI * mission.revolutions;
      const start = groundPoint(mission, 0.3);
      const repeated = groundPoint(mission, 0.3 + phase);
      expectClose(repeated.longitude, start.longitude, { absolute: 1e-8, because: "rounding of a large phase" });
      expectClose(repeated.latitude, start.latitude, { absolute: 1e-8, because: "rounding of a large phase" });
    }
  });

  test("are sampled every 6 to 7 km, in order of time, and never on land", () => {
    for (const mission of [plover, dunlin]) {
      const points = trackPoints({ ...mission, lastDay: mission.firstDay + 10 }, fullScenario.model.lengthMetres);
      expect(points.count).toBeGreaterThan(5000);
      for (let i = 0; i < points.count; i++) {
        expect(isLand(points.longitude[i], points.latitude[i])).toBe(false);
        if (i === 0) continue;
        expect(points.days[i]).toBeGreaterThan(points.days[i - 1]);
        if (points.days[i] - points.days[i - 1] > (1.5 * mission.sampleSeconds) / 86400) continue;
        const north = (points.latitude[i] - points.latitude[i - 1]) * 111.195;
        const east = (points.longitude[i] - points.longitude[i - 1]) * 111.195 * Math.cos(points.latitude[i] * radians);
        expect(Math.hypot(north, east)).toBeGreaterThan(6);
        expect(Math.hypot(north, east)).toBeLessThan(7);
      }
    }
  });
});

describe("the products", () => {
  const size = 48;
  const plane = halfPlane(size, 2.4e6);
  const product = { ...fullScenario.gridA, dates: 5 };

  test("smooth a wave by the Gaussian's response in space and in time", () => {
    const smoother = mapSmoother(plane, product);
    const index = 6 * size + 4;
    const period = 40;
    const vorticity = new Float64Array(plane.count);
    for (let quarter = -80; quarter <= 160; quarter++) {
      vorticity[index] = Math.cos((2 * Math.PI * (quarter / 4 - 6)) / period);
      smoother.take(quarter / 4, vorticity, new Float64Array(plane.count));
    }
    const spatial = Math.exp(-0.5 * plane.squared[index] * product.smoothingMetres ** 2);
    const temporal = Math.exp(-0.5 * ((2 * Math.PI * product.smoothingDays) / period) ** 2);
    const wanted = (-spatial * temporal) / plane.squared[index];
    const because = "the time window is cut at three standard deviations";
    // Date 2 is day 6, the crest.
    expectClose(smoother.finish()[2].re[index], wanted, { relative: 0.01, because });
  });

  test("carry mapping error of the size and length they state", () => {
    const many = { ...product, dates: 400 };
    const fourier = squareFourier(size);
    let variance = 0;
    let neighbours = 0;
    const lag = 2;
    for (const { re, im } of mapNoise(plane, many, 11)) {
      const field = new Float64Array(size * size);
      const nothing = { re: new Float64Array(plane.count), im: new Float64Array(plane.count) };
      const unused = new Float64Array(size * size);
      fieldPair(plane, { re, im }, nothing, field, unused);
      fourier.toPhysical(field, unused);
      for (let row = 0; row < size; row++) {
        for (let column = 0; column < size; column++) {
          variance += field[row * size + column] ** 2 / (size * size * many.dates);
          const other = row * size + ((column + lag) % size);
          neighbours += (field[row * size + column] * field[other]) / (size * size * many.dates);
        }
      }
    }
    const because = "some 400 maps, a tenth of them independent, of some 60 independent patches";
    expectClose(Math.sqrt(variance), product.noiseMetres, { relative: 0.04, because });
    const apart = (lag * plane.lengthMetres) / size;
    const wanted = Math.exp(-0.5 * (apart / product.noiseLengthMetres) ** 2);
    expectClose(neighbours / variance, wanted, { absolute: 0.05, because });
  });

  test("are laid on the globe so that the current read off a height is the one stated", () => {
    const lengthMetres = 2.4e6;
    const k = (2 * Math.PI * 5) / lengthMetres;
    const stream = (longitude: number, latitude: number): { value: number; u: number; v: number } => {
      const [x, y] = toSquare(longitude, latitude, lengthMetres).map((part) => part * lengthMetres);
      return {
        value: 3000 * Math.sin(k * x) * Math.cos(k * y),
        u: 3000 * k * Math.sin(k * x) * Math.sin(k * y),
        v: 3000 * k * Math.cos(k * x) * Math.cos(k * y),
      };
    };
    const [longitude, latitude, step] = [-140.3, 27.7, 1e-3];
    const height = (east: number, up: number) =>
      heightOfStream(stream(longitude + east, latitude + up).value, latitude + up);
    const metres = 2 * step * radians * 6371000;
    const f = coriolis(latitude);
    const u = ((-gravity / f) * (height(0, step) - height(0, -step))) / metres;
    const v = ((gravity / f) * (height(step, 0) - height(-step, 0))) / (metres * Math.cos(latitude * radians));
    const here = stream(longitude, latitude);
    const model = { stream: here.value, u: here.u, v: here.v };
    // Differenced about a year's extreme of the seasonal slope: its part is taken off by a flat sea's current.
    const [flatU] = surfaceCurrent({ stream: 0, u: 0, v: 0 }, latitude, 0, lengthMetres);
    const [gotU, gotV] = surfaceCurrent(model, latitude, 0, lengthMetres);
    const because = "centred differences over 220 m";
    expectClose(gotU - flatU, u, { relative: 1e-5, because });
    expectClose(gotV, v, { relative: 1e-5, because });
  });

  test("interpolate a wave of eight points to a thousandth, across the seam too", () => {
    const wave = Float64Array.from({ length: size * size }, (_, i) => Math.sin((2 * Math.PI * (i % size)) / 8));
    for (const x of [0.0031, 0.4321, 0.9951]) {
      const got = valueUnder(periodicStencil(x, 0.77, size), wave, size);
      const because = "fifth-degree interpolation at eight points a wave";
      expectClose(got, Math.sin((2 * Math.PI * x * size) / 8), { absolute: 1.5e-3, because });
    }
  });
});
