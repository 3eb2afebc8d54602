import { describe, expect, test } from "vitest";
import { findExtremes } from "../../../../core/jets/ridges/find-extremes";
import { cutSectors, sectorMeans } from "../../../../core/jets/ridges/sectors";
import { findSectorExtremes, zonalExtent } from "../../../../core/jets/ridges/zonal-extent";
import { expectAllClose, expectClose } from "../../../expect-close";
import { sphere } from "../earths";

const latitude = Float64Array.from({ length: 41 }, (_, i) => 25 + i * 0.25);
const longitude = Float64Array.from({ length: 80 }, (_, i) => -150 + 0.125 + i * 0.25);
const settings = { leastProminence: 0.01, againstFlow: false };

/** Gaussian jet whose core runs through 30 N at the middle of the region; none west of `begins`. */
function plane(tilt: number, begins = -150): Float64Array {
  const middle = -140;
  return Float64Array.from({ length: latitude.length * longitude.length }, (_, i) => {
    const east = longitude[i % longitude.length];
    const core = 30 + tilt * (east - middle);
    const off = latitude[Math.floor(i / longitude.length)] - core;
    return east < begins ? 0 : 0.1 * Math.exp(-(off * off) / (2 * 0.6 ** 2));
  });
}

function extentOf(values: Float64Array) {
  const ocean = Uint8Array.from(values, (value) => (Number.isNaN(value) ? 0 : 1));
  const whole = sectorMeans(values, latitude.length, ocean, cutSectors(longitude, 20), 0.5);
  const [jet] = findExtremes(whole, latitude, settings, sphere);
  const sectors = cutSectors(longitude, 2);
  const means = sectorMeans(values, latitude.length, ocean, sectors, 0.5);
  return zonalExtent(jet, sectors, means, findSectorExtremes(means, latitude, settings, sphere), sphere);
}

describe("sectors", () => {
  test("cut a region into equal widths that hold every column once", () => {
    const { middle, firstColumn } = cutSectors(longitude, 2);
    expectAllClose(middle, [-149, -147, -145, -143, -141, -139, -137, -135, -133, -131], {
      absolute: 1e-9,
      because: "float64 longitudes",
    });
    expect([...firstColumn]).toEqual([0, 8, 16, 24, 32, 40, 48, 56, 64, 72, 80]);
  });

  test("a width beyond the region gives one sector, one below a column as many as there are columns", () => {
    expect(cutSectors(longitude, 100).middle).toHaveLength(1);
    const each = cutSectors(longitude, 0.01);
    expect([...each.firstColumn]).toEqual(Array.from({ length: 81 }, (_, i) => i));
  });
});

describe("zonal extent and tilt", () => {
  test("a jet along its parallel fills every sector and does not lean", () => {
    const extent = extentOf(plane(0));
    expect(extent.share).toBe(1);
    expectClose(extent.tiltDegreesPerDegree, 0, { absolute: 1e-12, because: "rounding" });
  });

  test("a leaning jet has its slope in degrees and in kilometres", () => {
    const extent = extentOf(plane(0.03));
    expectClose(extent.tiltDegreesPerDegree, 0.03, {
      relative: 0.05,
      because: "vertex of coarse Gaussians, 4 rows a core",
    });
    const perKilometre = 0.03 / Math.cos((30 * Math.PI) / 180);
    expectClose(extent.tilt, perKilometre, { relative: 0.05, because: "same" });
    expectClose(Math.tan((extent.tiltAngleDegrees * Math.PI) / 180), extent.tilt, {
      relative: 1e-12,
      because: "rounding",
    });
  });

  test("a jet in half the region has half the extent", () => {
    expect(extentOf(plane(0, -140)).share).toBe(0.5);
  });

  test("sectors without data do not count", () => {
    const values = plane(0).map((value, i) => (longitude[i % longitude.length] > -135 ? Number.NaN : value));
    const extent = extentOf(values);
    expect(extent.share).toBe(1);
    expect(extent.sectorsWithData).toBe(8);
  });
});
