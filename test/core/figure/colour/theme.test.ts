import { describe, expect, test } from "vitest";
import { bytesFromHex, contrastRatio } from "../../../../core/figure/colour/hex";
import { themes } from "../../../../core/figure/colour/theme";

describe("contrast ratio", () => {
  test("black on white is 21, a colour on itself 1, either order", () => {
    expect(contrastRatio("#000000", "#ffffff")).toBeCloseTo(21, 6);
    expect(contrastRatio("#ffffff", "#000000")).toBeCloseTo(21, 6);
    expect(contrastRatio("#777777", "#777777")).toBe(1);
  });

  test("#767676 on white is the known grey that just passes 4.5", () => {
    expect(contrastRatio("#767676", "#ffffff")).toBeCloseTo(4.54, 2);
  });
});

describe.each(Object.values(themes))("theme $id", (theme) => {
  const grounds = [theme.ground, theme.panel];

  test("every text colour reaches 4.5 on ground and panel (WCAG 2.2, 1.4.3)", () => {
    for (const ground of grounds) {
      for (const text of [theme.ink, theme.softInk, theme.amberInk, theme.rust, theme.teal]) {
        expect(contrastRatio(text, ground)).toBeGreaterThanOrEqual(4.5);
      }
    }
  });

  test("lines and the gaps' red reach 3 on ground, panel and band (WCAG 2.2, 1.4.11)", () => {
    for (const ground of grounds) {
      for (const line of [theme.amber, theme.ink, theme.gap]) {
        expect(contrastRatio(line, ground)).toBeGreaterThanOrEqual(3);
      }
    }
    expect(contrastRatio(theme.ink, theme.amberTint)).toBeGreaterThanOrEqual(4.5);
    expect(contrastRatio(theme.gap, theme.data)).toBeGreaterThanOrEqual(2);
  });

  test("missing and land differ from each other and from every entry of the colour maps", () => {
    expect(theme.missing).not.toBe(theme.land);
    expect(contrastRatio(theme.missing, theme.land)).toBeGreaterThanOrEqual(1.35);
    for (const grey of [theme.missing, theme.land]) {
      const [red, green, blue] = bytesFromHex(grey);
      for (const { table } of [theme.diverging, theme.sequential]) {
        for (let i = 0; i < table.length; i += 4) {
          const apart = Math.abs(table[i] - red) + Math.abs(table[i + 1] - green) + Math.abs(table[i + 2] - blue);
          expect(apart).toBeGreaterThan(12);
        }
      }
    }
  });

  test("the middle of the diverging map lies near the panel in lightness, its ends far from it", () => {
    const hex = (entry: number) =>
      `#${[...theme.diverging.table.subarray(4 * entry, 4 * entry + 3)].map((byte) => byte.toString(16).padStart(2, "0")).join("")}`;
    expect(contrastRatio(hex(127), theme.panel)).toBeLessThan(1.2);
    expect(contrastRatio(hex(0), theme.panel)).toBeGreaterThan(4.5);
    expect(contrastRatio(hex(255), theme.panel)).toBeGreaterThan(4.5);
  });
});
