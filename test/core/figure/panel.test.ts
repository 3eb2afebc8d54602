import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { panelAt, pixelX, pixelY, scalePosition, valueAtX, valueAtY } from "../../../core/figure/panel";
import type { PanelFrame } from "../../../core/figure/scene";

const panel: PanelFrame = {
  id: "any",
  x: 40,
  y: 20,
  width: 300,
  height: 200,
  horizontal: { kind: "log", from: 900, to: 6 },
  vertical: { kind: "latitude", from: 41, to: 20 },
};

describe("panel scales", () => {
  test("the frame's edges are the scale's ends", () => {
    expect(pixelX(panel, 900)).toBe(40);
    expect(pixelX(panel, 6)).toBeCloseTo(340, 9);
    expect(pixelY(panel, 41)).toBe(20);
    expect(pixelY(panel, 20)).toBe(220);
  });

  test("a logarithmic scale gives equal ratios equal lengths", () => {
    const step = pixelX(panel, 50) - pixelX(panel, 100);
    expect(pixelX(panel, 25) - pixelX(panel, 50)).toBeCloseTo(step, 9);
  });

  test("values come back from their pixels, outside the frame too", () => {
    fc.assert(
      fc.property(fc.double({ min: -500, max: 800, noNaN: true }), (pixel) => {
        expect(pixelX(panel, valueAtX(panel, pixel))).toBeCloseTo(pixel, 6);
        expect(pixelY(panel, valueAtY(panel, pixel))).toBeCloseTo(pixel, 6);
      }),
    );
  });

  test("NaN stays NaN", () => {
    expect(scalePosition(panel.horizontal, Number.NaN)).toBeNaN();
  });

  test("a pixel finds the panel whose frame holds it", () => {
    expect(panelAt([panel], 40, 20)?.id).toBe("any");
    expect(panelAt([panel], 341, 20)).toBeUndefined();
  });
});
