import { join } from "node:path";
import { afterAll, expect, test } from "vitest";
import { createEngine } from "../../../main/engine/engine";
import { expectClose } from "../../expect-close";
import { line, studyOf, writeMadeGrid } from "../../properties/made-grid";
import { sampleStudy } from "../../sample";
import { temporaryFolder } from "../../temporary-folder";

const temporary = temporaryFolder();
const engine = createEngine({ workers: 2 });
afterAll(() => engine.close());

test("the sample's jets, the mean kept in what is filtered, stand still across latitudes", async () => {
  const keepsMean = { band: { shortestDays: 90, longestDays: null }, background: { mean: false, annual: true } };
  const { drift } = await engine.scales({ open: sampleStudy(keepsMean), grid: "A" });
  if (!drift.acrossLatitudes) throw new Error("no drift");
  const { value, low95, high95 } = drift.acrossLatitudes.speed;
  expectClose(value, 0, { absolute: 0.001, because: "jets followed one by one move at 0.02 cm/s" });
  expect(low95).toBeLessThan(0);
  expect(high95).toBeGreaterThan(0);
});

test("in a band without the mean nothing that stands is left, and the limits of a drift of noise hold zero", async () => {
  const { drift } = await engine.scales({ open: sampleStudy(), grid: "A" });
  expect(drift.acrossLatitudes?.limits).toBe("peak width");
  expect(drift.acrossLatitudes?.speed.low95).toBeLessThan(0);
  expect(drift.acrossLatitudes?.speed.high95).toBeGreaterThan(0);
});

test("uneven dates have a spectrum by period, its limits those of two degrees of freedom", async () => {
  const file = await writeMadeGrid(join(temporary, "uneven.nc"), {
    latitudes: line(28, 0.25, 17),
    longitudes: line(-150, 0.25, 20),
    days: Array.from({ length: 120 }, (_, i) => 20_000 + 5 * i + (i % 3)),
    height: (day, latitude) => 0.05 * Math.sin(latitude * 3) * Math.sin((2 * Math.PI * day) / 60),
  });
  const { period, notes } = await engine.scales({
    open: studyOf([file], { geostrophy: { earth: "sphere", gravity: 9.81 } }),
    grid: "A",
  });
  if (!period) throw new Error("no spectrum");
  const best = period.density.reduce((top, value, k, all) => (value > all[top] ? k : top), 0);
  expectClose(1 / period.frequency[best], 60, { relative: 0.1, because: "neighbouring frequencies of ten periods" });
  expect([period.degreesOfFreedom, period.window]).toEqual([2, "Lomb-Scargle, no taper"]);
  // 2 / chi-square quantiles of two degrees of freedom, which are -2 ln(1 - p).
  expectClose(period.lowFactor, -1 / Math.log(0.025), { relative: 1e-6, because: "closed form" });
  expect(notes.join(" ")).toMatch(/No energy by time scale/);
});
