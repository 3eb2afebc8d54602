import { describe, expect, test } from "vitest";
import type { StencilPoints } from "../../../core/numeric/stencils";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { relativeVorticity } from "../../../core/ocean/vorticity";
import { expectClose } from "../../expect-close";
import { evenAxes, planeFrom, sphere } from "./grids";
import { exactWaveFlow, waveHeight } from "./spherical-wave";

/** An island of 4 by 4 degrees in the middle of a sea of 40 by 40. */
const isLand = (longitude: number, latitude: number) => Math.abs(longitude) <= 2 && Math.abs(latitude - 42) <= 2;

interface Errors {
  /** At common points 9 degrees from the island's edge and from the grid's. */
  readonly away: number[];
  /** In the ring of cells that touch the island on a side. */
  readonly beside: number[];
}

function errorsAt(step: number, stencil: StencilPoints): Errors {
  const size = Math.round(40 / step) + 1;
  const axes = evenAxes({ west: -20, south: 22, step, columns: size, rows: size });
  const geometry = gridGeometry(axes, { ...sphere, stencil }, "test");
  const height = planeFrom(axes, (a, p) => (isLand(a, p) ? Number.NaN : waveHeight(a, p)));
  const velocity = geostrophicVelocity(height, geometry);
  const planes = [velocity.u, velocity.v, relativeVorticity(velocity, geometry)];
  const errors: Errors = { away: [0, 0, 0], beside: [0, 0, 0] };
  for (let row = 0; row < size; row++) {
    for (let column = 0; column < size; column++) {
      const i = row * size + column;
      const [a, p] = [axes.longitude.values[column], axes.latitude.values[row]];
      if (isLand(a, p)) {
        for (const plane of planes) expect(plane[i]).toBeNaN();
        continue;
      }
      const isBeside = isLand(a - step, p) || isLand(a + step, p) || isLand(a, p - step) || isLand(a, p + step);
      const isCommon = Number.isInteger(a) && Number.isInteger(p);
      const isAway = Math.max(Math.abs(a), Math.abs(p - 42)) === 11;
      const into = isBeside ? errors.beside : isCommon && isAway ? errors.away : null;
      if (!into) continue;
      exactWaveFlow(a, p).forEach((truth, k) => {
        into[k] = Math.max(into[k], Math.abs(planes[k][i] - truth));
      });
    }
  }
  return errors;
}

const orders = (coarse: number[], fine: number[]) => coarse.map((error, k) => Math.log2(error / fine[k]));

describe("u, v and vorticity with an island in the domain, on the sphere", () => {
  test.each([
    [3, 2],
    [5, 4],
    [7, 6],
    [9, 8],
  ] as const)("away from it the %i-point stencil has its full order %i", (points, order) => {
    const observed = orders(errorsAt(1, points).away, errorsAt(0.5, points).away);
    observed.forEach((value, k) => {
      expectClose(value, order, { absolute: 0.15, because: "next order's share" }, ["u", "v", "vorticity"][k]);
    });
  });

  test.each([3, 5, 7, 9] as const)(
    "beside it %i points leave u and v of second order, and so vorticity of first",
    (points) => {
      const observed = orders(errorsAt(0.25, points).beside, errorsAt(0.125, points).beside);
      expectClose(
        observed[0],
        2,
        { absolute: 0.15, because: "the ring lies half a step nearer on the fine grid" },
        "u",
      );
      expectClose(
        observed[1],
        2,
        { absolute: 0.15, because: "the ring lies half a step nearer on the fine grid" },
        "v",
      );
      // The shore cell's second-order error does not continue its neighbour's: their difference over a step loses an order.
      expectClose(observed[2], 1, { absolute: 0.15, because: "as for u and v" }, "vorticity");
    },
  );
});
