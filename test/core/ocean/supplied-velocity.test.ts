import { describe, expect, test } from "vitest";
import { type Convention, compareConventions, offeredConventions } from "../../../core/ocean/conventions";
import { geostrophicVelocity, type VelocityPlanes } from "../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { addVelocities, velocityAgreement, velocityComparison } from "../../../core/ocean/supplied-velocity";
import { expectAllClose, expectClose } from "../../expect-close";
import { evenAxes, planeFrom } from "./grids";

const axes = evenAxes({ west: 200, south: 21, step: 0.5, columns: 30, rows: 28 });
const size = 30 * 28;
const settings = { omega: 7.292115e-5, equatorDegrees: 5 };
const rounding = { relative: 1e-9, because: "float64 sums of a few thousand values" };

/** Eddies of a few cells that drift with the date, metres. */
function heightOn(date: number): Float64Array {
  const plane = planeFrom(
    axes,
    (x, y) => 0.2 * Math.sin(1.7 * x + 0.3 * date) * Math.cos(1.3 * y) + 0.1 * Math.sin(2.9 * y - 0.7 * x + date),
  );
  for (const cell of [200, 201, 470]) plane[cell] = Number.NaN;
  return plane;
}

const packed = (plane: Float64Array, step: number) => plane.map((value) => Math.round(value / step) * step);

function madeBy(convention: Convention, height: Float64Array): VelocityPlanes {
  const velocity = geostrophicVelocity(height, gridGeometry(axes, { ...settings, ...convention }, "test"));
  return { u: packed(velocity.u, 1e-6), v: packed(velocity.v, 1e-6) };
}

const label = ({ stencil, earth, gravity }: Convention) => `${stencil} points, ${earth}, gravity ${gravity}`;

describe("the convention that velocities were made by", () => {
  test.each(offeredConventions.map((each) => [label(each), each] as const))("is found among all 24: %s", (_, made) => {
    const samples = [0, 1].map((date) => ({ height: heightOn(date), supplied: madeBy(made, heightOn(date)) }));
    const ranked = compareConventions(samples, axes, settings);
    expect(ranked).toHaveLength(24);
    expect(ranked[0].convention).toEqual(made);
    expect(ranked[0].rmsDifference).toBeLessThan(1e-6);
    expect(ranked[1].rmsDifference).toBeGreaterThan(1e-5);
    expect(ranked.map(({ rmsDifference }) => rmsDifference)).toEqual(
      ranked.map(({ rmsDifference }) => rmsDifference).sort((a, b) => a - b),
    );
  });

  test("is found about the time mean where heights are anomalies and velocities absolute", () => {
    const made = offeredConventions[13];
    const meanHeight = planeFrom(axes, (x, y) => 0.8 * Math.sin(0.4 * y) + 0.1 * Math.cos(x));
    const samples = [0, 1, 2].map((date) => {
      const height = heightOn(date);
      const absolute = height.map((value, cell) => value + meanHeight[cell]);
      return { height, supplied: madeBy(made, absolute) };
    });
    const [best, next] = compareConventions(samples, axes, settings, offeredConventions, "mean");
    expect(best.convention).toEqual(made);
    expect(best.rmsAnomalyDifference).toBeLessThan(1e-6);
    expect(next.rmsAnomalyDifference).toBeGreaterThan(1e-5);
    expect(best.rmsDifference).toBeGreaterThan(0.1);
  });

  test("is sought only where the widest stencil is whole: what a supplier did at coasts and edges does not matter", () => {
    const made = offeredConventions[0];
    const height = heightOn(0);
    const supplied = madeBy(made, height);
    for (let row = 0; row < 28; row++) {
      supplied.u[row * 30 + 1] = 5;
      supplied.v[row * 30 + 28] = -5;
    }
    supplied.u[202] = 3;
    const [best] = compareConventions([{ height, supplied }], axes, settings);
    expect(best.convention).toEqual(made);
    expect(best.rmsDifference).toBeLessThan(1e-6);
    expect(best.count).toBeLessThan(2 * 22 * 20);
  });

  test("of a region too narrow for the widest stencil is not guessed: nothing is compared", () => {
    const narrow = evenAxes({ west: 200, south: 21, step: 0.5, columns: 6, rows: 28 });
    const height = planeFrom(narrow, (x, y) => Math.sin(x) * Math.cos(y));
    const supplied = { u: height, v: height };
    const ranked = compareConventions([{ height, supplied }], narrow, settings);
    expect(ranked[0].count).toBe(0);
    expect(ranked[0].rmsDifference).toBeNaN();
    expect(compareConventions([{ height, supplied }], narrow, settings, [])).toEqual([]);
  });
});

/** Pseudo-random planes: Park and Miller's generator. */
function noise(seed: number, scale: number): Float64Array {
  let state = seed;
  return Float64Array.from({ length: size }, () => {
    state = (state * 48271) % 2147483647;
    return scale * (state / 2147483647 - 0.5);
  });
}

const dates = [1, 2, 3, 4].map((date) => ({
  ours: { u: noise(date, 1), v: noise(10 + date, 0.5) },
  supplied: { u: noise(date, 1).map((value, i) => 0.9 * value + 0.01 * (i % 5)), v: noise(20 + date, 0.3) },
}));
for (const cell of [5, 300, 301]) dates[1].ours.u[cell] = Number.NaN;
for (const cell of [300, 777]) dates[2].supplied.u[cell] = Number.NaN;

function compared(descending = false) {
  const latitude = descending ? axes.latitude.values.toReversed() : axes.latitude.values;
  const comparison = velocityComparison(latitude, 30);
  const flipped = (plane: Float64Array) =>
    Float64Array.from({ length: size }, (_, i) => plane[(27 - Math.floor(i / 30)) * 30 + (i % 30)]);
  const turned = ({ u, v }: VelocityPlanes) => (descending ? { u: flipped(u), v: flipped(v) } : { u, v });
  for (const { ours, supplied } of dates) addVelocities(comparison, turned(ours), turned(supplied));
  return velocityAgreement(comparison);
}

/** Two passes over the pairs of u in rows from … to - 1, gaps left out. */
function plainly(from: number, to: number) {
  const pairs = dates
    .flatMap(({ ours, supplied }) =>
      Array.from({ length: (to - from) * 30 }, (_, i) => [ours.u[from * 30 + i], supplied.u[from * 30 + i]]),
    )
    .filter(([a, b]) => !Number.isNaN(a) && !Number.isNaN(b));
  const mean = (of: (pair: number[]) => number) => pairs.reduce((sum, pair) => sum + of(pair), 0) / pairs.length;
  const [a, b] = [mean(([x]) => x), mean(([, y]) => y)];
  const covariance = mean(([x, y]) => (x - a) * (y - b));
  return {
    count: pairs.length,
    rmsDifference: Math.sqrt(mean(([x, y]) => (x - y) ** 2)),
    bias: mean(([x, y]) => x - y),
    correlation: covariance / Math.sqrt(mean(([x]) => (x - a) ** 2) * mean(([, y]) => (y - b) ** 2)),
    rmsOurs: Math.sqrt(mean(([x]) => x * x)),
    rmsSupplied: Math.sqrt(mean(([, y]) => y * y)),
  };
}

describe("agreement of our velocities with the supplied ones", () => {
  test("streamed date by date equals two plain passes over all pairs, overall and by band of 5 degrees", () => {
    const agreement = compared();
    expect(agreement.bands.map(({ south, north }) => [south, north])).toEqual([
      [20, 25],
      [25, 30],
      [30, 35],
    ]);
    const parts = [
      [agreement.u.all, plainly(0, 28)],
      [agreement.bands[0].u.all, plainly(0, 8)],
      [agreement.bands[1].u.all, plainly(8, 18)],
      [agreement.bands[2].u.all, plainly(18, 28)],
    ];
    for (const [got, wanted] of parts) expectAllClose(Object.values(got), Object.values(wanted), rounding);
  });

  test("leaves gaps of either out and counts them", () => {
    const agreement = compared();
    expect(agreement.u.all.count).toBe(4 * size - 5);
    expect([agreement.suppliedOnly, agreement.oursOnly]).toEqual([3, 2]);
  });

  test("does not depend on whether rows run northward or southward", () => {
    const [up, down] = [compared(), compared(true)];
    expect(down.bands.map(({ south }) => south)).toEqual([20, 25, 30]);
    for (const [i, band] of up.bands.entries()) {
      expectAllClose(Object.values(down.bands[i].u.all), Object.values(band.u.all), rounding);
      expectAllClose(Object.values(down.bands[i].v.anomalies), Object.values(band.v.anomalies), rounding);
    }
  });

  test("shows an anomaly height against absolute velocity as a constant field, with perfect anomalies", () => {
    const geometry = gridGeometry(axes, { ...settings, ...offeredConventions[6] }, "test");
    const mean = geostrophicVelocity(
      planeFrom(axes, (_, y) => 0.5 * Math.tanh(y - 28)),
      geometry,
    );
    const comparison = velocityComparison(axes.latitude.values, 30);
    for (const date of [0, 1, 2]) {
      const ours = geostrophicVelocity(heightOn(date), geometry);
      const supplied = { u: ours.u.map((u, i) => u + mean.u[i]), v: ours.v.map((v, i) => v + mean.v[i]) };
      addVelocities(comparison, ours, supplied);
    }
    const agreement = velocityAgreement(comparison);
    const ours = geostrophicVelocity(heightOn(0), geometry);
    const jet = mean.u.map((u, cell) => (Number.isNaN(ours.u[cell]) ? Number.NaN : -u));
    expectAllClose(agreement.meanDifference.u, jet, { absolute: 1e-14, because: "float64 sums of three dates" });
    expectClose(agreement.meanShare, 1, { absolute: 1e-12, because: "only the mean differs" });
    expectClose(agreement.u.anomalies.correlation, 1, { absolute: 1e-12, because: "the anomalies are the same" });
    expect(agreement.u.anomalies.rmsDifference).toBeLessThan(1e-14);
    expect(agreement.u.all.rmsDifference).toBeGreaterThan(0.05);
    expect(agreement.u.all.correlation).toBeLessThan(0.95);
  });

  test("has no anomalies from one date and no numbers from none", () => {
    const comparison = velocityComparison(axes.latitude.values, 30);
    expect(velocityAgreement(comparison).u.all.rmsDifference).toBeNaN();
    expect(velocityAgreement(comparison).bands).toEqual([]);
    addVelocities(comparison, dates[0].ours, dates[0].supplied);
    const { u } = velocityAgreement(comparison);
    expect(u.all.count).toBe(size);
    expect(u.anomalies.count).toBe(0);
    expect(u.anomalies.rmsDifference).toBeNaN();
  });

  test("can be kept to chosen cells", () => {
    const comparison = velocityComparison(axes.latitude.values, 30);
    const firstRow = new Uint8Array(size).fill(1, 0, 30);
    addVelocities(comparison, dates[0].ours, dates[0].supplied, firstRow);
    const agreement = velocityAgreement(comparison);
    expect(agreement.u.all.count).toBe(30);
    expect(agreement.meanDifference.u[31]).toBeNaN();
  });
});
