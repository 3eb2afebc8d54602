import { describe, expect, test } from "vitest";
import { bytesFromHex } from "../../../../core/figure/colour/hex";
import { paper } from "../../../../core/figure/colour/theme";
import { pixelX, pixelY } from "../../../../core/figure/panel";
import { printSize } from "../../../../core/figure/print-size";
import { scalesScene } from "../../../../core/figure/scales-figure";
import type { PanelFrame, PathMark, RasterMark, Scene, TextMark } from "../../../../core/figure/scene";
import { textWidth } from "../../../../core/figure/text-width";
import { bareScales, madeInput, madeLongitude, madeScales, reasons } from "./made-scales";

const size = { width: 1440, height: 780 };
const made = madeScales();
const scene = scalesScene(madeInput(made), size);

function panel(id: string, of: Scene = scene): PanelFrame {
  const found = of.panels.find((candidate) => candidate.id === id);
  if (!found) throw new Error(`no panel ${id}`);
  return found;
}

function path(id: string, of: Scene = scene): PathMark {
  const found = of.marks.find((mark): mark is PathMark => mark.kind === "path" && mark.id === id);
  if (!found) throw new Error(`no path ${id}`);
  return found;
}

function text(id: string, of: Scene = scene): TextMark {
  const found = of.marks.find((mark): mark is TextMark => mark.kind === "text" && mark.id === id);
  if (!found) throw new Error(`no text ${id}`);
  return found;
}

function raster(id: string, of: Scene = scene): RasterMark {
  const found = of.marks.find((mark): mark is RasterMark => mark.kind === "raster" && mark.id === id);
  if (!found) throw new Error(`no raster ${id}`);
  return found;
}

function points(mark: PathMark): [number, number][] {
  return [...mark.d.matchAll(/([-\d.]+) ([-\d.]+)/g)].map(([, x, y]) => [Number(x), Number(y)]);
}

/** Colour of the raster's cell under a place of its panel, as "r,g,b". */
function colourAt(id: string, across: number, up: number, of: Scene = scene): number[] {
  const { x, y, width, height, columns, rows, pixels } = raster(`${id}-raster`, of);
  const column = Math.floor(((pixelX(panel(id, of), across) - x) / width) * columns);
  const row = Math.floor(((pixelY(panel(id, of), up) - y) / height) * rows);
  return [...pixels.subarray(4 * (row * columns + column), 4 * (row * columns + column) + 3)];
}

describe("kinetic energy by wavenumber", () => {
  test("one pixel is as many cycles a metre across as up", () => {
    const { width, height, horizontal, vertical } = panel("energy");
    expect((horizontal.to - horizontal.from) / width).toBeCloseTo((vertical.from - vertical.to) / height, 15);
  });

  test("the boundary lies whole inside the frame and is mirrored to both sides", () => {
    const { x, y, width, height } = panel("energy");
    const drawn = points(path("energy-boundary"));
    const middle = x + width / 2;
    for (const [px, py] of drawn) {
      expect(px > x && px < x + width && py > y && py < y + height).toBe(true);
      // Path data are rounded to hundredths of a pixel.
      expect(drawn.some(([qx, qy]) => Math.abs(qx - (2 * middle - px)) < 0.03 && Math.abs(qy - py) < 0.03)).toBe(true);
    }
  });

  test("the share inside is told in words", () => {
    expect(text("energy-subheading").text).toContain("31 % inside");
  });

  test("the most energetic cell takes the map's last colour", () => {
    expect(colourAt("energy", 0, 0)).toEqual([...paper.sequential.table.subarray(-4, -1)]);
  });
});

describe("lengths", () => {
  test("dashed lines stand at the peak, the jet spacing and the Rhines wavelength", () => {
    const wanted = { peak: 480_000, spacing: 464_000, rhines: made.lengths.rhines["root-wavelength"].eddy };
    for (const [id, wavelength] of Object.entries(wanted)) {
      expect(points(path(`wavelengths-${id}`))[0][0]).toBeCloseTo(pixelX(panel("wavelengths"), wavelength), 1);
      expect(path(`wavelengths-${id}`).dash).toBeDefined();
    }
  });

  test("bars of the ruler are in proportion, whiskers reach the limits", () => {
    const length = (id: string): number => {
      const [start, end] = [.../M([-\d.]+) [-\d.]+H([-\d.]+)/.exec(path(`ruler-${id}-bar`).d)!.slice(1)].map(Number);
      return end - start;
    };
    expect(length("spacing") / length("deformation")).toBeCloseTo(232 / 113, 2);
    const xs = points(path("ruler-peak-limits")).map(([x]) => x);
    const barStart = Number(/M([-\d.]+)/.exec(path("ruler-peak-bar").d)?.[1]);
    expect((Math.max(...xs) - barStart) / length("peak")).toBeCloseTo(252 / 240, 2);
    expect((Math.min(...xs) - barStart) / length("peak")).toBeCloseTo(228 / 240, 2);
  });

  test("every length of the ruler that is drawn tells its number and its limits", () => {
    expect(text("ruler-peak-value").text).toBe("240 ± 12 km");
    expect(text("ruler-spacing-value").text).toBe("232 km");
  });
});

describe("waves and drift", () => {
  test("time runs up along a latitude: a westward pattern and its line lean to the left", () => {
    const [[x1, y1], [x2, y2]] = points(path("drift-along-line"));
    expect((x2 - x1) * (y2 - y1)).toBeGreaterThan(0);
    const { horizontal, vertical, width, height } = panel("drift-along");
    const degreesPerPixel = (horizontal.to - horizontal.from) / width;
    const daysPerPixel = (vertical.from - vertical.to) / height;
    const metresPerDegree = 111_195 * Math.cos((made.alongLatitude * Math.PI) / 180);
    const speed = (((x2 - x1) * degreesPerPixel * metresPerDegree) / ((y1 - y2) * daysPerPixel)) * (1 / 86_400);
    // Path data are rounded to hundredths of a pixel, of some hundred.
    expect(speed).toBeCloseTo(-0.024, 4);
  });

  test("the line of the drift follows the crests of a pattern that moves with it", () => {
    const { position, days, picture } = made.drift.alongLatitude!;
    const perDay = (-0.024 * 86_400) / 23_900;
    const start = picture.values[60 * picture.columns];
    for (const date of [20, 60]) {
      const row = Math.round(60 + perDay * (days[date] - days[0]));
      if (row < 0) continue;
      // Half a cell of a pattern 400 km long is 19 % of its amplitude.
      expect(Math.abs(picture.values[row * picture.columns + date] - start)).toBeLessThan(0.012);
      expect(colourAt("drift-along", position[row], days[date])[0]).toBeGreaterThan(0);
    }
  });

  test("speed and limits stand in the picture, the long Rossby wave above it", () => {
    expect(text("drift-along-speed").text).toBe("−2.4 ± 0.3 cm s⁻¹");
    expect(text("drift-along-subheading").text).toContain("long Rossby wave −2.6 cm s⁻¹");
  });

  test("a date that is missing stays in the missing colour", () => {
    const drift = made.drift.acrossLatitudes!;
    const values = drift.picture.values.slice();
    for (let row = 0; row < drift.picture.rows; row++) values[row * drift.picture.columns + 50] = Number.NaN;
    const gapped = {
      ...made,
      drift: { ...made.drift, acrossLatitudes: { ...drift, picture: { ...drift.picture, values } } },
    };
    const drawn = scalesScene(madeInput(gapped), size);
    const { columns, pixels } = raster("drift-across-raster", drawn);
    expect(columns).toBe(200);
    expect([...pixels.subarray(4 * 50, 4 * 50 + 3)]).toEqual([...bytesFromHex(paper.missing)]);
  });
});

describe("profiles", () => {
  test("share one latitude axis and one height", () => {
    const [first, ...others] = ["mean-flow", "push", "gradient"].map((id) => panel(id));
    for (const other of others) {
      expect(other.vertical).toEqual(first.vertical);
      expect([other.y, other.height]).toEqual([first.y, first.height]);
    }
  });

  test("eastward flow is rust and right of zero, westward teal and left of it", () => {
    const zero = pixelX(panel("mean-flow"), 0);
    expect(path("mean-flow-eastward").stroke).toBe(paper.rust);
    expect(path("mean-flow-westward").stroke).toBe(paper.teal);
    for (const [x] of points(path("mean-flow-eastward"))) expect(x).toBeGreaterThanOrEqual(zero - 0.01);
    for (const [x] of points(path("mean-flow-westward"))) expect(x).toBeLessThanOrEqual(zero + 0.01);
  });

  test("at least two labels stand under each, also where they are narrow and in print", () => {
    for (const narrow of [{ width: 720, height: 400, part: "forcing" } as const, printSize(174, 1.35)]) {
      const drawn = scalesScene(madeInput(), narrow);
      for (const id of ["mean-flow", "push", "gradient", "persistence", "longest-run"]) {
        expect(
          drawn.marks.filter((mark) => mark.kind === "text" && mark.id.startsWith(`${id}-x-`)).length,
        ).toBeGreaterThan(1);
      }
    }
  });

  test("sign changes of the gradient are marked at their latitudes", () => {
    const ys = points(path("gradient-changes")).map(([, y]) => y);
    expect([...new Set(ys)]).toHaveLength(2);
    expect(ys[0]).toBeCloseTo(pixelY(panel("gradient"), 23.4), 1);
  });

  test("a held latitude goes through every panel with a latitude axis", () => {
    const held = scalesScene(madeInput(made, { heldLatitude: 33.3 }), size);
    for (const id of ["mean-flow", "push", "gradient", "drift-across"]) {
      const line = path(`${id}-held`, held);
      expect(line.stroke).toBe(paper.amber);
      expect(points(line)[0][1]).toBeCloseTo(pixelY(panel(id, held), 33.3), 1);
    }
  });
});

describe("persistence", () => {
  const page = scalesScene(madeInput(made, { heldLatitude: 33.3 }), { ...size, part: "forcing" });
  const { share, byLatitude } = made.persistence;

  test("map and longest run share the profiles' latitude axis and frame height", () => {
    const first = panel("mean-flow", page);
    for (const other of [panel("persistence", page), panel("longest-run", page)]) {
      expect(other.vertical).toEqual(first.vertical);
      expect([other.y, other.height]).toEqual([first.y, first.height]);
    }
  });

  test("the held latitude goes through both", () => {
    for (const id of ["persistence", "longest-run"]) {
      expect(points(path(`${id}-held`, page))[0][1]).toBeCloseTo(pixelY(panel(id, page), 33.3), 1);
    }
  });

  test("colours run from a half to one, land is grey", () => {
    const table = paper.sequential.table;
    for (const [row, column] of [
      [10, 0],
      [5, 99],
      [40, 50],
    ]) {
      const value = share.values[row * share.columns + column];
      const entry = Math.min(table.length / 4 - 1, Math.floor(((value - 0.5) / 0.5) * (table.length / 4)));
      const colour = [...table.subarray(4 * entry, 4 * entry + 3)];
      expect(colourAt("persistence", madeLongitude[column], made.latitude[row], page)).toEqual(colour);
    }
    expect(colourAt("persistence", madeLongitude[95], made.latitude[80], page)).toEqual([...bytesFromHex(paper.land)]);
    expect([text("persistence-key-lower", page).text, text("persistence-key-upper", page).text]).toEqual(["0.5", "1"]);
  });

  test("whatever the width, heading or the line under it say what the colours mean, with a key", () => {
    for (const width of [720, 1100, 1440, 2200]) {
      const drawn = scalesScene(madeInput(), { width, height: 500, part: "forcing" });
      const words = `${text("persistence-heading", drawn).text} ${text("persistence-subheading", drawn).text}`;
      expect(words).toMatch(/share of dates with (the prevailing|one) sign/);
      expect(raster("persistence-key", drawn).columns).toBeGreaterThan(100);
    }
  });

  test("the longest run starts at zero and is drawn at each latitude", () => {
    const frame = panel("longest-run", page);
    expect(frame.horizontal.from).toBe(0);
    const drawn = points(path("longest-run-line", page));
    expect(drawn[12][0]).toBeCloseTo(pixelX(frame, byLatitude.longestDays[12]), 1);
    expect(drawn[12][1]).toBeCloseTo(pixelY(frame, made.latitude[12]), 1);
  });

  test("stands in print where five panels hold their headings, not where type would crowd them", () => {
    const ids = (widthMm: number) => scalesScene(madeInput(), printSize(widthMm, 1.35)).panels.map(({ id }) => id);
    expect(ids(174)).toEqual(expect.arrayContaining(["persistence", "longest-run"]));
    expect(ids(127)).not.toContain("persistence");
  });

  test("a record without values says so", () => {
    const bare = scalesScene(madeInput(bareScales()), { ...size, part: "forcing" });
    expect(text("persistence-missing-0", bare).text).toBe("No cell has values.");
    expect(text("fact-rows-persistence", bare).text).toBe("unknown");
  });
});

describe("words", () => {
  test.each([
    [[0.03, 0.05], "Eddies feed the jets"],
    [[-0.05, -0.03], "Eddies drain the jets"],
    [[-0.01, 0.03], "Push on the jets: not told from zero"],
  ])("limits of the push of %j read %s", ([low95, high95], label) => {
    const push = { ...made.forcing.push, perDay: { value: (low95 + high95) / 2, low95, high95 } };
    const drawn = scalesScene(madeInput({ ...made, forcing: { ...made.forcing, push } }), size);
    expect(text("facts-push-label", drawn).text).toBe(label);
  });

  test("the numbers of the forcing stand beside the profiles", () => {
    expect(text("facts-push").text).toBe("0.042 ± 0.011 per day, r 0.71");
    expect(text("facts-conversion").text).toBe("(3.1 ± 0.9) × 10⁻⁹ W kg⁻¹");
    expect(text("facts-sign-changes").text).toBe("at 23.4° N and 28.1° N");
    expect(text("facts-deformation-note").text).toBe("table, from memory, ±15 %");
  });

  test("the longest run tells its latitude, or on how many rows it is as long", () => {
    const { byLatitude } = made.persistence;
    const told = (longestDays: Float64Array) => {
      const persistence = { ...made.persistence, byLatitude: { ...byLatitude, longestDays } };
      const drawn = scalesScene(madeInput({ ...made, persistence }), { ...size, part: "forcing" });
      return text("fact-rows-persistence", drawn).text;
    };
    expect(told(byLatitude.longestDays.map((_, row) => (row === 19 ? 600 : 30)))).toBe("600 days at 24.9° N");
    expect(told(byLatitude.longestDays.map((_, row) => (row < 5 ? 900 : 30)))).toBe("900 days, on 5 of 84 rows");
  });

  test("what a record lacks is a sentence with its reason, not an empty frame", () => {
    const bare = scalesScene(madeInput(bareScales()), size);
    const lines = (id: string): string =>
      bare.marks
        .filter((mark): mark is TextMark => mark.kind === "text" && mark.id.startsWith(`${id}-missing-`))
        .map((mark) => mark.text)
        .join(" ");
    expect(lines("energy")).toBe(reasons.space);
    expect(lines("wavelengths")).toBe(reasons.space);
    expect(lines("period")).toBe(reasons.period);
    expect(lines("time-scales")).toBe(reasons.period);
    expect(lines("waves")).toBe(reasons.waves);
    expect(lines("drift-along")).toBe(reasons.along);
    expect(lines("drift-across")).toBe(reasons.across);
    for (const mark of bare.marks) {
      if (mark.kind !== "text" || !mark.id.includes("-missing-")) continue;
      expect(textWidth(mark.text, mark.size, mark.weight)).toBeLessThan(size.width / 4);
    }
  });

  test("who cannot see the figure is told its numbers", () => {
    expect(scene.description).toContain("480 ± 24 km");
    expect(scene.description).toContain("Eddies feed the jets: 0.042 ± 0.011 per day");
    expect(scene.description).toContain(made.notes[0]);
  });
});
