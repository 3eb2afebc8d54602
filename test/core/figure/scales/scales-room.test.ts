import { describe, expect, test } from "vitest";
import { themes } from "../../../../core/figure/colour/theme";
import { printSize } from "../../../../core/figure/print-size";
import { type ScalesInput, type ScalesSize, scalesScene } from "../../../../core/figure/scales-figure";
import { sceneToSvg } from "../../../../core/figure/scene-to-svg";
import type { Estimate } from "../../../../core/model/scales-result";
import { overlaps, textBoxes } from "../latitudes/text-boxes";
import { bareScales, madeInput, madeScales } from "./made-scales";

const heightShare = 1.35;

const sizes: readonly ScalesSize[] = [
  { width: 1240, height: 700 },
  { width: 1440, height: 780 },
  { width: 2200, height: 1180 },
  ...(["lengths", "waves", "forcing"] as const).flatMap((part) => [
    { width: 720, height: 430, part },
    { width: 1024, height: 510, part },
    { width: 1440, height: 780, part },
    { width: 2200, height: 1180, part },
  ]),
  printSize(127, heightShare),
  printSize(174, heightShare),
  printSize(400, heightShare),
];

const made = madeScales();
const wild = (value: number): Estimate => ({ value, low95: -3.7 * value, high95: 5.1 * value });
const longNumbers = {
  ...made,
  lengths: {
    ...made.lengths,
    peakWavelength: wild(1_234_567),
    ruler: made.lengths.ruler.map((length) => ({ ...length, halfWavelength: wild(123_456) })),
  },
  forcing: {
    ...made.forcing,
    push: { ...made.forcing.push, perDay: wild(-0.0001234) },
    conversion: wild(-1.234e-11),
    signChanges: [20.1, 22.2, 25.3, 28.4, 33.5],
  },
  drift: {
    alongLatitude: made.drift.alongLatitude && { ...made.drift.alongLatitude, speed: wild(0.123) },
    acrossLatitudes: made.drift.acrossLatitudes && { ...made.drift.acrossLatitudes, speed: wild(0.0123) },
  },
};

const cases: readonly (readonly [string, ScalesInput])[] = [
  ["usual numbers", madeInput()],
  ["a held latitude", madeInput(made, { heldLatitude: 33.3 })],
  ["wide and lopsided limits", madeInput(longNumbers)],
  ["nothing but profiles without values", madeInput(bareScales())],
];

describe.each(cases)("%s", (_name, input) => {
  test.each(sizes)("at $width by $height ($part) no two texts overlap and nothing leaves the scene", (size) => {
    const scene = scalesScene(input, size);
    const boxes = textBoxes(scene);
    expect(overlaps(boxes)).toEqual([]);
    expect(
      boxes.filter((box) => box.left < 0 || box.top < 0 || box.right > size.width || box.bottom > size.height),
    ).toEqual([]);
    for (const frame of scene.panels) {
      expect(frame.width).toBeGreaterThan(60);
      expect(frame.height).toBeGreaterThan(60);
      expect(frame.x + frame.width).toBeLessThanOrEqual(size.width);
      expect(frame.y + frame.height).toBeLessThanOrEqual(size.height);
    }
    expect(scene.marks.every((mark) => mark.kind !== "path" || !/NaN|Infinity/.test(mark.d))).toBe(true);
    expect(scene.marks.every((mark) => mark.kind !== "text" || !/NaN|Infinity|undefined/.test(mark.text))).toBe(true);
  });

  test.each(sizes)("at $width by $height ($part) marks have ids of their own and clips name panels", (size) => {
    const scene = scalesScene(input, size);
    const ids = scene.marks.map((mark) => mark.id);
    expect(ids.filter((id, index) => ids.indexOf(id) !== index)).toEqual([]);
    const frames = scene.panels.map((frame) => frame.id);
    for (const mark of scene.marks) if (mark.kind === "path" && mark.clip) expect(frames).toContain(mark.clip);
  });
});

test.each([127, 174, 190])("at %i mm every text is 8 pt or more and every line 0.5 pt or more", (widthMm) => {
  const size = printSize(widthMm, heightShare);
  const pointsPerPixel = ((widthMm / 25.4) * 72) / size.width;
  for (const mark of scalesScene(madeInput(), size).marks) {
    if (mark.kind === "text") expect(mark.size * pointsPerPixel).toBeGreaterThanOrEqual(7.99);
    if (mark.kind === "path" && mark.stroke !== "none") {
      expect(mark.strokeWidth * pointsPerPixel).toBeGreaterThanOrEqual(0.5);
    }
  }
});

test("on screen rasters lie under every path, so none may be covered by its panel's own ground", () => {
  const scene = scalesScene(madeInput(), { width: 1440, height: 780 });
  const rasters = scene.marks.flatMap((mark) => (mark.kind === "raster" ? [mark.id.replace(/-raster$/, "")] : []));
  expect(rasters).toEqual(expect.arrayContaining(["energy", "waves", "drift-along", "drift-across"]));
  for (const id of rasters) expect(scene.marks.map((mark) => mark.id)).not.toContain(`${id}-ground`);
});

test("the night theme changes colours only", () => {
  const size = { width: 1440, height: 780 };
  const [day, dark] = [themes.paper, themes.night].map((theme) => scalesScene(madeInput(), size, theme));
  expect(dark.panels).toEqual(day.panels);
  expect(textBoxes(dark)).toEqual(textBoxes(day));
  expect(dark.background).toBe(themes.night.ground);
});

test("the same input gives the same SVG, byte for byte", () => {
  const size = printSize(174, heightShare);
  expect(sceneToSvg(scalesScene(madeInput(), size))).toBe(sceneToSvg(scalesScene(madeInput(), size)));
});
