import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { compareConventions } from "../../../core/ocean/conventions";
import { geostrophicVelocity } from "../../../core/ocean/geostrophy";
import { gridGeometry } from "../../../core/ocean/grid-geometry";
import { besideHeights, indexVariable } from "../../../main/readers/index-variable";
import type { GridIndex } from "../../../main/readers/joined-grid";
import { indexGrid } from "../../../main/readers/joined-grid";
import { readHeights } from "../../../main/readers/read-heights";
import { recogniseHeightError } from "../../../main/readers/recognise-error";
import { recogniseVelocity } from "../../../main/readers/recognise-velocity";
import { metresPerUnit } from "../../../main/readers/units";
import { metresPerSecond } from "../../../main/readers/velocity-units";
import type { GridRecipe } from "./grids";
import { gridFile, writeGrid } from "./grids";
import { faultOf, temporaryFolder } from "./places";
import type { WrittenAttribute, WrittenVariable } from "./write-classic";
import { writeClassic } from "./write-classic";

const folder = temporaryFolder();
let files = 0;
const nextPath = () => join(folder, `${files++}.nc`);
const index = (paths: readonly string[]) => indexGrid(paths, { height: "auto", id: "A" });

/** A further variable on the recipe's grid (2 dates, 3 × 4 cells unless `values` says otherwise). */
function beside(
  name: string,
  attributes: Readonly<Record<string, WrittenAttribute>>,
  values: WrittenVariable["values"] = new Int16Array(24),
  dimensions = ["time", "latitude", "longitude"],
): WrittenVariable {
  return { name, dimensions, attributes: { units: "m/s", ...attributes }, values };
}

async function velocityIn(more: readonly WrittenVariable[], recipe: GridRecipe = {}, title = "") {
  const path = nextPath();
  writeClassic(path, { ...gridFile({ ...recipe, more }), attributes: { title } });
  return besideHeights(await index([path]), recogniseVelocity);
}

const anomalyHeight = { heightAttributes: { standard_name: "sea_surface_height_above_mean_sea_level" } };
const pair = (u: string, v: string, name: (direction: string) => string, longName = "") => [
  beside(u, { standard_name: name("eastward"), long_name: longName }),
  beside(v, { standard_name: name("northward"), long_name: longName }),
];
const absolute = (direction: string) => `surface_geostrophic_${direction}_sea_water_velocity`;
const anomaly = (direction: string) => `${absolute(direction)}_assuming_mean_sea_level_for_geoid`;

describe("supplied velocity is found", () => {
  it.each([
    [absolute, "geoid"],
    [(d: string) => `surface_${d}_geostrophic_sea_water_velocity`, "geoid"],
    [anomaly, "mean-sea-level"],
    [(d: string) => `${absolute(d)}_assuming_sea_level_for_geoid`, "mean-sea-level"],
    [(d: string) => `surface_${d}_geostrophic_sea_water_velocity_assuming_sea_level_for_geoid`, "mean-sea-level"],
    [(d: string) => `surface_${d}_geostrophic_sea_water_velocity_assuming_mean_sea_level_for_geoid`, "mean-sea-level"],
  ] as const)("by CF standard name or alias (%#)", async (name, reference) => {
    const found = await velocityIn(pair("a", "b", name, "assuming mean sea level for geoid"));
    expect(found).toMatchObject({ eastward: "a", northward: "b", reference, foundBy: "standard name", mean: null });
    expect(found?.matchesHeight).toBe(reference === "geoid");
  });

  it("of the height's own reference where the file has both, the other named in a note", async () => {
    const both = [...pair("ugosa", "vgosa", anomaly), ...pair("ugos", "vgos", absolute)];
    const above = await velocityIn(both);
    expect(above).toMatchObject({ eastward: "ugos", northward: "vgos", matchesHeight: true });
    expect(above?.notes).toEqual(["the file also has ugosa and vgosa"]);
    expect(await velocityIn(both, anomalyHeight)).toMatchObject({ eastward: "ugosa", northward: "vgosa" });
  });

  it("with a note where it is of another reference than the height", async () => {
    const found = await velocityIn(pair("u", "v", absolute), anomalyHeight);
    expect(found?.matchesHeight).toBe(false);
    expect(found?.notes).toEqual(["u is of a height above geoid, adt is above mean-sea-level"]);
  });

  it("apart from a time mean of the same standard name, and never as an uncertainty", async () => {
    const means = pair("UCUR_MEAN", "VCUR_MEAN", absolute, "mean geostrophic velocity");
    const errors = pair("err_u", "err_v", absolute, "formal error");
    const found = await velocityIn([...means, ...errors, ...pair("UCUR", "VCUR", absolute, "total velocity")]);
    expect(found).toMatchObject({
      eastward: "UCUR",
      northward: "VCUR",
      mean: { eastward: "UCUR_MEAN", northward: "VCUR_MEAN" },
      notes: [],
    });
    expect(await velocityIn([...means, ...errors])).toBeNull();
  });

  it("under a general velocity name only where a description says geostrophic", async () => {
    const general = (direction: string) => `surface_${direction}_sea_water_velocity`;
    expect(await velocityIn(pair("u", "v", general))).toBeNull();
    expect(await velocityIn(pair("u", "v", general, "ageostrophic current"))).toBeNull();
    const byTitle = await velocityIn(pair("u", "v", general), {}, "Geostrophic currents");
    expect(byTitle).toMatchObject({ foundBy: "description", reference: "unknown", matchesHeight: null });
    const byName = await velocityIn(pair("u", "v", general, "geostrophic velocity anomaly"));
    expect(byName).toMatchObject({ foundBy: "description", reference: "mean-sea-level" });
  });

  it("only as a pair, in a unit of speed and on the height's grid", async () => {
    expect(await velocityIn(pair("u", "v", absolute).slice(0, 1))).toBeNull();
    const [u, v] = pair("u", "v", absolute);
    expect(await velocityIn([u, { ...v, attributes: { ...v.attributes, units: "1" } }])).toBeNull();
    const profile = { ...v, dimensions: ["time", "latitude"], values: new Int16Array(6) };
    expect(await velocityIn([u, profile])).toBeNull();
  });
});

it.each([
  ["m s-1", 1],
  ["m/s", 1],
  ["m.s-1", 1],
  ["m s^-1", 1],
  ["metres per second", 1],
  ["meter second-1", 1],
  ["cm s-1", 0.01],
  ["cm/s", 0.01],
  ["m", null],
  ["m s-2", null],
  ["m/s2", null],
  ["degrees/s", null],
  ["", null],
])("the unit %s is %s m s-1", (units, wanted) => {
  expect(metresPerSecond(units)).toBe(wanted);
});

async function errorIn(more: readonly WrittenVariable[], heightAttributes: GridRecipe["heightAttributes"] = {}) {
  return besideHeights(await index([writeGrid(nextPath(), { more, heightAttributes })]), recogniseHeightError);
}

describe("the height's standard error is found", () => {
  const metres = { units: "m" };
  const modified = beside("e", { ...metres, standard_name: "sea_surface_height_above_geoid standard_error" });
  const named = beside("err_adt", metres);

  it("by CF's standard-name modifier before all else", async () => {
    expect(await errorIn([named, modified])).toEqual({ name: "e", foundBy: "standard name" });
  });

  it("among the ancillary variables before other names", async () => {
    const listed = beside("quality_a", { ...metres, long_name: "formal mapping error" });
    const flags = beside("flag", metres);
    const found = await errorIn([named, flags, listed], { ancillary_variables: "flag quality_a" });
    expect(found).toEqual({ name: "quality_a", foundBy: "ancillary variables" });
  });

  it("by a name that names the height before one that names none, never by another variable's", async () => {
    expect(await errorIn([beside("error", metres), named])).toEqual({ name: "err_adt", foundBy: "name" });
    expect(await errorIn([beside("formal_error", metres)])).toEqual({ name: "formal_error", foundBy: "name" });
    const other = [beside("mdt", { ...metres, standard_name: "x" }), beside("err_mdt", metres)];
    expect(await errorIn(other)).toBeNull();
  });

  it("only as a length on the height's grid", async () => {
    expect(await errorIn([beside("err_adt", { units: "m2" })])).toBeNull();
    expect(await errorIn([beside("err_adt", { units: "%" })])).toBeNull();
    expect(await errorIn([beside("err_adt", metres, new Int16Array(6), ["time", "latitude"])])).toBeNull();
    expect(await errorIn([])).toBeNull();
  });
});

async function planesOf(grid: GridIndex): Promise<Map<number, Float64Array>> {
  const found = new Map<number, Float64Array>();
  const { time, latitude, longitude } = grid;
  await readHeights(
    grid,
    {
      time: [0, time.values.length],
      latitude: [0, latitude.values.length],
      longitude: [[0, longitude.values.length]],
    },
    (timeIndex, plane) => found.set(timeIndex, plane.slice()),
  );
  return found;
}

const speed = { siPerUnit: metresPerSecond, what: "a velocity in m s-1" };

describe("another variable of indexed files", () => {
  it("is read in SI units by each file's own packing and order, rows northward", async () => {
    const paths = [
      writeGrid(nextPath(), {
        times: [29700],
        latitudes: [22, 21, 20],
        more: [
          beside(
            "u",
            { units: "cm/s", scale_factor: Float64Array.of(0.5) },
            Int16Array.from({ length: 12 }, (_, i) => i),
          ),
        ],
      }),
      writeGrid(nextPath(), {
        times: [29701],
        more: [
          beside(
            "u",
            { units: "m s-1", _FillValue: Int16Array.of(7) },
            Int16Array.from({ length: 12 }, (_, i) => i),
            ["longitude", "latitude", "time"],
          ),
        ],
      }),
    ];
    const planes = await planesOf(await indexVariable(await index(paths), "u", speed));
    expect([...(planes.get(0) ?? [])].map((value) => Math.round(value * 1000))).toEqual([
      40, 45, 50, 55, 20, 25, 30, 35, 0, 5, 10, 15,
    ]);
    expect([...(planes.get(1) ?? [])]).toEqual([0, 3, 6, 9, 1, 4, Number.NaN, 10, 2, 5, 8, 11]);
  });

  it("without time is the same on every date", async () => {
    const error = beside(
      "err",
      { units: "cm" },
      Float32Array.from({ length: 12 }, (_, i) => i),
      ["latitude", "longitude"],
    );
    const joined = await index([writeGrid(nextPath(), { more: [error] })]);
    const planes = await planesOf(await indexVariable(joined, "err", { siPerUnit: metresPerUnit, what: "a length" }));
    expect(planes.size).toBe(2);
    expect(planes.get(1)).toEqual(planes.get(0));
    expect(planes.get(1)?.[11]).toBeCloseTo(0.11, 12);
  });

  it("is refused where a file lacks it, has it off the grid or in another unit, naming the file", async () => {
    const [with_, without] = [
      writeGrid(nextPath(), { more: [beside("u", {})] }),
      writeGrid(nextPath(), { times: [29702] }),
    ];
    const both = await index([with_, without]);
    expect((await faultOf(() => indexVariable(both, "u", speed))).message).toBe(
      `${without}: expected a variable u as in the other files, got none; leave the file out, or do without the variable`,
    );
    const off = await index([
      writeGrid(nextPath(), { more: [beside("u", {}, new Int16Array(6), ["time", "latitude"])] }),
    ]);
    expect((await faultOf(() => indexVariable(off, "u", speed))).message).toMatch(
      /: u: expected the latitudes and longitudes of adt, got dimensions time, latitude/,
    );
    const knots = await index([writeGrid(nextPath(), { more: [beside("u", { units: "knots" })] })]);
    expect((await faultOf(() => indexVariable(knots, "u", speed))).message).toMatch(
      /a velocity in m s-1, got units "knots"/,
    );
  });
});

it("velocities packed in a file beside packed heights are recognised as the convention they were made by", async () => {
  const latitudes = Array.from({ length: 20 }, (_, i) => 25 + i / 2);
  const longitudes = Array.from({ length: 22 }, (_, i) => 200 + i / 2);
  const value = (day: number, y: number, x: number) => 0.3 * Math.sin(1.9 * x + day) * Math.cos(1.6 * y);
  const recipe = { latitudes, longitudes, value, scale: 1e-4 };
  const plain = await index([writeGrid(nextPath(), recipe)]);
  const settings = { omega: 7.292115e-5, equatorDegrees: 5 };
  const made = { stencil: 5, earth: "sphere", radius: 6371000, gravity: 9.80665 } as const;
  const geometry = gridGeometry(plain, { ...settings, ...made }, "test");
  const velocities = [...(await planesOf(plain)).values()].map((height) => geostrophicVelocity(height, geometry));
  const stored = (name: "u" | "v") =>
    Int32Array.from(
      velocities.flatMap((each) => [...each[name]]),
      (metres) => Math.round(metres * 1e6),
    );
  const micro = { scale_factor: Float64Array.of(1e-6) };
  const more = [
    beside("ugos", { ...micro, standard_name: absolute("eastward") }, stored("u")),
    beside("vgos", { ...micro, standard_name: absolute("northward") }, stored("v")),
  ];
  const joined = await index([writeGrid(nextPath(), { ...recipe, more })]);
  const found = await besideHeights(joined, recogniseVelocity);
  const heights = await planesOf(joined);
  const u = await planesOf(await indexVariable(joined, found?.eastward ?? "", speed));
  const v = await planesOf(await indexVariable(joined, found?.northward ?? "", speed));
  const samples = [...heights].map(([date, height]) => ({
    height,
    supplied: { u: u.get(date) ?? new Float64Array(0), v: v.get(date) ?? new Float64Array(0) },
  }));
  const [best] = compareConventions(samples, joined, settings);
  expect(best.convention).toEqual(made);
  expect(best.rmsDifference).toBeLessThan(1e-6);
});
