import { describe, expect, test } from "vitest";
import { themes } from "../../../../core/figure/colour/theme";
import type { LatitudesInput } from "../../../../core/figure/latitudes/input";
import { latitudesScene } from "../../../../core/figure/latitudes-figure";
import { pixelX, pixelY } from "../../../../core/figure/panel";
import { errorSourceText } from "../../../../core/figure/record-text";
import type { PanelFrame, PathMark, Scene } from "../../../../core/figure/scene";
import { sceneToSvg } from "../../../../core/figure/scene-to-svg";
import { textWidth } from "../../../../core/figure/text-width";
import { madeUpInput, withDoubts } from "./made-up-record";

const wide = { width: 1440, height: 900 };
const plain = madeUpInput();
const doubted = withDoubts(plain);
const scene = latitudesScene(doubted, wide);

function path(id: string, of: Scene = scene): PathMark | undefined {
  return of.marks.find((mark): mark is PathMark => mark.kind === "path" && mark.id === id);
}

function panel(id: string): PanelFrame {
  const found = scene.panels.find((candidate) => candidate.id === id);
  if (!found) throw new Error(`no panel ${id}`);
  return found;
}

function texts(of: Scene): string[] {
  return of.marks.flatMap((mark) => (mark.kind === "text" ? [mark.text] : []));
}

function withBand(band: Partial<LatitudesInput["band"]>, inBand = true): Scene {
  const result = { ...doubted.result, choice: { inBand } };
  return latitudesScene({ ...doubted, result, band: { ...doubted.band, ...band } }, wide);
}

describe("errors on the figure", () => {
  test("without errors there is no hatch, no band about the date's line and no note", () => {
    const bare = latitudesScene(plain, wide);
    for (const id of ["map-doubt", "zonal-mean-date-band", "map-blended"]) expect(path(id, bare)).toBeUndefined();
    expect(texts(bare).join()).not.toMatch(/hatched|blended/);
  });

  test("the hatch lies on the map, under its frame, and the notes say what it means", () => {
    expect(path("map-doubt")?.clip).toBe("map");
    const ids = scene.marks.map(({ id }) => id);
    expect(ids.indexOf("map-doubt")).toBeGreaterThan(ids.indexOf("map-raster"));
    expect(ids.indexOf("map-doubt")).toBeLessThan(ids.indexOf("map-frame"));
    expect(texts(scene)).toContain("hatched: below 1.96 standard errors of a 2 cm height error");
    expect(scene.description).toContain("Hatched: below 1.96 standard errors of a 2 cm height error.");
  });

  test("the hatch adds less than 100 kB to the file", () => {
    expect(sceneToSvg(scene).length - sceneToSvg(latitudesScene(plain, wide)).length).toBeLessThan(100_000);
  });

  test("errors larger than every value hatch all values, errors of zero none", () => {
    const all = (error: number) => {
      const { map, onDate } = doubted.result;
      const values = new Float32Array(map.values.length).fill(error);
      const result = { ...doubted.result, error: { map: { ...map, values }, onDate } };
      return path("map-doubt", latitudesScene({ ...doubted, result }, wide))?.d ?? "";
    };
    expect(all(0)).toBe("");
    const length = (d: string) =>
      [...d.matchAll(/l-[\d.]+ ([\d.]+)/g)].reduce((sum, [, part]) => sum + Number(part), 0);
    expect(length(all(1))).toBeGreaterThan(length(all(0.02)));
    expect(length(all(0.02))).toBeGreaterThan(length(all(0.01)));
  });

  test("the band about the date's line is 1.96 standard errors to either side, in the tint of what is held", () => {
    const band = path("zonal-mean-date-band");
    expect(band?.fill).toBe(themes.paper.amberTint);
    const frame = panel("zonal-mean");
    const [x] = (band?.d ?? "").slice(1).split(" ").map(Number);
    // Path data are rounded to hundredths of a pixel.
    expect(Math.abs(x - pixelX(frame, doubted.result.onDate[0] - 1.96 * 0.002))).toBeLessThan(0.011);
  });
});

describe("the blend across the equator", () => {
  test("a bracket spans each run of blended rows, from the outer edges of their cells", () => {
    const [low, high] = (path("map-blended")?.d ?? "").split("M").filter((_, part) => part === 1 || part === 4);
    const frame = panel("map");
    const { values } = doubted.record.latitude;
    const half = (values[1] - values[0]) / 2;
    const ys = (part: string) => [...part.matchAll(/ (-?[\d.]+)/g)].map(([, y]) => Number(y));
    for (const [part, first, last] of [
      [low, 0, 4],
      [high, 11, 13],
    ] as const) {
      const [south, north] = ys(part);
      expect(Math.abs(south - pixelY(frame, values[first] - half))).toBeLessThan(0.011);
      expect(Math.abs(north - pixelY(frame, values[last] + half))).toBeLessThan(0.011);
    }
    expect(texts(scene)).toContain("rows with a bracket: blended across the equator");
  });
});

describe("gaps and filters", () => {
  test("a gap that the filter bridges is drawn lower than one it does not", () => {
    const heights = (id: string, of: Scene) =>
      [...(path(id, of)?.d ?? "").matchAll(/M-?[\d.]+ (-?[\d.]+)H-?[\d.]+V(-?[\d.]+)/g)].map(
        ([, top, bottom]) => Number(bottom) - Number(top),
      );
    const strip = panel("days").height;
    // The made-up record misses 3, 8 and 1 dates of three days: 9 and 3 days are bridged, 24 are not.
    expect(heights("days-bridged", scene)).toHaveLength(2);
    expect(heights("days-gaps", scene)).toEqual([strip]);
    for (const height of heights("days-bridged", scene)) expect(height).toBeLessThan(0.5 * strip);
  });

  test("nothing is bridged where the values shown went through no filter", () => {
    for (const of of [withBand({ filter: "none" }), withBand({}, false), withBand({ bridgeDays: 0 })]) {
      expect(path("days-bridged", of)?.d).toBe("");
    }
  });

  test("the note on the ends names the filter", () => {
    for (const [filter, words] of [
      ["lanczos", "the Lanczos filter weakens"],
      ["butterworth", "the Butterworth filter of order 4 weakens"],
      ["running-mean", "the running mean weakens"],
    ] as const) {
      expect(texts(withBand({ filter })).join()).toContain(words);
    }
  });

  test("a record too short for a spectrum says so where the curve would be", () => {
    const note = "Fewer than 16 dates: no spectrum.";
    const of = latitudesScene({ ...plain, spectrum: undefined, spectrumNote: note }, wide);
    const mark = of.marks.find(({ id }) => id === "spectrum-note");
    const frame = panel("spectrum");
    if (mark?.kind !== "text") throw new Error("no note");
    expect(mark.text).toBe(note);
    const half = textWidth(mark.text, mark.size, 400) / 2;
    // Clear of the lines at the band's edges and of the frame.
    for (const x of [frame.x, pixelX(frame, 540), pixelX(frame, 90), frame.x + frame.width]) {
      expect(Math.abs(x - mark.x)).toBeGreaterThan(half);
    }
    expect(latitudesScene({ ...plain, spectrumNote: note }, wide).marks.some(({ id }) => id === "spectrum-note")).toBe(
      false,
    );
  });
});

describe("where errors come from", () => {
  test("in words, with the distance over which they are alike", () => {
    expect(errorSourceText({ heightMetres: 0.02, correlationKm: 0 })).toBe("a 2 cm height error");
    expect(errorSourceText({ heightMetres: 0.015, correlationKm: 120 })).toBe(
      "a 1.5 cm height error alike over 120 km",
    );
    expect(errorSourceText({ heightMetres: "file", correlationKm: 0 })).toBe("the file’s own height error");
    expect(errorSourceText({ heightMetres: null, correlationKm: 0 })).toBe("no height error");
  });
});
