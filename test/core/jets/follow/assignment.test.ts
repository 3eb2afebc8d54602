import { describe, expect, test } from "vitest";
import { leastCostAssignment, leastCostMatching } from "../../../../core/jets/follow/assignment";
import { randomStream } from "../../../../core/numeric/statistics/random";
import { expectClose } from "../../../expect-close";

/** Least total over every way of giving rows columns of their own, or `alone`. */
function bruteForce(costs: Float64Array, rows: number, columns: number, alone: number): number {
  const search = (row: number, used: number): number => {
    if (row === rows) return 0;
    let best = alone + search(row + 1, used);
    for (let column = 0; column < columns; column++) {
      if (used & (1 << column)) continue;
      best = Math.min(best, costs[row * columns + column] + search(row + 1, used | (1 << column)));
    }
    return best;
  };
  return search(0, 0);
}

const rounding = { absolute: 1e-12, because: "float64 sums" };

describe("least-cost matching equals brute force", () => {
  test.each([1, 2, 3, 4, 5, 6])("on 50 random tables of up to six rows, seed %i", (seed) => {
    const random = randomStream(seed);
    for (let round = 0; round < 50; round++) {
      const rows = 1 + random.below(6);
      const columns = random.below(7);
      const costs = Float64Array.from({ length: rows * columns }, () =>
        random.uniform() < 0.3 ? Number.POSITIVE_INFINITY : Math.round(random.uniform() * 8) / 4,
      );
      const partner = leastCostMatching(costs, rows, columns, 1.5);
      const taken = [...partner].filter((column) => column >= 0);
      expect(new Set(taken).size).toBe(taken.length);
      const total = partner.reduce((sum, column, row) => sum + (column < 0 ? 1.5 : costs[row * columns + column]), 0);
      expectClose(total, bruteForce(costs, rows, columns, 1.5), rounding);
    }
  });
});

test("a full assignment equals brute force where every row must have a column", () => {
  const random = randomStream(9);
  for (let round = 0; round < 50; round++) {
    const rows = 1 + random.below(5);
    const columns = rows + random.below(3);
    const costs = Float64Array.from({ length: rows * columns }, () => random.normal());
    const total = leastCostAssignment(costs, rows, columns).reduce((sum, c, row) => sum + costs[row * columns + c], 0);
    expectClose(total, bruteForce(costs, rows, columns, Number.POSITIVE_INFINITY), rounding);
  }
});

test("nothing to match gives nothing", () => {
  expect([...leastCostMatching(new Float64Array(0), 0, 3, 1)]).toEqual([]);
  expect([...leastCostMatching(new Float64Array(0), 2, 0, 1)]).toEqual([-1, -1]);
});
