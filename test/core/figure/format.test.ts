import { describe, expect, test } from "vitest";
import { displayUnits, withSuperscripts } from "../../../core/figure/display-units";
import {
  counted,
  formatCount,
  formatLatitude,
  formatLatitudeRange,
  formatLongitude,
  formatLongitudeRange,
  formatNumber,
  formatSignificant,
} from "../../../core/figure/format";

test("a number stands with its noun in the singular for one alone", () => {
  expect(["0.5", 0, 1, 2, "1.0"].map((count) => counted(count, "day"))).toEqual([
    "0.5 days",
    "0 days",
    "1 day",
    "2 days",
    "1.0 days",
  ]);
  expect(counted(1, "pass", "passes") + counted(1106, "pass", "passes")).toBe("1 pass1\u00a0106 passes");
});

describe("numbers", () => {
  test("a negative number carries the real minus sign, a rounded zero none", () => {
    expect(formatNumber(-2.25, 1)).toBe("\u22122.3");
    expect(formatNumber(-0.004, 2)).toBe("0.00");
    expect(formatNumber(Number.NaN, 1)).toBe("–");
  });

  test("significant digits come without exponent and without trailing zeros", () => {
    expect(formatSignificant(22.34, 3)).toBe("22.3");
    expect(formatSignificant(-22.0, 3)).toBe("\u221222");
    expect(formatSignificant(0.01234, 2)).toBe("0.012");
    expect(formatSignificant(123456, 3)).toBe("123000");
    expect(formatSignificant(0, 3)).toBe("0");
  });

  test("thousands are set apart", () => {
    expect(formatCount(41312)).toBe("41\u00a0312");
    expect(formatCount(999)).toBe("999");
  });
});

describe("places", () => {
  test("longitudes of any turn are brought home", () => {
    expect(formatLongitude(-150, 0)).toBe("150° W");
    expect(formatLongitude(210, 0)).toBe("150° W");
    expect(formatLongitude(540, 0)).toBe("180°");
    expect(formatLongitude(-180, 0)).toBe("180°");
    expect(formatLongitude(360, 0)).toBe("0°");
    expect(formatLongitude(12.5, 1)).toBe("12.5° E");
    expect(formatLongitude(-179.99, 0)).toBe("180°");
  });

  test("the equator has no hemisphere", () => {
    expect(formatLatitude(20, 0)).toBe("20° N");
    expect(formatLatitude(-5.5, 1)).toBe("5.5° S");
    expect(formatLatitude(-0.01, 1)).toBe("0.0°");
  });

  test("a range names a shared hemisphere once", () => {
    expect(formatLongitudeRange(-150, -125)).toBe("150–125° W");
    expect(formatLongitudeRange(-20, 10)).toBe("20° W–10° E");
    expect(formatLongitudeRange(0, 360)).toBe("all longitudes");
    expect(formatLatitudeRange(20.5, 41)).toBe("20.5–41° N");
    expect(formatLatitudeRange(-10, 5)).toBe("10° S–5° N");
    expect(formatLatitudeRange(0, 5)).toBe("0°–5° N");
  });
});

describe("units", () => {
  test("SI units are shown at the scale of the sea", () => {
    expect(displayUnits("m s-1")).toMatchObject({ scale: 100, units: "cm s⁻¹" });
    expect(displayUnits("m")).toMatchObject({ scale: 100, units: "cm" });
    expect(displayUnits("s-1")).toMatchObject({ scale: 1e6, units: "10⁻⁶ s⁻¹" });
    expect(displayUnits("1")).toMatchObject({ scale: 1, units: "" });
  });

  test("units that are not known are shown as they stand, with superscripts", () => {
    expect(displayUnits("kg m-3")).toMatchObject({ scale: 1, units: "kg m⁻³" });
    expect(withSuperscripts("m2 s-12")).toBe("m² s⁻¹²");
  });
});
