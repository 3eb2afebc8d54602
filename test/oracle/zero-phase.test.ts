import { describe, expect, test } from "vitest";
import { butterworthSections, type Sections, zeroPhaseResponse } from "../../core/numeric/filters/butterworth";
import { FilterRefusal } from "../../core/numeric/filters/refusal";
import {
  fewestSamples,
  paddingReach,
  steadyState,
  zeroPhaseFilter,
  zeroPhaseWeights,
} from "../../core/numeric/filters/zero-phase";
import { expectAllClose, expectClose } from "../expect-close";
import { referenceJson } from "../reference-json";

type Kind = "lowpass" | "highpass" | "bandpass";

interface Reference {
  readonly stepDays: number;
  readonly input: number[];
  readonly butterworth: {
    readonly kind: Kind;
    readonly order: number;
    readonly cutDays: number[];
    readonly padLength: number;
    readonly sections: number[][];
    readonly output: number[];
  }[];
  readonly wideAndOdd: {
    readonly kind: Kind;
    readonly order: number;
    readonly cutSamples: number[];
    readonly frequency: number[];
    readonly power: number[];
    readonly output: number[];
  }[];
  readonly narrowBand: {
    readonly length: number;
    readonly cutSamples: number[];
    readonly shown: number[];
    readonly cases: { readonly order: number; readonly output: number[] }[];
  };
  readonly halfPowerCuts: {
    readonly order: number;
    readonly edgeOfNyquist: number;
    readonly movedEdgeOfNyquist: number;
  }[];
}

const reference = referenceJson<Reference>("filters");
const input = Float64Array.from(reference.input);
const asked = { relative: 1e-9, because: "the bound asked of the same filter with other pole and zero pairs" };

/** Cuts as scipy takes them: the longer period first for a band-pass. */
function sectionsOf(kind: Kind, order: number, cutSamples: readonly number[]): Sections {
  const shortestSamples = kind === "highpass" ? null : cutSamples[cutSamples.length - 1];
  const longestSamples = kind === "lowpass" ? null : cutSamples[0];
  return butterworthSections({ order, shortestSamples, longestSamples, cut: "half-amplitude" });
}

/** |H|^2 of scipy's own sections, by complex arithmetic written out here. */
function powerOf(sections: readonly number[][], frequency: number): number {
  const at = (weights: readonly number[]) => {
    const real = weights.reduce((sum, w, k) => sum + w * Math.cos(2 * Math.PI * frequency * k), 0);
    const imaginary = weights.reduce((sum, w, k) => sum - w * Math.sin(2 * Math.PI * frequency * k), 0);
    return real * real + imaginary * imaginary;
  };
  return sections.reduce((power, each) => (power * at(each.slice(0, 3))) / at(each.slice(3)), 1);
}

describe("zero-phase Butterworth filters against scipy.signal.sosfiltfilt", () => {
  test.each(reference.butterworth.map((each) => [each.kind, each.order, each] as const))(
    "%s of order %i: response, padding and the whole output, ends included",
    (kind, order, each) => {
      const sections = sectionsOf(
        kind,
        order,
        each.cutDays.map((days) => days / reference.stepDays),
      );
      expect(sections.padSamples).toBe(each.padLength);
      expect(sections.count).toBe(each.sections.length);
      for (const frequency of [0.003, 0.0055, 0.012, 1 / 30, 0.1, 0.4]) {
        expectClose(zeroPhaseResponse(sections, frequency), powerOf(each.sections, frequency), {
          absolute: 1e-10,
          because: "poles 0.01 from the unit circle cost four digits",
        });
      }
      expectAllClose(zeroPhaseFilter(input, sections), each.output, asked, "output");
    },
  );

  test.each(reference.wideAndOdd.map((each) => [each.kind, each.order, each.cutSamples.join(" to "), each] as const))(
    "%s of order %i at %s samples",
    (kind, order, _, each) => {
      const sections = sectionsOf(kind, order, each.cutSamples);
      const power = each.frequency.map((frequency) => zeroPhaseResponse(sections, frequency));
      expectAllClose(power, each.power, { absolute: 1e-12, because: "the same products in float64" }, "response");
      const shown = zeroPhaseFilter(input, sections).filter((_, t) => t % 7 === 0);
      expectAllClose(shown, each.output, asked, "output");
    },
  );

  const { length, cutSamples, shown, cases } = reference.narrowBand;
  const long = Float64Array.from({ length }, (_, t) => {
    const waves = 0.1 * Math.cos((2 * Math.PI * t) / 700 + 0.3) + 0.05 * Math.sin((2 * Math.PI * t) / 90);
    return 0.5 + t / 16384 + waves + 0.1 * (((7919 * t) % 1009) / 1009 - 0.5);
  });
  test.each(cases.map((each) => [each.order, each] as const))(
    "the narrow band of 0.001 to 0.002 cycles a sample stays finite at order %i",
    (order, each) => {
      const out = zeroPhaseFilter(long, sectionsOf("bandpass", order, cutSamples));
      expect(out.every(Number.isFinite)).toBe(true);
      expectAllClose(
        shown.map((t) => out[t]),
        each.output,
        asked,
        "every 40th output and both ends",
      );
    },
  );

  test.each(reference.halfPowerCuts.map((each) => [each.order, each] as const))(
    "half the power at the named period at order %i is the plain design at scipy's moved edge",
    (order, { edgeOfNyquist, movedEdgeOfNyquist }) => {
      const open = { order, longestSamples: null } as const;
      const kept = butterworthSections({ ...open, shortestSamples: 2 / edgeOfNyquist, cut: "half-power" });
      const moved = butterworthSections({ ...open, shortestSamples: 2 / movedEdgeOfNyquist, cut: "half-amplitude" });
      expectAllClose(kept.coefficients, moved.coefficients, { absolute: 1e-14, because: "a tangent and back" });
      expectClose(zeroPhaseResponse(kept, edgeOfNyquist / 2), Math.SQRT1_2, { absolute: 1e-9, because: "rounding" });
    },
  );
});

describe("ends", () => {
  const band = sectionsOf("bandpass", 4, [180, 30]);

  test("a series no longer than the padding is refused with the length it takes", () => {
    const short = input.slice(0, band.padSamples);
    expect(() => zeroPhaseFilter(short, band)).toThrow(FilterRefusal);
    expect(() => zeroPhaseFilter(short, band)).toThrow(
      "expected at least 28 samples for this filter's padding, got 27 samples",
    );
    expect(fewestSamples(band)).toBe(28);
    expect(zeroPhaseFilter(input.slice(0, 28), band)).toHaveLength(28);
  });

  test("a gap is refused rather than spread to the end", () => {
    const gappy = input.slice();
    gappy[40] = Number.NaN;
    expect(() => zeroPhaseFilter(gappy, band)).toThrow("split the series at its gaps first");
  });

  test("a constant passes a low-pass and vanishes in the others, ends included", () => {
    const constant = new Float64Array(200).fill(3.7);
    const close = { absolute: 1e-10, because: "recursion with poles 0.03 from the unit circle" };
    expectAllClose(zeroPhaseFilter(constant, sectionsOf("lowpass", 4, [30])), constant, close);
    expectAllClose(
      zeroPhaseFilter(constant, sectionsOf("highpass", 4, [180])),
      constant.map(() => 0),
      close,
    );
    expectAllClose(
      zeroPhaseFilter(constant, band),
      constant.map(() => 0),
      close,
    );
  });

  test("a straight line passes a low-pass: the odd extension continues it", () => {
    const line = Float64Array.from({ length: 400 }, (_, t) => 1 + 0.01 * t);
    const out = zeroPhaseFilter(line, sectionsOf("lowpass", 2, [10]));
    // Nine samples of extension; its slowest mode decays by 0.64 a sample, and the steady start is wrong by a slope's delay.
    expectAllClose(out, line, {
      absolute: 0.01,
      because: "the padding is nine samples long and the start knows no slope",
    });
  });

  test("the steady state holds a constant at every section", () => {
    const low = sectionsOf("lowpass", 5, [30]);
    const states = steadyState(low, 2);
    expect(states).toHaveLength(2 * low.count);
    const out = zeroPhaseFilter(new Float64Array(60).fill(2), low);
    expectAllClose(out, new Float64Array(60).fill(2), { absolute: 1e-11, because: "five recursions" });
  });

  test("the weights are the filter's answer to an impulse and sum to the response at zero", () => {
    const low = sectionsOf("lowpass", 3, [20]);
    const weights = zeroPhaseWeights(low);
    const impulse = new Float64Array(801);
    impulse[400] = 1;
    const out = zeroPhaseFilter(impulse, low);
    for (let lag = 0; lag < 60; lag++) {
      expectClose(out[400 + lag], weights[lag], { absolute: 1e-9, because: "weights end where forgotten to 1e-10" });
      expectClose(out[400 - lag], weights[lag], { absolute: 1e-9, because: "the filter is symmetric" });
    }
    const sum = weights.reduce((total, weight, lag) => total + (lag === 0 ? 1 : 2) * weight, 0);
    expectClose(sum, 1, { absolute: 1e-4, because: "weights followed until forgotten" });
  });

  test("beyond the padding's reach at most a tenth of the absolute weight falls outside the record", () => {
    for (const sections of [band, sectionsOf("lowpass", 2, [30]), sectionsOf("highpass", 3, [180])]) {
      const weights = zeroPhaseWeights(sections).map(Math.abs);
      const total = 2 * weights.reduce((a, b) => a + b, 0) - weights[0];
      const beyond = (from: number) => weights.subarray(from).reduce((a, b) => a + b, 0) / total;
      const reach = paddingReach(sections);
      // Sample t has lags t + 1 and more outside.
      expect(beyond(reach + 1)).toBeLessThanOrEqual(0.1);
      expect(beyond(reach)).toBeGreaterThan(0.1);
    }
  });
});
