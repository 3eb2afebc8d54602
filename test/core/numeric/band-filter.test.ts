import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { bandResponse, filterSeries, lanczosBand, weightShare } from "../../../core/numeric/band-filter";
import { lanczosLowPass, lanczosRawWeights, symmetricResponse } from "../../../core/numeric/lanczos";
import { expectAllClose, expectClose } from "../../expect-close";

const printed = { absolute: 1e-4, because: "check values printed to four decimals" };

describe("Lanczos weights (Duchon 1979; values computed with numpy)", () => {
  test("24 weights a side at a cut-off of 18 samples", () => {
    const raw = lanczosRawWeights(1 / 18, 24);
    expectClose(raw.reduce((a, b) => a + b, 0), 0.9907859, { absolute: 1e-7, because: "printed digits" });
    expectClose(raw[24], 0.1111111, printed);
    expectClose(raw[25], 0.1085578, printed);
    const weights = lanczosLowPass(1 / 18, 24);
    expectClose(symmetricResponse(weights, 1 / 18), 0.5055, printed);
    expectClose(symmetricResponse(weights, 1 / 12), -0.0018, printed);
    expectClose(symmetricResponse(weights, 1 / 30), 0.9734, printed);
  });

  test("a daily 90 to 540 day band with 700 weights a side", () => {
    const filter = {
      halfWidth: 700,
      fast: lanczosLowPass(1 / 90, 700),
      slow: lanczosLowPass(1 / 540, 700),
    };
    const table = [
      [60, -0.0005],
      [90, 0.4999],
      [180, 1.0009],
      [360, 0.9986],
      [540, 0.4945],
    ];
    for (const [period, response] of table) expectClose(bandResponse(filter, 1 / period), response, printed, `${period} d`);
  });
});

describe("the band-pass", () => {
  const filter = lanczosBand(30, 180);

  test("passes a sinusoid with the amplitude its response says, and no shift", () => {
    for (const period of [25, 30, 60, 100, 180, 300]) {
      const series = Float64Array.from({ length: 1200 }, (_, t) => Math.sin((2 * Math.PI * (t - 600)) / period + 0.4));
      const out = filterSeries(series, filter);
      const gain = bandResponse(filter, 1 / period);
      for (let t = 400; t < 800; t++) {
        expectClose(out[t], gain * series[t], { absolute: 1e-9, because: "a symmetric sum over whole weights" });
      }
    }
  });

  test("a constant stays out of the band and a low-pass keeps it, gaps or not", () => {
    const series = new Float64Array(300).fill(3.7);
    for (let t = 100; t < 112; t++) series[t] = Number.NaN;
    expectAllClose(filterSeries(series, filter), new Float64Array(300), { absolute: 1e-12, because: "rounding" });
    const low = filterSeries(series, lanczosBand(30, Number.POSITIVE_INFINITY));
    expectAllClose(low, new Float64Array(300).fill(3.7), { absolute: 1e-12, because: "rounding" });
  });

  test("one missing sample reaches no farther than the half-width", () => {
    const whole = Float64Array.from({ length: 900 }, (_, t) => Math.sin(t / 9) + Math.cos(t / 31));
    const gappy = whole.slice();
    gappy[450] = Number.NaN;
    const [a, b] = [filterSeries(whole, filter), filterSeries(gappy, filter)];
    a.forEach((value, t) => {
      if (Math.abs(t - 450) > filter.halfWidth) expect(b[t]).toBe(value);
      else expect(Number.isFinite(b[t])).toBe(true);
    });
  });

  test("weight shares are one inside, about a half at the ends, and mark what a gap takes", () => {
    const share = weightShare(filter, new Uint8Array(900).fill(1));
    expectClose(share[450], 1, { absolute: 1e-12, because: "weights sum to one" });
    expectClose(share[0], 0.5, { absolute: 0.02, because: "half the weights and half the centre one" });
    const gap = new Uint8Array(900).fill(1).fill(0, 440, 460);
    expect(weightShare(filter, gap)[450]).toBeLessThan(0.9);
  });

  test("a stretch with hardly any data gives no value rather than an invented one", () => {
    const series = new Float64Array(800).fill(Number.NaN);
    series[400] = 1;
    const out = filterSeries(series, filter);
    expect(out[400]).toBeNaN();
    expect(out[395]).toBeNaN();
  });

  test("is linear, and picks the same values when asked for some samples only", () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 60, maxLength: 120 }), (values) => {
        const short = lanczosBand(4, 20);
        const series = Float64Array.from(values);
        const out = filterSeries(series, short);
        const doubled = filterSeries(series.map((value) => -2 * value), short);
        expectAllClose(doubled, out.map((value) => -2 * value), { absolute: 1e-12, because: "rounding" });
        const some = Int32Array.from([0, 7, 31, 59]);
        expect([...filterSeries(series, short, some)]).toEqual([...some].map((t) => out[t]));
      }),
    );
  });
});
