import { cpSync, writeFileSync } from "node:fs";
import path from "node:path";
import { beforeEach, describe, expect, test } from "vitest";
import { temporaryFolder } from "../temporary-folder";
import { sampleStudy } from "./door";
import { sharedWindow } from "./shared-window";
import { panelFrame, steady } from "./window";

/** The sample with its mean flow kept, all that is slower than 90 days shown, and few oceans so that the test is short. */
function standingStudy(): string {
  const folder = temporaryFolder();
  cpSync(path.join(path.dirname(sampleStudy), "grid"), path.join(folder, "grid"), { recursive: true });
  const file = path.join(folder, "standing.study.json");
  writeFileSync(
    file,
    JSON.stringify({
      strake: 1,
      title: "Standing jets",
      grids: [{ id: "A", label: "Grid A", files: ["grid/halcyon-a-*.nc"] }],
      region: { west: -150, east: -125, south: 20, north: 41.5 },
      background: { mean: false, trend: false },
      band: { shortestDays: 90, longestDays: null },
      eddyTest: { oceans: 20 },
    }),
  );
  return file;
}

const shown = sharedWindow(standingStudy());

beforeEach(found);

/** Waits until the jets of the settings on screen are listed. */
async function found(): Promise<void> {
  await shown.page.waitForSelector('.jets[aria-busy="false"] .jets-table tbody tr', { timeout: 60_000 });
}

const rows = () => shown.page.locator(".jets-table tbody tr");

/** Latitude in degrees of a row of the table. */
async function latitudeOf(index: number): Promise<number> {
  return Number.parseFloat((await rows().nth(index).locator("th").textContent()) ?? "");
}

async function cursorLatitude(): Promise<number> {
  return Number.parseFloat((await shown.page.locator(".cursor-tag text").textContent()) ?? "");
}

describe("jets in the Latitudes view", () => {
  test("are listed as a table from north to south, drawn over the picture and told to a screen reader", async () => {
    const { page } = shown;
    const count = await rows().count();
    // The sample's truth has ten alternating jets; a line that breaks may be listed twice.
    expect(count).toBeGreaterThanOrEqual(8);
    expect(count).toBeLessThanOrEqual(13);
    const latitudes = await Promise.all(Array.from({ length: count }, (_, row) => latitudeOf(row)));
    expect(latitudes).toEqual([...latitudes].sort((a, b) => b - a));
    expect(await page.locator('.scene path[data-mark^="jet-"][clip-path]').count()).toBe(count);
    expect(await page.locator(".scene text[data-mark^='jet-label-']").count()).toBe(count);
    expect(await page.locator('[data-spoken="jets"]').textContent()).toBe(`${count} jets found.`);
    await page.getByRole("button", { name: /^Speed/ }).click();
    expect(await page.getByRole("columnheader", { name: /^Speed/ }).getAttribute("aria-sort")).toBe("descending");
    await page.screenshot({ path: "out/app/jets.png" });
    expect(shown.complaints).toEqual([]);
  });

  test("picking one lights it in every panel, moves the cursor to it and tells about it", async () => {
    const { page } = shown;
    await rows().nth(3).click();
    expect(await rows().nth(3).getAttribute("aria-selected")).toBe("true");
    const latitude = await latitudeOf(3);
    // The cursor goes to where the jet is on the date, the table has its mean; the jets of the sample hardly wander.
    expect(Math.abs((await cursorLatitude()) - latitude)).toBeLessThan(1);
    for (const panel of ["map", "zonal-mean"]) {
      const line = await page.locator(`[data-mark="${panel}-jet"]`).boundingBox();
      const cursor = await page.locator('[data-cursor="latitude"]').boundingBox();
      const frame = await panelFrame(page, panel);
      if (!line || !cursor) throw new Error("the lit jet is not drawn");
      expect(Math.abs(line.x - frame.x)).toBeLessThan(2);
      expect(Math.abs(line.y + line.height / 2 - (cursor.y + cursor.height / 2))).toBeLessThan(2);
    }
    expect(await page.locator('[data-mark^="jet-"][data-mark$="-lit"]').count()).toBe(2);
    expect(await page.locator(".jet-details").textContent()).toMatch(
      /ward jet at \d\d\.\d\d° N.*Lives.*Drift.*e-folding/,
    );
    expect(shown.complaints).toEqual([]);
  });

  test("the keyboard walks the rows, and a label beside the picture picks its jet", async () => {
    const { page } = shown;
    await rows().first().focus();
    await page.keyboard.press("ArrowDown");
    await page.keyboard.press("ArrowDown");
    expect(await rows().nth(2).getAttribute("aria-selected")).toBe("true");
    expect(await page.locator(".jets-table tr[tabindex='0']").count()).toBe(1);
    // Arrow keys of the table do not reach the bench; left and right still move the date.
    const date = page.locator(".toolbar .date");
    const before = await date.textContent();
    await page.keyboard.press("ArrowRight");
    await page.waitForFunction((old) => document.querySelector(".toolbar .date")?.textContent !== old, before);
    await page.keyboard.press("Escape");
    expect(await page.locator(".jets-table tr[aria-selected='true']").count()).toBe(0);
    await page.locator("[data-jet]").last().click();
    expect(await page.locator(".jets-table tr[aria-selected='true']").count()).toBe(1);
    expect(shown.complaints).toEqual([]);
  });

  test("the eddy test gives every jet a verdict; another band makes it stale and finds the jets anew", async () => {
    const { page } = shown;
    expect(await page.locator(".verdict").count()).toBe(0);
    await page.getByRole("button", { name: "Test against eddies" }).click();
    await page.getByRole("button", { name: "Cancel the test" }).waitFor();
    await page.locator(".verdict").first().waitFor({ timeout: 170_000 });
    const count = await rows().count();
    expect(await page.locator(".verdict").count()).toBe(count);
    expect(await page.locator(".jets").textContent()).toMatch(new RegExp(`${count} found, \\d+ held`));
    await rows().first().click();
    expect(await page.locator(".jet-details").textContent()).toMatch(
      /(Held|Not told apart from eddies): \d+ of 20 oceans/,
    );
    await page.screenshot({ path: "out/app/jets-tested.png" });

    await page.locator('[data-edge="shortestDays"]').focus();
    // Held down, the key is one gesture: one step of undo.
    for (let repeat = 0; repeat < 30; repeat++) await page.keyboard.down("]");
    await page.keyboard.up("]");
    await page.getByText("Tested for other settings: test again.").waitFor();
    await found();
    expect(await page.locator(".verdict").count()).toBe(0);
    expect(await page.locator(".jets").textContent()).not.toMatch(/held/i);
    await page.getByRole("button", { name: "Undo" }).click();
    await found();
    await page.locator(".verdict").first().waitFor();
    await steady(page);
    expect(shown.complaints).toEqual([]);
  }, 240_000);

  test("a population set by hand is a new study, and the field as it stands has no jets", async () => {
    const { page } = shown;
    await page.getByText("Oceans and eddies").click();
    await page.getByLabel("Lifetime, days").fill("60");
    await page.keyboard.press("Enter");
    await page.getByRole("button", { name: "Undo" }).click();
    expect(await page.getByLabel("Lifetime, days").inputValue()).toBe("");
    await page.getByText("As it stands").click();
    await page.getByText("Jets are looked for in the band; here the field has all its periods.").waitFor();
    await steady(page);
    expect(await page.locator('[data-mark^="jet-"]').count()).toBe(0);
    expect(shown.complaints).toEqual([]);
  });
});
