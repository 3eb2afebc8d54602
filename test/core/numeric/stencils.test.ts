import { describe, expect, test } from "vitest";
import {
  firstDerivativeWeights,
  type StencilPoints,
  stencilNoiseGain,
  stencilPoints,
  stencilResponse,
} from "../../../core/numeric/stencils";
import { expectAllClose, expectClose } from "../../expect-close";

const printed = { absolute: 5.1e-5, because: "the table prints four decimals" };

describe("centred difference weights (Fornberg 1988, table of centred approximations)", () => {
  const table: Record<StencilPoints, number[]> = {
    3: [-1 / 2, 0, 1 / 2],
    5: [1 / 12, -8 / 12, 0, 8 / 12, -1 / 12],
    7: [-1 / 60, 9 / 60, -45 / 60, 0, 45 / 60, -9 / 60, 1 / 60],
    9: [3 / 840, -32 / 840, 168 / 840, -672 / 840, 0, 672 / 840, -168 / 840, 32 / 840, -3 / 840],
  };
  test.each(stencilPoints)("the %i-point weights are the published fractions", (points) => {
    const half = (points - 1) / 2;
    const nodes = Array.from({ length: points }, (_, i) => i - half);
    expectAllClose(firstDerivativeWeights(nodes, 0), table[points], {
      absolute: 1e-14,
      because: "a recursion of a few dozen float64 operations",
    });
  });

  test("the one-sided three-point weights are -3/2, 2, -1/2", () => {
    expectAllClose(firstDerivativeWeights([0, 1, 2], 0), [-1.5, 2, -0.5], {
      absolute: 1e-15,
      because: "exact fractions",
    });
  });

  test("weights for uneven nodes differentiate every polynomial they must exactly", () => {
    const nodes = [-2.3, -0.9, 0, 1.7, 2.1];
    const weights = firstDerivativeWeights(nodes, 0.4);
    for (let power = 0; power < 5; power++) {
      const slope = nodes.reduce((sum, node, i) => sum + weights[i] * node ** power, 0);
      const truth = power === 0 ? 0 : power * 0.4 ** (power - 1);
      expectClose(slope, truth, { absolute: 1e-12, because: "float64 cancellation in a quartic" });
    }
  });
});

describe("what a stencil does to a wave (response of the weights, algebra)", () => {
  const table: Record<StencilPoints, number[]> = {
    3: [0.6366, 0.827, 0.9003, 0.9549],
    5: [0.8488, 0.9648, 0.9882, 0.9976],
    7: [0.9337, 0.9924, 0.9985, 0.9999],
    9: [0.9701, 0.9983, 0.9998, 1.0],
  };
  test.each(stencilPoints)("the %i-point response at 4, 6, 8 and 12 cells a wavelength", (points) => {
    [4, 6, 8, 12].forEach((cells, i) => {
      expectClose(stencilResponse(points, cells), table[points][i], printed, `${cells} cells`);
    });
  });

  test("noise gains are 0.7071, 0.9501, 1.0819, 1.1674", () => {
    const gains = [Math.SQRT1_2, 0.9501, 1.0819, 1.1674];
    stencilPoints.forEach((points, i) => {
      expectClose(stencilNoiseGain(points), gains[i], printed);
    });
  });

  test("the response reaches 99 % at 25.61, 8.35, 5.71 and 4.70 cells", () => {
    const cells = [25.61, 8.35, 5.71, 4.7];
    stencilPoints.forEach((points, i) => {
      expectClose(stencilResponse(points, cells[i]), 0.99, {
        absolute: 2e-4,
        because: "cells printed to two decimals",
      });
    });
  });

  test("a slope on a 50 km Gaussian at 0.25 degrees keeps 0.9124, 0.9875, 0.9982, 1.0000 of itself two cells from its crest", () => {
    const spacing = (0.25 * Math.PI * 6371000) / 180;
    const kept = [0.9124, 0.9875, 0.9982, 1.0];
    stencilPoints.forEach((points, i) => {
      const half = (points - 1) / 2;
      const nodes = Array.from({ length: points }, (_, k) => (2 + k - half) * spacing);
      const weights = firstDerivativeWeights(nodes, 2 * spacing);
      const bump = (y: number) => 0.3 * Math.exp((-y * y) / (2 * 50e3 ** 2));
      const slope = nodes.reduce((sum, node, k) => sum + weights[k] * bump(node), 0);
      const exact = ((-2 * spacing) / 50e3 ** 2) * bump(2 * spacing);
      expectClose(slope / exact, kept[i], printed, `${points} points`);
    });
  });
});

describe("stencils refuse nothing they can do", () => {
  test("one node has a zero derivative", () => {
    expect([...firstDerivativeWeights([3], 0)]).toEqual([0]);
  });
});
