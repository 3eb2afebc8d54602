import { mkdirSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launchBrowser } from "./browser";
import { sampleStudy, startDoor } from "./door";
import { writeMadeMaps } from "./made-maps";
import { openWindow, steady, type TestWindow } from "./window";

let browser: Browser;
let folder: string;

beforeAll(async () => {
  mkdirSync("out/app", { recursive: true });
  folder = mkdtempSync(path.join(tmpdir(), "strake-made-"));
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
  if (folder) rmSync(folder, { recursive: true });
});

async function opened(file: string, check: (shown: TestWindow) => Promise<void>): Promise<void> {
  const door = await startDoor([file]);
  try {
    const shown = await openWindow(browser, door.address);
    await shown.page.waitForSelector(".scene canvas", { timeout: 60_000 });
    await steady(shown.page);
    await check(shown);
    expect(shown.complaints).toEqual([]);
    await shown.page.context().close();
  } finally {
    await door.stop();
  }
}

function madeMaps(name: string, dates: number, withVelocities: boolean): string {
  const file = path.join(folder, name);
  writeMadeMaps(file, dates, withVelocities);
  return file;
}

describe("supplied velocities", () => {
  test("are compared on request, and the convention they were made by can be taken over", async () => {
    await opened(madeMaps("velocities.nc", 30, true), async ({ page }) => {
      await page.getByRole("tab", { name: "Sources" }).click();
      const part = page.getByRole("region", { name: "Supplied velocity" });
      await part.getByRole("button", { name: "Compare supplied velocities" }).click();
      await part.locator("table").waitFor();
      const text = (await part.textContent()) ?? "";
      for (const expected of ["ugos", "vgos", "rms difference", "correlation", "25–30° N", "may be claimed only if"]) {
        expect(text).toContain(expected);
      }
      expect(await part.locator("p strong").textContent()).toBe("3 points, sphere of 6371 km, gravity 9.81 m s−2");
      await page.screenshot({ path: "out/app/velocities.png" });
      await part.getByRole("button", { name: "Use this convention" }).click();
      await part.getByText("have changed since the last comparison").waitFor();
      await part.getByRole("button", { name: "Compare supplied velocities" }).click();
      await part.getByText("which is the study’s own").waitFor();
      expect(await part.getByRole("button").count()).toBe(0);
      await page.getByRole("button", { name: "Undo" }).click();
      await part.getByText("have changed since the last comparison").waitFor();
    });
  });

  test("that are not there are told in one line", async () => {
    await opened(sampleStudy, async ({ page }) => {
      await page.getByRole("tab", { name: "Sources" }).click();
      await page.getByRole("button", { name: "Compare supplied velocities" }).click();
      await page.getByText("No velocities in these files.").waitFor();
    });
  });
});

describe("records of few dates", () => {
  for (const [dates, words] of [
    [1, "1 day"],
    [10, "30 days"],
  ] as const) {
    test(`${dates}: drawn without a fault, and the missing spectrum is told in its panel`, async () => {
      await opened(madeMaps(`dates-${dates}.nc`, dates, false), async ({ page }) => {
        await page.waitForSelector('[data-mark="spectrum-note"]', { state: "attached" });
        expect(await page.locator('[data-mark="spectrum-note"]').textContent()).toContain("at least 16 dates");
        expect(await page.locator(".notice").count()).toBe(0);
        expect(await page.locator(".toolbar .period").textContent()).toMatch(new RegExp(` · ${words}$`));
      });
    });
  }
});
