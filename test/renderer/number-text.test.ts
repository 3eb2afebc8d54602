import { describe, expect, test } from "vitest";
import { readNumber } from "../../renderer/state/number-text";

const days = { unit: "days", least: 6, most: 900 };

describe("a typed number", () => {
  test("is read with a comma, a real minus sign or blanks about it", () => {
    expect(readNumber(" 7,5 ", days)).toEqual({ value: 7.5 });
    expect(readNumber("−2", { unit: "", least: -5, most: 5 })).toEqual({ value: -2 });
  });

  test("that cannot be used is answered with what is wanted, in a sentence", () => {
    for (const text of ["", "many", "5.9", "901", "NaN", "Infinity"]) {
      expect(readNumber(text, days)).toEqual({ fault: "A number of days from 6 to 900." });
    }
    expect(readNumber("2.5", { unit: "", least: 1, most: 8, whole: true })).toEqual({
      fault: "A whole number from 1 to 8.",
    });
    expect(readNumber("x", { unit: "", least: 9.7, most: 9.9 })).toEqual({ fault: "A number from 9.70 to 9.90." });
  });

  test("may be left out only where blank is an answer", () => {
    expect(readNumber("  ", { ...days, optional: true })).toEqual({ value: null });
    expect(readNumber("0", { ...days, optional: true })).toEqual({
      fault: "A number of days from 6 to 900, or blank.",
    });
  });
});
