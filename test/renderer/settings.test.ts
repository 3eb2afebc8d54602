import { describe, expect, test } from "vitest";
import { quantities } from "../../core/ocean/quantities/index";
import { studySchema } from "../../core/study/schema";
import { groupQuantities, quantityGroups } from "../../renderer/views/latitudes/quantity-groups";
import {
  backgroundSummary,
  currentsSummary,
  errorSummary,
  filterSummary,
  spaceSummary,
} from "../../renderer/views/latitudes/settings/summaries";

function study(parts: object) {
  return studySchema.parse({ strake: 1, grids: [{ id: "A", files: ["a.nc"] }], ...parts });
}

describe("the quantity menu", () => {
  test("offers every quantity once, under a heading of its own", () => {
    const offered = quantityGroups.flatMap(({ choices }) => choices.map(({ value }) => value));
    expect([...offered].sort()).toEqual(quantities.map(({ id }) => id).sort());
    expect(quantityGroups.every(({ choices }) => choices.length > 0)).toBe(true);
    expect(quantityGroups.map(({ heading }) => heading)).not.toContain("Further");
  });

  test("a quantity that no heading names stands under the last", () => {
    const groups = groupQuantities([
      { id: "u", title: "Eastward velocity" },
      { id: "new-one", title: "New one" },
    ]);
    expect(groups.map(({ heading }) => heading)).toEqual(["Currents", "Further"]);
    expect(groups[1].choices).toEqual([{ value: "new-one", title: "New one" }]);
  });
});

describe("settings in a line", () => {
  test("a filter with its edges, open sides and order", () => {
    const line = (band: object) => filterSummary(study({ band }));
    expect(line({ shortestDays: 90, longestDays: 540 })).toBe("Lanczos, 90–540 days");
    expect(line({ filter: "butterworth", order: 3, shortestDays: 90, longestDays: null })).toBe(
      "Butterworth of order 3, over 90 days",
    );
    expect(line({ filter: "running-mean", shortestDays: null, longestDays: 365.25 })).toBe(
      "running mean, under 365.3 days",
    );
    expect(line({ filter: "none" })).toBe("none: all periods");
  });

  test("what is taken off, or that nothing is", () => {
    const nothing = { mean: false, trend: false, annual: false, semiannual: false };
    expect(backgroundSummary(study({ background: nothing }))).toBe("nothing");
    const space = { removeZonalMean: true, removeSurface: { zonalKm: 900, meridionalKm: 500 } };
    expect(backgroundSummary(study({ background: { ...nothing, mean: true }, space }))).toBe(
      "mean, zonal mean, large-scale surface",
    );
  });

  test("wavelengths kept; a band open on both sides keeps all", () => {
    expect(spaceSummary(study({}))).toBe("all wavelengths");
    expect(spaceSummary(study({ space: { zonal: {} } }))).toBe("all wavelengths");
    expect(
      spaceSummary(study({ space: { meridional: { shortestKm: 100, longestKm: 500 }, zonal: { longestKm: 800 } } })),
    ).toBe("along meridians 100–500 km, along parallels under 800 km");
  });

  test("currents and errors", () => {
    expect(currentsSummary(study({ geostrophy: { stencil: 3, earth: "sphere", gravity: 9.81 } }))).toBe(
      "3 points, sphere, gravity 9.81, blank to 5°",
    );
    expect(currentsSummary(study({ geostrophy: { equator: "blend" } }))).toBe("7 points, ellipsoid, equator blended");
    expect(errorSummary(study({}))).toBe("none given");
    expect(errorSummary(study({ errors: { heightMetres: 0.02, correlationKm: 100 } }))).toBe("2 cm, alike over 100 km");
    expect(errorSummary(study({ errors: { heightMetres: "file" } }))).toBe("from the file");
  });
});
