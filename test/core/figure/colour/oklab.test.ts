import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  linearFromOkLab,
  linearFromSrgb,
  okLabFromLinear,
  srgbBytesFromLch,
  srgbFromLinear,
  type Triple,
} from "../../../../core/figure/colour/oklab";

/** XYZ (D65, Y of white 1) to linear sRGB, IEC 61966-2-1. */
function linearFromXyz([x, y, z]: Triple): Triple {
  return [
    3.2404542 * x - 1.5371385 * y - 0.4985314 * z,
    -0.969266 * x + 1.8760108 * y + 0.041556 * z,
    0.0556434 * x - 0.2040259 * y + 1.0572252 * z,
  ];
}

describe("OKLab", () => {
  // Ottosson 2020, table of example values [from memory]: three decimals, hence the tolerance.
  const published: readonly (readonly [Triple, Triple])[] = [
    [
      [0.95, 1, 1.089],
      [1, 0, 0],
    ],
    [
      [1, 0, 0],
      [0.45, 1.236, -0.019],
    ],
    [
      [0, 1, 0],
      [0.922, -0.671, 0.263],
    ],
    [
      [0, 0, 1],
      [0.153, -1.415, -0.449],
    ],
  ];
  test.each(published)("XYZ %j has the published coordinates", (xyz, expected) => {
    const { lightness, a, b } = okLabFromLinear(linearFromXyz(xyz));
    for (const [got, wanted] of [
      [lightness, expected[0]],
      [a, expected[1]],
      [b, expected[2]],
    ]) {
      expect(Math.abs(got - wanted)).toBeLessThan(0.002);
    }
  });

  test("white is lightness 1 without chroma, black is 0", () => {
    const white = okLabFromLinear([1, 1, 1]);
    expect(white.lightness).toBeCloseTo(1, 6);
    expect(Math.hypot(white.a, white.b)).toBeLessThan(1e-6);
    expect(okLabFromLinear([0, 0, 0]).lightness).toBe(0);
  });

  test("every sRGB colour survives the way there and back", () => {
    const component = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(component, component, component, (red, green, blue) => {
        const back = linearFromOkLab(okLabFromLinear([red, green, blue]));
        // The published matrices carry ten digits.
        for (const [got, wanted] of [
          [back[0], red],
          [back[1], green],
          [back[2], blue],
        ]) {
          expect(Math.abs(got - wanted)).toBeLessThan(1e-6);
        }
      }),
    );
  });

  test("the transfer curve and its inverse meet on both of their pieces", () => {
    for (const component of [0, 0.01, 0.04045, 0.2, 0.5, 1]) {
      expect(srgbFromLinear(linearFromSrgb(component))).toBeCloseTo(component, 6);
    }
  });

  test("a chroma outside the gamut shrinks without changing lightness or hue", () => {
    const bytes = srgbBytesFromLch(0.6, 0.5, 30);
    const [red, green, blue] = bytes.map((byte) => linearFromSrgb(byte / 255));
    const { lightness, a, b } = okLabFromLinear([red, green, blue]);
    // A byte is about 0.003 in lightness.
    expect(Math.abs(lightness - 0.6)).toBeLessThan(0.004);
    expect(Math.abs((Math.atan2(b, a) * 180) / Math.PI - 30)).toBeLessThan(1);
  });
});
