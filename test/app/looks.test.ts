import { mkdirSync } from "node:fs";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launchBrowser } from "./browser";
import { sampleStudy, startDoor } from "./door";
import { drawn, openWindow, panelFrame, type WindowOptions } from "./window";

let browser: Browser;

beforeAll(async () => {
  mkdirSync("out/app", { recursive: true });
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
});

/** Each door's address is good for one browser, so every look starts its own. */
async function look(
  options: WindowOptions,
  file: string,
  check: (shown: Awaited<ReturnType<typeof openWindow>>) => Promise<void>,
) {
  const door = await startDoor([sampleStudy]);
  try {
    const shown = await openWindow(browser, door.address, options);
    await drawn(shown.page);
    await shown.page.screenshot({ path: `out/app/${file}.png` });
    await check(shown);
    expect(shown.complaints).toEqual([]);
    await shown.page.context().close();
  } finally {
    await door.stop();
  }
}

describe("the window fits", () => {
  for (const [width, height, scheme] of [
    [1440, 900, "dark"],
    [1024, 640, "light"],
    [1100, 700, "dark"],
    [2560, 1400, "light"],
  ] as const) {
    test(`nothing is cut off at ${width} by ${height}, ${scheme}`, async () => {
      await look({ width, height, scheme }, `latitudes-${width}-${scheme}`, async ({ page }) => {
        const cut = await page.evaluate(() => {
          const outside = (element: Element, within: DOMRect): boolean => {
            const box = element.getBoundingClientRect();
            return (
              box.width > 0 &&
              (box.left < within.left - 1 || box.right > within.right + 1 || box.bottom > within.bottom + 1)
            );
          };
          const whole = document.documentElement.getBoundingClientRect();
          const figure = document.querySelector(".figure-pane")?.getBoundingClientRect() ?? whole;
          return [
            ...[...document.querySelectorAll("header *, .toolbar *")].filter((each) => outside(each, whole)),
            ...[...document.querySelectorAll(".segments")].filter((each) => each.scrollWidth > each.clientWidth + 1),
            ...[...document.querySelectorAll(".scene text")].filter((each) => outside(each, figure)),
          ].map((each) => each.textContent);
        });
        expect(cut).toEqual([]);
        const side = await page.locator(".side").evaluate((each) => each.scrollWidth - each.clientWidth);
        expect(side).toBe(0);
        // Smaller than this a panel cannot be read.
        expect((await panelFrame(page, "map")).height).toBeGreaterThan(180);
      });
    });
  }

  test("a screen of two pixels a pixel is drawn with two", async () => {
    await look({ pixelRatio: 2 }, "latitudes-sharp", async ({ page }) => {
      const ratio = await page.evaluate(() => {
        const canvas = document.querySelector<HTMLCanvasElement>(".scene canvas");
        return canvas ? canvas.width / canvas.clientWidth : 0;
      });
      expect(ratio).toBe(2);
    });
  });
});
