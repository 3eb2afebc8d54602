import { cpSync, existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { launchBrowser } from "./browser";
import { type Door, sampleStudy, startDoor } from "./door";
import { drawn, openWindow, startAfresh, steady, type TestWindow } from "./window";

/** A run draws oceans of eddies, 40 s of work on one machine; the limit leaves room for a busy one. */
const writingMs = 180_000;

let browser: Browser;
let door: Door;
let shown: TestWindow;
let folder: string;

beforeAll(async () => {
  folder = mkdtempSync(path.join(tmpdir(), "strake-sources-"));
  cpSync(path.dirname(sampleStudy), folder, { recursive: true });
  browser = await launchBrowser();
  door = await startDoor([path.join(folder, path.basename(sampleStudy))]);
  shown = await openWindow(browser, door.address);
});

afterAll(async () => {
  await browser?.close();
  await door?.stop();
  if (folder) rmSync(folder, { recursive: true });
});

beforeEach(async () => {
  await startAfresh(shown);
  await drawn(shown.page);
});

const tab = (name: string) => shown.page.getByRole("tab", { name }).click();

describe("the Sources view", () => {
  test("shows what was recognised: variable, rule that found it, units, period, memory", async () => {
    const { page } = shown;
    await tab("Sources");
    await page.getByText("recognised").waitFor();
    const text = (await page.locator(".sources-main").textContent()) ?? "";
    for (const part of ["found by standard name", "Units", "Period", "Memory", "MB"]) expect(text).toContain(part);
    expect(await page.locator(".file.refused").count()).toBe(0);
    await page.screenshot({ path: "out/app/sources.png" });
    expect(shown.complaints).toEqual([]);
  });

  test("a region is applied as a new study, and undo takes it back", async () => {
    const { page } = shown;
    const before = await page.locator(".toolbar .period").textContent();
    await tab("Sources");
    await page.getByLabel("South, °N").fill("25");
    await page.getByLabel("North, °N").fill("35");
    await page.getByRole("button", { name: "Apply" }).click();
    await tab("Latitudes");
    await page.waitForFunction(() =>
      document.querySelector(".toolbar .period")?.textContent?.startsWith("25.13–34.88° N"),
    );
    await drawn(page);
    await page.getByRole("button", { name: "Undo" }).click();
    await page.waitForFunction((old) => document.querySelector(".toolbar .period")?.textContent === old, before);
    expect(shown.complaints).toEqual([]);
  });

  test("fields that cannot be read are told one by one and nothing can be applied", async () => {
    const { page } = shown;
    await tab("Sources");
    await page.getByLabel("North, °N").fill("north");
    await page.getByLabel("First date").fill("2031-3-1");
    expect(await page.locator(".field-fault").count()).toBe(2);
    expect(await page.getByRole("button", { name: "Apply" }).isDisabled()).toBe(true);
  });

  test("the other grid is read when it is chosen, the cursor staying at its latitude and about its date", async () => {
    const { page } = shown;
    const tag = await page.locator(".cursor-tag text").textContent();
    const year = (await page.locator(".toolbar .date").textContent())?.slice(-4);
    await page.locator("header .segments label").nth(1).click();
    await page.waitForFunction(() =>
      document.querySelector('[data-mark="note-source"]')?.textContent?.includes("maps B"),
    );
    await drawn(page);
    expect(await page.locator(".cursor-tag text").textContent()).toBe(tag);
    expect((await page.locator(".toolbar .date").textContent())?.slice(-4)).toBe(year);
  });
});

describe("what is kept", () => {
  test(
    "results are written into the folder named, with progress and a notice",
    async () => {
      const { page } = shown;
      const place = path.join(folder, "results");
      await page.getByRole("button", { name: "Write results…" }).click();
      await page.getByLabel("Folder").fill(place);
      await page.getByRole("button", { name: "Write", exact: true }).click();
      await page.getByText("Results written").waitFor({ timeout: writingMs });
      expect(existsSync(path.join(place, "summary.json"))).toBe(true);
      expect(shown.complaints).toEqual([]);
    },
    2 * writingMs,
  );

  test("a place that may not be written is told in the sheet, which stays open", async () => {
    const { page } = shown;
    await page.getByRole("button", { name: "Write results…" }).click();
    await page.getByLabel("Folder").fill("/nowhere/at/all");
    await page.getByRole("button", { name: "Write", exact: true }).click();
    await page.getByRole("dialog").getByRole("alert").waitFor();
    expect(await page.getByRole("dialog").isVisible()).toBe(true);
  });

  test("a saved study holds the band that was dragged", async () => {
    const { page } = shown;
    await page.keyboard.press("]");
    await steady(page);
    const days = Number(await page.locator('[data-edge="shortestDays"]').getAttribute("aria-valuenow"));
    await page.getByRole("button", { name: "Save study" }).click();
    const file = path.join(folder, "dragged.study.json");
    await page.getByLabel("File").fill(file);
    await page.getByRole("button", { name: "Save", exact: true }).click();
    await page.getByText("Study saved").waitFor();
    expect(JSON.parse(readFileSync(file, "utf8")).band.shortestDays).toBe(days);
  });
});
