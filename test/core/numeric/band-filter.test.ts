import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { bandResponse, filterSeries, lanczosBand, lanczosFilter, weightShare } from "../../../core/numeric/band-filter";
import { lanczosLowPass, lanczosRawWeights, symmetricResponse } from "../../../core/numeric/lanczos";
import { expectAllClose, expectClose } from "../../expect-close";

const printed = { absolute: 1e-4, because: "check values printed to four decimals" };

describe("Lanczos weights (Duchon 1979; values computed with numpy)", () => {
  test("24 weights a side at a cut-off of 18 samples", () => {
    const raw = lanczosRawWeights(1 / 18, 24);
    expectClose(
      raw.reduce((a, b) => a + b, 0),
      0.9907859,
      { absolute: 1e-7, because: "printed digits" },
    );
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
    for (const [period, response] of table)
      expectClose(bandResponse(filter, 1 / period), response, printed, `${period} d`);
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
      fc.property(
        fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 60, maxLength: 120 }),
        (values) => {
          const short = lanczosBand(4, 20);
          const series = Float64Array.from(values);
          const out = filterSeries(series, short);
          const doubled = filterSeries(
            series.map((value) => -2 * value),
            short,
          );
          expectAllClose(
            doubled,
            out.map((value) => -2 * value),
            { absolute: 1e-12, because: "rounding" },
          );
          const some = Int32Array.from([0, 7, 31, 59]);
          expect([...filterSeries(series, short, some)]).toEqual([...some].map((t) => out[t]));
        },
      ),
    );
  });
});

describe("open sides", () => {
  const series = Float64Array.from(
    { length: 700 },
    (_, t) => Math.sin(t / 4) + Math.cos(t / 40) + ((t * 7919) % 1009) / 1009,
  );

  test("a high-pass is the series less the low-pass of the same length, a band the difference of two low-passes", () => {
    const high = filterSeries(series, lanczosFilter({ shortestSamples: null, longestSamples: 120 }));
    const filter = lanczosFilter({ shortestSamples: 20, longestSamples: 120 });
    const slow = filterSeries(series, { ...filter, slow: null, fast: filter.slow });
    expectAllClose(
      high,
      series.map((value, t) => value - slow[t]),
      { absolute: 1e-12, because: "rounding" },
    );
    const fast = filterSeries(series, { ...filter, slow: null });
    expectAllClose(
      filterSeries(series, filter),
      fast.map((value, t) => value - slow[t]),
      {
        absolute: 1e-12,
        because: "rounding",
      },
    );
  });

  test("a low-pass reaches twice its cut-off, the others once the longest", () => {
    expect(lanczosFilter({ shortestSamples: 30, longestSamples: null }).halfWidth).toBe(60);
    expect(lanczosFilter({ shortestSamples: null, longestSamples: 120 }).halfWidth).toBe(120);
    expect(lanczosFilter({ shortestSamples: 30, longestSamples: 180 })).toEqual(lanczosBand(30, 180));
    expect(lanczosFilter({ shortestSamples: 30, longestSamples: null })).toEqual(
      lanczosBand(30, Number.POSITIVE_INFINITY),
    );
  });

  test("half the amplitude is left near the cut-off, all of it far inside the pass band, none far outside", () => {
    const near = { absolute: 0.03, because: "about one half at the cut-off with this half-width" };
    const low = lanczosFilter({ shortestSamples: 30, longestSamples: null });
    const high = lanczosFilter({ shortestSamples: null, longestSamples: 120 });
    for (const [filter, period, inside, outside] of [
      [low, 30, 3000, 8],
      [high, 120, 12, 3000],
    ] as const) {
      expectClose(bandResponse(filter, 1 / period), 0.5, near);
      expectClose(bandResponse(filter, 1 / inside), 1, { absolute: 0.005, because: "side lobes of the window" });
      expectClose(bandResponse(filter, 1 / outside), 0, { absolute: 0.005, because: "side lobes of the window" });
    }
  });

  test("open on both sides changes nothing, gaps included", () => {
    const gappy = series.slice().fill(Number.NaN, 100, 140);
    const filter = lanczosFilter({ shortestSamples: null, longestSamples: null });
    expect([...filterSeries(gappy, filter)]).toEqual([...gappy]);
    expect(bandResponse(filter, 0.1)).toBe(1);
  });

  test("a high-pass gives no value where there is none", () => {
    const gappy = series.slice().fill(Number.NaN, 300, 303);
    const out = filterSeries(gappy, lanczosFilter({ shortestSamples: null, longestSamples: 40 }));
    expect([...out.subarray(298, 305)].map(Number.isNaN)).toEqual([false, false, true, true, true, false, false]);
  });
});
