import { describe, expect, test } from "vitest";
import { bytesFromHex } from "../../../../core/figure/colour/hex";
import { themes } from "../../../../core/figure/colour/theme";
import type { LatitudesInput } from "../../../../core/figure/latitudes/input";
import { latitudesScene } from "../../../../core/figure/latitudes-figure";
import { pixelX, pixelY } from "../../../../core/figure/panel";
import type { PanelFrame, PathMark, RasterMark, Scene } from "../../../../core/figure/scene";
import { makeAxis } from "../../../../core/model/axis";
import { madeUpInput } from "./made-up-record";

const wide = { width: 1440, height: 900 };
const input = madeUpInput();
const scene = latitudesScene(input, wide);

function panel(id: string, of: Scene = scene): PanelFrame {
  const found = of.panels.find((candidate) => candidate.id === id);
  if (!found) throw new Error(`no panel ${id}`);
  return found;
}

function raster(id: string, of: Scene = scene): RasterMark {
  const found = of.marks.find((mark): mark is RasterMark => mark.kind === "raster" && mark.id === id);
  if (!found) throw new Error(`no raster ${id}`);
  return found;
}

function path(id: string, of: Scene = scene): PathMark {
  const found = of.marks.find((mark): mark is PathMark => mark.kind === "path" && mark.id === id);
  if (!found) throw new Error(`no path ${id}`);
  return found;
}

function texts(of: Scene = scene): string[] {
  return of.marks.flatMap((mark) => (mark.kind === "text" ? [mark.text] : []));
}

function pixelAt(mark: RasterMark, column: number, row: number): number[] {
  const start = 4 * (row * mark.columns + column);
  return [...mark.pixels.subarray(start, start + 4)];
}

const opaque = (hex: string) => [...bytesFromHex(hex), 255];

/** First number pairs of a path that consists of M and L only. */
function vertices(d: string): [number, number][] {
  return [...d.matchAll(/(-?[\d.]+) (-?[\d.]+)/g)].map((match) => [Number(match[1]), Number(match[2])]);
}

function changed(result: Partial<LatitudesInput["result"]>, rest: Partial<LatitudesInput> = {}): LatitudesInput {
  return { ...input, ...rest, result: { ...input.result, ...result } };
}

describe("one latitude axis", () => {
  test("the three panels share top, height and latitude scale exactly", () => {
    const [map, mean, time] = ["map", "zonal-mean", "latitude-time"].map((id) => panel(id));
    for (const other of [mean, time]) {
      expect([other.y, other.height, other.vertical]).toEqual([map.y, map.height, map.vertical]);
    }
    expect(raster("latitude-time-raster").rows).toBe(raster("map-raster").rows);
  });

  test("the frame covers half a cell beyond the end centres, north at the top", () => {
    const { latitude, longitude } = input.record;
    const last = latitude.values.length - 1;
    const half = (latitude.values[1] - latitude.values[0]) / 2;
    expect(panel("map").vertical.from).toBeCloseTo(latitude.values[last] + half, 9);
    expect(panel("map").vertical.to).toBeCloseTo(latitude.values[0] - half, 9);
    expect(panel("map").horizontal.from).toBeCloseTo(longitude.values[0] - 0.125, 9);
  });

  test("the mean line passes each latitude at the middle of its raster row", () => {
    const points = vertices(path("zonal-mean-line").d);
    const { height, y } = panel("map");
    const rows = raster("map-raster").rows;
    expect(points.length).toBe(rows);
    for (const [row, [, pointY]] of points.entries()) {
      // Path data are rounded to hundredths of a pixel.
      expect(Math.abs(pointY - (y + height - ((row + 0.5) * height) / rows))).toBeLessThan(0.011);
    }
  });

  test("the days strip and the latitude-time picture share their time scale and their sides", () => {
    const [days, time] = [panel("days"), panel("latitude-time")];
    expect([days.x, days.width, days.horizontal]).toEqual([time.x, time.width, time.horizontal]);
  });

  test("frames lie on whole pixels", () => {
    for (const { x, y, width, height } of scene.panels) {
      expect([x, y, width, height].every(Number.isInteger)).toBe(true);
    }
  });
});

describe("map", () => {
  const picture = raster("map-raster");

  test("there is one pixel a cell, so nothing is mixed", () => {
    expect([picture.columns, picture.rows]).toEqual([100, 84]);
  });

  test("land, cells missing on this date and values are told apart cell by cell", () => {
    const { ocean } = input.record;
    const { paper } = themes;
    const { values, columns, rows } = input.result.map;
    for (let row = 0; row < rows; row++) {
      for (let column = 0; column < columns; column++) {
        const cell = row * columns + column;
        const got = pixelAt(picture, column, rows - 1 - row);
        const isLand = ocean[cell] === 0;
        const isMissing = !isLand && Number.isNaN(values[cell]);
        expect(got.join() === opaque(paper.land).join()).toBe(isLand);
        expect(got.join() === opaque(paper.missing).join()).toBe(isMissing);
      }
    }
  });

  test("uneven latitudes are looked up by the nearest cell of every pixel row", () => {
    const rows = 84;
    const values = Float64Array.from({ length: rows }, (_, row) => 20 + 10 * (row / rows) + 11 * (row / rows) ** 2);
    const uneven = { ...input, record: { ...input.record, latitude: makeAxis("latitude", values, "made up") } };
    const drawn = latitudesScene(uneven, wide);
    const rasterMark = raster("map-raster", drawn);
    const frame = panel("map", drawn);
    expect(rasterMark.rows).toBeGreaterThanOrEqual(frame.height);
    const even = raster("map-raster");
    for (const row of [0, 30, 83]) {
      const share = (pixelY(frame, values[row]) - frame.y) / frame.height;
      const got = pixelAt(rasterMark, 10, Math.floor(share * rasterMark.rows));
      expect(got).toEqual(pixelAt(even, 10, rows - 1 - row));
    }
  });
});

describe("latitude-time picture", () => {
  test("dates without data are exactly the missing colour, their neighbours are not", () => {
    const picture = raster("latitude-time-raster");
    for (const [column, isBlank] of [
      [60, false],
      [61, true],
      [63, true],
      [64, false],
      [255, true],
    ] as const) {
      for (const row of [0, 40, 83]) {
        expect(pixelAt(picture, column, row).join() === opaque(themes.paper.missing).join()).toBe(isBlank);
      }
    }
  });

  test("columns left out of the picture for more than 1.5 steps leave a blank, not a stretched neighbour", () => {
    const kept = Int32Array.from([...Array(100).keys(), ...Array.from({ length: 100 }, (_, index) => 200 + index)]);
    const { rows, columns, values } = input.result.latitudeTime;
    const cut = new Float32Array(rows * kept.length);
    for (let row = 0; row < rows; row++) {
      for (const [index, date] of kept.entries()) cut[row * kept.length + index] = values[row * columns + date];
    }
    const drawn = latitudesScene(
      changed({ latitudeTime: { rows, columns: kept.length, values: cut }, columnDates: kept }),
      wide,
    );
    const picture = raster("latitude-time-raster", drawn);
    const frame = panel("latitude-time", drawn);
    const at = (date: number) => {
      const share = (pixelX(frame, input.record.time.values[date]) - frame.x) / frame.width;
      return pixelAt(picture, Math.floor(share * picture.columns), 20);
    };
    for (const date of [101, 150, 198]) expect(at(date)).toEqual(opaque(themes.paper.missing));
    for (const date of [99, 200]) expect(at(date)).toEqual(pixelAt(raster("latitude-time-raster"), date, 20));
  });

  test("the date of the map is marked in amber here and over the days", () => {
    const x = pixelX(panel("latitude-time"), input.record.time.values[input.result.dateIndex]);
    for (const id of ["latitude-time-date", "days-date"]) {
      expect(path(id).stroke).toBe(themes.paper.amber);
      expect(vertices(path(id).d)[0][0]).toBeCloseTo(x, 1);
    }
  });
});

describe("zonal mean", () => {
  test("a latitude without a mean breaks the line and its band", () => {
    const mean = Float64Array.from(input.result.profile.mean);
    mean[40] = Number.NaN;
    const drawn = latitudesScene(changed({ profile: { mean, half95: input.result.profile.half95 } }), wide);
    for (const id of ["zonal-mean-line", "zonal-mean-band"]) {
      expect(path(id, drawn).d.split("M").length - 1).toBe(2);
      expect(path(id).d.split("M").length - 1).toBe(1);
    }
  });

  test("the band lies half95 on either side of the mean", () => {
    const frame = panel("zonal-mean");
    const [lower] = vertices(path("zonal-mean-band").d);
    const { mean, half95 } = input.result.profile;
    expect(Math.abs(lower[0] - pixelX(frame, mean[0] - half95[0]))).toBeLessThan(0.011);
  });

  test("a signed quantity has zero in the middle, a magnitude at the left edge", () => {
    const frame = panel("zonal-mean");
    expect(pixelX(frame, 0)).toBeCloseTo(frame.x + frame.width / 2, 9);
    const speed = changed({}, { quantity: { title: "Speed", units: "m s-1", signed: false } });
    const other = panel("zonal-mean", latitudesScene(speed, wide));
    expect(pixelX(other, 0)).toBe(other.x);
  });
});

describe("periods and days", () => {
  test("the band's edges stand at its two periods, long to the left", () => {
    const frame = panel("spectrum");
    expect(frame.horizontal.from).toBeGreaterThan(frame.horizontal.to);
    const [longest, , shortest] = vertices(path("spectrum-edges").d);
    expect(longest[0]).toBeCloseTo(pixelX(frame, 540), 1);
    expect(shortest[0]).toBeCloseTo(pixelX(frame, 90), 1);
    expect(texts()).toEqual(expect.arrayContaining(["540 d", "90 d"]));
  });

  test("the curve is frequency times density, so that equal areas are equal variances", () => {
    const frame = panel("spectrum");
    const { frequency, density } = input.spectrum ?? { frequency: [], density: [] };
    const points = vertices(path("spectrum-line").d);
    for (const index of [3, 20, 100]) {
      expect(Math.abs(points[index][0] - pixelX(frame, 1 / frequency[index]))).toBeLessThan(0.011);
      expect(Math.abs(points[index][1] - pixelY(frame, frequency[index] * density[index]))).toBeLessThan(0.011);
    }
  });

  test("edges that run ahead of the result move alone: words and response stay those of the result", () => {
    const ahead = latitudesScene(
      { ...input, heldBand: { shortestDays: 259, longestDays: 540, filter: "lanczos" } },
      wide,
    );
    const said = (of: Scene) => texts(of).filter((text) => /periods|weakens/.test(text));
    expect(said(ahead)).toEqual(said(scene));
    expect(ahead.description).toBe(scene.description);
    expect(path("spectrum-response", ahead)).toEqual(path("spectrum-response"));
    expect(path("spectrum-edges", ahead).d).not.toBe(path("spectrum-edges").d);
    expect(texts(ahead)).toContain("259 d");
  });

  test("without a filter there is no band, no edge and no response", () => {
    const plain = changed({}, { band: { shortestDays: 90, longestDays: 540, filter: "none" } });
    const ids = latitudesScene(plain, wide).marks.map((mark) => mark.id);
    expect(ids).not.toContain("spectrum-band");
    expect(ids).not.toContain("spectrum-edges");
    expect(ids).not.toContain("spectrum-response");
  });

  test("a lone missing date is still two pixels wide in a strip of thirty years", () => {
    const long = madeUpInput({ dates: 10950, rows: 12, columns: 12 });
    const drawn = latitudesScene(long, { width: 640, height: 480 });
    const rectangles = path("days-gaps", drawn).d.split("M").slice(1);
    for (const rectangle of rectangles) {
      const [left, right] = [...rectangle.matchAll(/^(-?[\d.]+)|H(-?[\d.]+)/g)].map((match) =>
        Number(match[1] ?? match[2]),
      );
      expect(right - left).toBeGreaterThanOrEqual(1.99);
    }
    expect(rectangles.length).toBe(3);
  });
});

describe("words", () => {
  test("headings, units and limits are on the figure", () => {
    expect(texts()).toEqual(
      expect.arrayContaining([
        "Eastward velocity, 24 May 2032",
        "cm s⁻¹, periods 90–540 days",
        "Zonal mean",
        "Zonal mean through time",
        "Which periods to keep",
        "Days with data",
        "\u221211.8",
        "11.8",
        "Grid A · 0.25° · 3 d · 20–41° N, 150–125° W",
      ]),
    );
  });

  test("negative numbers never carry a hyphen", () => {
    for (const text of texts()) expect(text).not.toMatch(/(^|[\s–(])-\d/);
  });

  test("values that no filter touched are called all periods", () => {
    expect(texts(latitudesScene(madeUpInput({ inBand: false }), wide))).toContain("cm s⁻¹, all periods");
  });

  test("the description names quantity, place, dates and limits for those who cannot see it", () => {
    for (const part of ["Eastward velocity, 24 May 2032", "20–41° N", "1 March 2031", "\u221211.8 to 11.8 cm s⁻¹"]) {
      expect(scene.description).toContain(part);
    }
  });
});
