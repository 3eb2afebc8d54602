import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launchBrowser } from "./browser";
import { type Door, sampleStudy, startDoor } from "./door";
import { drawn, openWindow, steady, type TestWindow } from "./window";

let browser: Browser;
const hostile = '<img src=x onerror="document.title=1"><b>bold</b> \u202eevil';

beforeAll(async () => {
  browser = await launchBrowser();
});

afterAll(async () => {
  await browser?.close();
});

async function withWindow(
  paths: readonly string[],
  work: (shown: TestWindow, door: Door) => Promise<void>,
): Promise<void> {
  const door = await startDoor(paths);
  try {
    const shown = await openWindow(browser, door.address);
    await work(shown, door);
    await shown.page.context().close();
  } finally {
    await door.stop();
  }
}

/** The sample study in a folder of its own, changed; deleted afterwards. */
async function withStudy(change: (study: Record<string, unknown>) => void, work: (file: string) => Promise<void>) {
  const folder = mkdtempSync(path.join(tmpdir(), "strake-app-"));
  try {
    cpSync(path.dirname(sampleStudy), folder, { recursive: true });
    const file = path.join(folder, path.basename(sampleStudy));
    const study = JSON.parse(readFileSync(file, "utf8"));
    change(study);
    writeFileSync(file, JSON.stringify(study));
    await work(file);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

describe("what goes wrong is told in sentences", () => {
  test("a wrong path gives a notice that can be dismissed, and the study stays open", async () => {
    await withWindow([sampleStudy], async ({ page, complaints }) => {
      await drawn(page);
      await page.getByRole("tab", { name: "Sources" }).click();
      const wrong = path.join(path.dirname(sampleStudy), "nowhere.study.json");
      await page.getByLabel("Paths of a study or of data files").fill(wrong);
      await page.getByRole("button", { name: "Open", exact: true }).click();
      const notice = page.getByRole("alert");
      await notice.waitFor();
      expect(await notice.textContent()).toContain("nowhere.study.json");
      await notice.getByRole("button", { name: "Dismiss" }).click();
      expect(await page.getByRole("alert").count()).toBe(0);
      await page.getByRole("tab", { name: "Latitudes" }).click();
      await drawn(page);
      expect(complaints).toEqual([]);
    });
  });

  test("hostile text in a study is shown as text", async () => {
    await withStudy(
      (study) => {
        study.title = hostile;
        (study.grids as { label: string }[])[0].label = hostile.slice(0, 120);
      },
      async (file) => {
        await withWindow([file], async ({ page, complaints }) => {
          await drawn(page);
          expect(await page.locator(".study-title").textContent()).toBe(hostile);
          await page.getByRole("tab", { name: "Sources" }).click();
          expect(await page.locator("#root img, #root b").count()).toBe(0);
          expect(await page.title()).not.toBe("1");
          expect(complaints).toEqual([]);
        });
      },
    );
  });

  test("hostile text in a data file is shown as text", async () => {
    const known = "Simulated sea-surface height of the invented Halcyon Basin";
    const title = hostile.slice(0, 50).padEnd(known.length, ".");
    await withStudy(
      (study) => {
        study.grids = [{ id: "B", files: ["grid/halcyon-b.nc"] }];
        study.tracks = [];
        study.band = { filter: "none" };
      },
      async (file) => {
        // Of the same length, so that the classic format's offsets stay right.
        const data = path.join(path.dirname(file), "grid/halcyon-b.nc");
        const bytes = readFileSync(data, "latin1");
        expect(bytes).toContain(known);
        writeFileSync(data, bytes.replace(known, title), "latin1");
        await withWindow([file], async ({ page, complaints }) => {
          await drawn(page);
          await page.getByRole("tab", { name: "Sources" }).click();
          await page.locator(".file-head", { hasText: '<img src=x onerror="document.title=1">' }).waitFor();
          expect(await page.locator("#root img, #root b").count()).toBe(0);
          expect(await page.title()).not.toBe("1");
          expect(complaints).toEqual([]);
        });
      },
    );
  });

  test("a killed engine is back within five seconds, the study as it was, and the window says so", async () => {
    await withWindow([sampleStudy], async ({ page }, door) => {
      await drawn(page);
      await page.keyboard.press("]");
      await steady(page);
      const days = await page.locator('[data-edge="shortestDays"]').getAttribute("aria-valuenow");
      const [pid] = door.enginePids();
      process.kill(pid, "SIGKILL");
      const killed = Date.now();
      await page.getByText("The engine was started again").waitFor({ timeout: 5000 });
      expect(Date.now() - killed).toBeLessThan(5000);
      expect(door.enginePids()).not.toContain(pid);
      expect(await page.locator('[data-edge="shortestDays"]').getAttribute("aria-valuenow")).toBe(days);
      const date = page.locator(".toolbar .date");
      const before = await page.locator('[data-mark="map-heading"]').textContent();
      await page.keyboard.press("ArrowRight");
      await page.waitForFunction(
        (old) => document.querySelector('[data-mark="map-heading"]')?.textContent !== old,
        before,
        { timeout: 10_000 },
      );
      expect(await date.textContent()).not.toBe("");
    });
  });

  test("edits that were not saved come back when the window was killed", async () => {
    await withWindow([sampleStudy], async ({ page, complaints }) => {
      await drawn(page);
      await page.keyboard.press("]");
      const days = await page.locator('[data-edge="shortestDays"]').getAttribute("aria-valuenow");
      // The promise is two seconds; the window is gone without a chance to tidy up.
      await page.waitForTimeout(2000);
      const context = page.context();
      const address = page.url();
      await page.close({ runBeforeUnload: false });
      const again = await context.newPage();
      await again.goto(address);
      await drawn(again);
      expect(await again.locator('[data-edge="shortestDays"]').getAttribute("aria-valuenow")).toBe(days);
      expect(await again.getByText("Unsaved changes are back").count()).toBe(1);
      expect(complaints).toEqual([]);
    });
  });
});
