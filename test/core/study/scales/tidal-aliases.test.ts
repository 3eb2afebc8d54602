import { describe, expect, test } from "vitest";
import { aliasesInBand, aliasPeriodDays, type Tide } from "../../../../core/study/scales/tidal-aliases";
import { expectClose } from "../../../expect-close";

describe("tides seen once a repeat", () => {
  test.each<[Tide, number, number]>([
    ["M2", 9.9156, 62.1],
    ["S2", 9.9156, 58.8],
    ["K1", 9.9156, 173.3],
    ["P1", 9.9156, 88.9],
    ["N2", 9.9156, 49.5],
    ["O1", 9.9156, 45.7],
    ["M2", 35, 94.5],
    ["N2", 35, 97.4],
    ["O1", 35, 75.1],
    ["K1", 35, 365],
    ["P1", 35, 365],
  ])("%s every %d days has an alias near %d days", (tide, repeatDays, wanted) => {
    expectClose(aliasPeriodDays(tide, repeatDays), wanted, {
      relative: 0.003,
      because: "published periods have three digits",
    });
  });

  test("a tide of a whole number of cycles a repeat stands still", () => {
    expect(aliasPeriodDays("S2", 35)).toBe(Number.POSITIVE_INFINITY);
    expect(aliasesInBand([35], null, null).map(({ tide }) => tide)).not.toContain("S2");
  });

  test("an alias is the frequency that samples cannot tell from the tide's", () => {
    const [repeat, tide] = [9.9156, 12.4206012 / 24];
    const alias = aliasPeriodDays("M2", repeat);
    const phases = (period: number) =>
      Array.from({ length: 30 }, (_, i) => Math.cos((2 * Math.PI * i * repeat) / period));
    phases(tide).forEach((value, i) => {
      expectClose(phases(alias)[i], value, { absolute: 1e-9, because: "30 samples of one cosine" });
    });
  });

  test("those in the band are listed by repeat, then by period; an open side takes all", () => {
    const names = aliasesInBand([9.9156, 35], 90, 540).map(({ tide, repeatDays }) => `${tide} ${repeatDays}`);
    expect(names.slice(0, 3)).toEqual(["K1 9.9156", "M2 35", "N2 35"]);
    expect(names.slice(3).sort()).toEqual(["K1 35", "P1 35"]);
    expect(aliasesInBand([9.9156], 60, null).map(({ tide }) => tide)).toEqual(["M2", "P1", "K1"]);
    expect(aliasesInBand([9.9156], null, 50).map(({ tide }) => tide)).toEqual(["O1", "N2"]);
  });
});
