import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { gridGeometry } from "../../../../core/ocean/grid-geometry";
import { basePlanes } from "../../../../core/ocean/quantities/define";
import { planesFrom, quantityById } from "../../../../core/ocean/quantities/evaluate";
import { quantities } from "../../../../core/ocean/quantities/index";
import { expectAllClose } from "../../../expect-close";
import { evenAxes, planeFrom, sphere } from "../grids";

const folder = new URL("../../../../core/ocean/quantities/", import.meta.url);
const axes = evenAxes({ west: -10, south: 30, step: 0.5, columns: 16, rows: 12 });
const geometry = gridGeometry(axes, sphere, "test");
const smooth = planeFrom(axes, (a, p) => 0.2 * Math.sin(a / 3) * Math.cos(p / 2) + 0.01 * p);

describe("the quantity registry", () => {
  test("every file that defines a quantity is in the index", () => {
    const defining = readdirSync(folder)
      .filter((name) => name.endsWith(".ts"))
      .filter((name) => /= defineQuantity\(/.test(readFileSync(new URL(name, folder), "utf8")));
    const index = readFileSync(new URL("index.ts", folder), "utf8");
    expect(defining.filter((name) => !index.includes(`"./${name.replace(/\.ts$/, "")}"`))).toEqual([]);
    expect(quantities.length).toBe(defining.length);
  });

  test("ids and file names of variables are unique and inputs are known", () => {
    for (const key of ["id", "variable", "title"] as const) {
      expect(new Set(quantities.map((quantity) => quantity[key])).size).toBe(quantities.length);
    }
    const ids: string[] = [...quantities.map((quantity) => quantity.id), ...basePlanes];
    for (const quantity of quantities) for (const input of quantity.inputs) expect(ids).toContain(input);
  });

  test("an unknown id is refused with the known ones", () => {
    expect(() => quantityById("vortex")).toThrow(/one of height, u, v/);
  });
});

describe.each(quantities.map((quantity) => [quantity.id, quantity] as const))("%s", (id, quantity) => {
  const field = (heights: Float64Array) => planesFrom(heights, geometry)(id);

  test("gives a value on every cell of a whole smooth height and leaves its input alone", () => {
    const before = smooth.slice();
    const plane = field(smooth);
    expect(plane.length).toBe(smooth.length);
    expect(plane.every(Number.isFinite)).toBe(true);
    expect([...smooth]).toEqual([...before]);
  });

  test("never gives a value where the height is missing", () => {
    fc.assert(
      fc.property(fc.uint8Array({ minLength: smooth.length, maxLength: smooth.length }), (holes) => {
        const heights = smooth.map((value, i) => (holes[i] < 70 ? Number.NaN : value));
        const plane = field(heights);
        heights.forEach((value, i) => {
          if (Number.isNaN(value)) expect(plane[i]).toBeNaN();
        });
      }),
      { numRuns: 40 },
    );
  });

  test(quantity.linear ? "is linear in height" : "is not linear in height, as it declares", () => {
    const other = planeFrom(axes, (a, p) => 0.05 * Math.cos(a) + 0.03 * Math.sin(p * a));
    const sum = field(smooth.map((value, i) => 2 * value - 3 * other[i]));
    const parts = field(smooth).map((value, i) => 2 * value - 3 * field(other)[i]);
    const scale = parts.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    const worst = sum.reduce((most, value, i) => Math.max(most, Math.abs(value - parts[i])), 0);
    if (quantity.linear) expect(worst).toBeLessThan(1e-10 * scale);
    else expect(worst).toBeGreaterThan(1e-3 * scale);
  });

  test("adding a constant height changes nothing but the height itself", () => {
    const raised = field(smooth.map((value) => value + 5));
    const expected = id === "height" ? field(smooth).map((value) => value + 5) : field(smooth);
    expectAllClose(raised, expected, { relative: 1e-9, because: "float64 cancellation under a 5 m offset" });
  });
});
