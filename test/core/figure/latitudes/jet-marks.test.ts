import { describe, expect, test } from "vitest";
import { themes } from "../../../../core/figure/colour/theme";
import type { LatitudesInput } from "../../../../core/figure/latitudes/input";
import { type JetLine, jetPlaceOn } from "../../../../core/figure/latitudes/jet-line";
import { mostLabelsBetween, spreadLabels } from "../../../../core/figure/latitudes/spread-labels";
import { latitudesScene } from "../../../../core/figure/latitudes-figure";
import { pixelX, pixelY } from "../../../../core/figure/panel";
import { printSize } from "../../../../core/figure/print-size";
import type { PathMark, Scene } from "../../../../core/figure/scene";
import { madeUpInput } from "./made-up-record";
import { overlaps, textBoxes } from "./text-boxes";

function madeJet(id: number, meanLatitude: number, dates: readonly number[]): JetLine {
  const latitudes = Float64Array.from(dates, (date) => meanLatitude + 0.3 * Math.sin(date / 20));
  return { id, sign: id % 2 === 1 ? 1 : -1, meanLatitude, dates: Int32Array.from(dates), latitudes };
}

function days(from: number, to: number): number[] {
  return Array.from({ length: to - from }, (_, i) => from + i);
}

const input = madeUpInput();
const jets = [madeJet(1, 38, [...days(0, 100), ...days(104, 300)]), madeJet(2, 31, days(20, 120))];
const wide = { width: 1440, height: 900 };

function drawn(change: Partial<LatitudesInput>, size: Parameters<typeof latitudesScene>[1] = wide): Scene {
  return latitudesScene({ ...input, ...change }, size);
}

function path(scene: Scene, id: string): PathMark {
  const mark = scene.marks.find((each) => each.id === id);
  if (mark?.kind !== "path") throw new Error(`no path ${id}`);
  return mark;
}

function panel(scene: Scene, id: string) {
  const frame = scene.panels.find((each) => each.id === id);
  if (!frame) throw new Error(`no panel ${id}`);
  return frame;
}

describe("spread labels", () => {
  test("stay where they are wanted while there is room", () => {
    expect(spreadLabels([10, 50, 30], 15, 0, 100)).toEqual([10, 50, 30]);
  });

  test("that want one place share it evenly, in order", () => {
    expect(spreadLabels([50, 50], 10, 0, 100)).toEqual([45, 55]);
    expect(spreadLabels([52, 48, 50], 10, 0, 100)).toEqual([60, 40, 50]);
  });

  test("keep apart and inside whatever is asked, and no farther off than need be", () => {
    for (let trial = 0; trial < 200; trial++) {
      const count = 1 + (trial % 9);
      const wanted = Array.from({ length: count }, (_, i) => 50 + 70 * Math.sin(trial * 7.3 + i * i * 1.7));
      const places = spreadLabels(wanted, 11, 0, 100);
      const sorted = [...places].sort((a, b) => a - b);
      expect(sorted[0]).toBeGreaterThanOrEqual(-1e-9);
      expect(sorted[count - 1]).toBeLessThanOrEqual(100 + 1e-9);
      for (let i = 1; i < count; i++) expect(sorted[i] - sorted[i - 1]).toBeGreaterThanOrEqual(11 - 1e-9);
      // The least-squares answer of a convex problem: no single label can move nearer to what it wants.
      for (const [i, place] of places.entries()) {
        const step = Math.sign(wanted[i] - place) * 1e-3;
        const moved = place + step;
        const blocked = places.some((other, j) => j !== i && Math.abs(other - moved) < 11 - 1e-9);
        if (Math.abs(wanted[i] - place) > 1e-2) expect(blocked || moved < 0 || moved > 100).toBe(true);
      }
    }
  });

  test("counts those that fit", () => {
    expect(mostLabelsBetween(10, 0, 100)).toBe(11);
    expect(mostLabelsBetween(10, 0, 99)).toBe(10);
    expect(mostLabelsBetween(10, 5, 0)).toBe(0);
  });
});

describe("where a jet lies on a date", () => {
  const jet: JetLine = {
    id: 1,
    sign: 1,
    meanLatitude: 30,
    dates: Int32Array.of(2, 3, 7),
    latitudes: Float64Array.of(29, 30, 32),
  };

  test("is where it was found, between the dates around, or its mean outside of its life", () => {
    expect(jetPlaceOn(jet, 3)).toEqual({ latitude: 30, found: true });
    expect(jetPlaceOn(jet, 5)).toEqual({ latitude: 31, found: false });
    expect(jetPlaceOn(jet, 0)).toEqual({ latitude: 30, found: false });
    expect(jetPlaceOn(jet, 8)).toEqual({ latitude: 30, found: false });
  });
});

describe("jets in the figure", () => {
  test("run where the record has them: solid eastward, dashed westward, broken where not found", () => {
    const scene = drawn({ jets });
    const frame = panel(scene, "latitude-time");
    const [eastward, westward] = [path(scene, "jet-1"), path(scene, "jet-2")];
    expect(eastward.dash).toBeUndefined();
    expect(westward.dash).toBeDefined();
    expect(eastward.d.match(/M/g)?.length).toBe(2);
    expect(westward.d.match(/M/g)?.length).toBe(1);
    const start = /^M([\d.]+) ([\d.]+)/.exec(westward.d);
    // Path data are rounded to hundredths of a pixel.
    expect(Number(start?.[1])).toBeCloseTo(pixelX(frame, input.record.time.values[20]), 1);
    expect(Number(start?.[2])).toBeCloseTo(pixelY(frame, jets[1].latitudes[0]), 1);
    expect(eastward.clip).toBe("latitude-time");
  });

  test("the lit one is heavier, backed with amber, and a line in the other panels at its latitude on the date", () => {
    const scene = drawn({ jets, selectedJet: 1 });
    expect(path(scene, "jet-1").strokeWidth).toBeGreaterThan(path(scene, "jet-2").strokeWidth);
    expect(path(scene, "jet-1-lit").stroke).toBe(themes.paper.amber);
    expect(scene.marks.some(({ id }) => id === "jet-2-lit")).toBe(false);
    const { latitude } = jetPlaceOn(jets[0], input.result.dateIndex);
    for (const id of ["map", "zonal-mean"]) {
      const y = Number(/^M[\d.]+ ([\d.]+)/.exec(path(scene, `${id}-jet`).d)?.[1]);
      expect(y).toBeCloseTo(pixelY(panel(scene, id), latitude), 1);
    }
  });

  test("without any lit nothing is added to the other panels", () => {
    const ids = drawn({ jets }).marks.map(({ id }) => id);
    expect(ids).not.toContain("map-jet");
    expect(ids).not.toContain("zonal-mean-jet");
  });

  test("their labels tell latitude by word and direction by a triangle's side and colour", () => {
    const scene = drawn({ jets });
    const label = scene.marks.find(({ id }) => id === "jet-label-1");
    expect(label?.kind === "text" && label.text).toBe("38.0°");
    expect(path(scene, "jet-sign-1").fill).toBe(themes.paper.rust);
    expect(path(scene, "jet-sign-2").fill).toBe(themes.paper.teal);
    expect(scene.description).toMatch(/Jets eastward at 38\.0°; westward at 31\.0°/);
  });

  test("finding them anew moves no panel, and without any wanted the picture has their room", () => {
    const panels = (change: Partial<LatitudesInput>) => drawn(change).panels;
    expect(panels({ jets })).toEqual(panels({ jets: [] }));
    expect(panels({})[2].width).toBeGreaterThan(panels({ jets })[2].width);
  });

  test("ten thousand dates draw no more points than the picture can show", () => {
    const long = madeUpInput({ dates: 10_000, rows: 4, columns: 4 });
    const scene = latitudesScene({ ...long, jets: [madeJet(1, 30, days(0, 10_000))] }, wide);
    const { width } = panel(scene, "latitude-time");
    expect(path(scene, "jet-1").d.split("L").length).toBeLessThan(2 * width + 10);
  });
});

describe("room with jets", () => {
  const crowd = Array.from({ length: 60 }, (_, i) => madeJet(i + 1, 29 + 0.05 * i, days(i, 200 + i)));
  const cases: readonly (readonly [string, Partial<LatitudesInput>])[] = [
    ["two jets", { jets }],
    ["none yet", { jets: [] }],
    ["a crowd at one latitude", { jets: crowd, selectedJet: 3 }],
  ];
  const sizes = [
    { width: 640, height: 480 },
    { width: 1024, height: 500 },
    wide,
    { width: 2200, height: 1300 },
    { width: 640, height: 300, arrangement: "row" as const },
    printSize(127),
    printSize(174),
  ];

  describe.each(cases)("%s", (_name, change) => {
    test.each(sizes)("at $width by $height no two texts overlap and nothing leaves the scene", (size) => {
      const scene = drawn(change, size);
      const boxes = textBoxes(scene);
      expect(overlaps(boxes)).toEqual([]);
      expect(
        boxes.filter((box) => box.left < 0 || box.top < 0 || box.right > size.width || box.bottom > size.height),
      ).toEqual([]);
      for (const frame of scene.panels) expect(frame.width).toBeGreaterThan(60);
      const ids = scene.marks.map(({ id }) => id);
      expect(new Set(ids).size).toBe(ids.length);
    });
  });

  test("where labels do not all fit the lit jet keeps its own", () => {
    const scene = drawn({ jets: crowd, selectedJet: 3 }, { width: 640, height: 480 });
    const labels = scene.marks.filter(({ id }) => /^jet-label-\d+$/.test(id));
    expect(labels.length).toBeLessThan(crowd.length);
    expect(labels.map(({ id }) => id)).toContain("jet-label-3");
  });

  test("south of the equator and across it the hemisphere is told where it must be", () => {
    const latitude = { ...input.record.latitude, values: input.record.latitude.values.map((each) => each - 31) };
    const scene = drawn({ record: { ...input.record, latitude }, jets: [madeJet(1, -5, days(0, 50))] });
    const label = scene.marks.find(({ id }) => id === "jet-label-1");
    expect(label?.kind === "text" && label.text).toBe("5.0° S");
  });
});
