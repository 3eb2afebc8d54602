import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { ScalesResult } from "../../../core/model/scales-result";
import { pearsonCorrelation } from "../../../core/numeric/statistics/correlation";
import { createEngine } from "../../../main/engine/engine";
import { expectClose } from "../../expect-close";
import { sampleStudy } from "../../sample";
import { pythonJson } from "../../setup/python";

/** What the generator kept of its sea's zonal-mean momentum, in the model's own metres; time means by numpy. */
interface Truth {
  readonly latitude: readonly number[];
  /** Time means by row. */
  readonly flow: readonly number[];
  readonly convergence: readonly number[];
  /** Root mean square over rows and dates of tendency less convergence less friction, and of the tendency. */
  readonly residualRms: number;
  readonly tendencyRms: number;
  /** Rows' mean of (last flow - first flow) / time and of convergence + friction: their rms difference and the first's rms. */
  readonly changeResidualRms: number;
  readonly changeRms: number;
  /** Mean over rows and dates, W kg-1: flow times convergence, times friction, and the change of flow² / 2. */
  readonly given: number;
  readonly lost: number;
  readonly gained: number;
}

function readTruth(): Truth {
  const path = fileURLToPath(new URL("../../truth/halcyon-truth.nc", import.meta.url));
  return pythonJson<Truth>(`
import json, netCDF4, numpy as np
d = netCDF4.Dataset("${path}")
get = lambda name: np.asarray(d[name][:], dtype=float)
u, tendency, convergence, friction, time = (get(n) for n in ("zonal_u", "tendency", "convergence", "friction", "time"))
rms = lambda x: float(np.sqrt(np.mean(x * x)))
seconds = (time[-1] - time[0]) * 86400
# Between the first and the last date: windows centred on dates, ends by half.
steps = np.diff(time) * 86400
between = lambda x: ((x[1:] + x[:-1]) / 2 * steps[:, None]).sum(0) / seconds
change = (u[-1] - u[0]) / seconds
print(json.dumps({
  "latitude": get("row").tolist(), "flow": u.mean(0).tolist(), "convergence": convergence.mean(0).tolist(),
  "residualRms": rms(tendency - convergence - friction), "tendencyRms": rms(tendency),
  "changeResidualRms": rms(change - between(convergence + friction)), "changeRms": rms(change),
  "given": float(between((u * convergence).mean(1)[:, None])[0]), "lost": float(between((u * friction).mean(1)[:, None])[0]),
  "gained": float((u[-1] ** 2 - u[0] ** 2).mean() / 2 / seconds)}))`);
}

/** A row's value between the truth's rows. */
function at(truth: Truth, values: readonly number[], latitude: number): number {
  const above = truth.latitude.findIndex((each) => each >= latitude);
  const [south, north] = [truth.latitude[above - 1], truth.latitude[above]];
  const share = (latitude - south) / (north - south);
  return values[above - 1] + share * (values[above] - values[above - 1]);
}

function rootMeanSquare(values: Float64Array): number {
  return Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length);
}

let truth: Truth;
beforeAll(() => {
  truth = readTruth();
});

describe("the generator's own momentum", () => {
  const because = "the issue's 10 %; the windows' sampling leaves under 1 %";

  test("the zonal-mean flow changes by what eddies push and friction takes, date by date and over the record", () => {
    expectClose(truth.residualRms / truth.tendencyRms, 0, { absolute: 0.1, because });
    expectClose(truth.changeResidualRms / truth.changeRms, 0, { absolute: 0.1, because });
  });

  test("energy given by the eddies less what friction takes is what the jets gain", () => {
    expect(truth.given).toBeGreaterThan(0);
    expectClose(truth.given + truth.lost, truth.gained, { relative: 0.1, because });
  });
});

describe("momentum read off the maps", () => {
  const engine = createEngine({ workers: 2 });
  afterAll(() => engine.close());
  let result: ScalesResult;
  let convergence: Float64Array;
  beforeAll(async () => {
    result = await engine.scales({ open: sampleStudy(), grid: "A" });
    convergence = result.latitude.map((latitude) => at(truth, truth.convergence, latitude));
  });

  test("the mean flow is the truth's: correlation above 0.99 over latitude (0.999 measured)", () => {
    const flow = result.latitude.map((latitude) => at(truth, truth.flow, latitude));
    expect(pearsonCorrelation(flow, result.forcing.meanFlow).correlation).toBeGreaterThan(0.99);
  });

  test("mean convergence goes with the truth's: correlation above 0.45 over latitude (0.58 measured)", () => {
    // The stirring near 120 km is smoothed away by the mapping, a fifth of its amplitude is left: larger eddies tell the rest.
    expect(pearsonCorrelation(convergence, result.forcing.convergence).correlation).toBeGreaterThan(0.45);
  });

  test("its size is a part of the truth's, as maps that smooth eddies must show", () => {
    const share = rootMeanSquare(result.forcing.convergence) / rootMeanSquare(convergence);
    expect(share).toBeGreaterThan(0.25);
    expect(share).toBeLessThan(1);
  });

  test("eddies give energy to the jets, with limits that reach below nothing, and less than in the truth", () => {
    const { value, low95, high95 } = result.forcing.conversion;
    expect(value).toBeGreaterThan(0);
    expect(low95).toBeLessThan(value);
    expect(high95).toBeLessThan(truth.given);
  });
});
