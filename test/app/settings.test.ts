import { describe, expect, test } from "vitest";
import { sampleStudy } from "./door";
import { sharedWindow } from "./shared-window";
import { panelPixels, steady } from "./window";

const shown = sharedWindow(sampleStudy);

const section = (title: string) =>
  shown.page
    .locator(".section > summary")
    .filter({ has: shown.page.locator(".section-title", { hasText: new RegExp(`^${title}`) }) });
const undo = () => shown.page.getByRole("button", { name: "Undo" });
const pictures = async () => {
  const both = [await panelPixels(shown.page, "map"), await panelPixels(shown.page, "latitude-time")];
  return both.map(({ hash }) => hash);
};

describe("the settings beside the Latitudes view", () => {
  test("are closed at first and say what they hold; opened, they stay open from view to view", async () => {
    const { page } = shown;
    expect(await page.locator(".section[open]").count()).toBe(0);
    expect(await section("Filter").locator(".section-summary").textContent()).toMatch(/^Lanczos, /);
    await section("Filter").click();
    await page.getByRole("tab", { name: "Sources" }).click();
    await page.getByRole("tab", { name: "Latitudes" }).click();
    expect(await page.getByLabel("Kind").isVisible()).toBe(true);
    expect(shown.complaints).toEqual([]);
  });

  test("another kind of filter changes both pictures, and undo brings the old ones back", async () => {
    const { page } = shown;
    const before = await pictures();
    await section("Filter").click();
    await page.getByLabel("Kind").selectOption("butterworth");
    await page.getByLabel("Order").waitFor();
    await steady(page);
    const after = await pictures();
    for (const [index, hash] of before.entries()) expect(after[index]).not.toBe(hash);
    await undo().click();
    await steady(page);
    expect(await pictures()).toEqual(before);
    expect(await page.getByLabel("Order").count()).toBe(0);
    expect(shown.complaints).toEqual([]);
  });

  test("an open edge is called open, takes nothing off its side and closes when it is dragged", async () => {
    const { page } = shown;
    await section("Filter").click();
    const open = page.getByLabel("Nothing taken off the long periods");
    await open.setChecked(false);
    await steady(page);
    const closed = await pictures();
    await open.check();
    await steady(page);
    const handle = page.locator('[data-edge="longestDays"]');
    expect(await handle.getAttribute("aria-valuetext")).toBe("open");
    expect(await page.locator('[data-mark="spectrum-longest"]').textContent()).toBe("open");
    expect(await page.getByLabel("Longest period, days").count()).toBe(0);
    expect((await pictures())[1]).not.toBe(closed[1]);
    // With both sides open nothing would be filtered: the other one cannot be opened too.
    expect(await page.getByLabel("Nothing taken off the short periods").isDisabled()).toBe(true);
    await undo().click();
    await steady(page);
    expect(await pictures()).toEqual(closed);
    await open.check();
    const grip = await handle.locator(".grip").boundingBox();
    if (!grip) throw new Error("the band has no handle");
    await page.mouse.move(grip.x + 5, grip.y + 5);
    await page.mouse.down();
    for (let step = 1; step <= 6; step++) await page.mouse.move(grip.x + 5 + 10 * step, grip.y + 5);
    await page.mouse.up();
    await steady(page);
    expect(await handle.getAttribute("aria-valuetext")).toMatch(/^\d+ days$/);
    expect(await open.isChecked()).toBe(false);
    expect(shown.complaints).toEqual([]);
  });

  test("a number that cannot be used is told beside its field and changes nothing", async () => {
    const { page } = shown;
    await section("Filter").click();
    const field = page.getByLabel("Shortest period, days");
    const before = await field.inputValue();
    await field.fill("often");
    await field.press("Enter");
    expect(await page.locator(".setting .field-fault").textContent()).toMatch(/^A number of days from \d+ to /);
    expect(await undo().isDisabled()).toBe(true);
    await field.press("Escape");
    expect(await field.inputValue()).toBe(before);
    await field.fill("120");
    await field.press("Enter");
    await steady(page);
    expect(Number(await page.locator('[data-edge="shortestDays"]').getAttribute("aria-valuenow"))).toBe(120);
  });

  test("a height error hatches what it cannot tell from zero, explains it and stands in the readout", async () => {
    const { page } = shown;
    await section("Height error").click();
    await page.getByLabel("Standard error").selectOption("number");
    await page.waitForSelector('[data-mark="map-doubt"]', { state: "attached" });
    await steady(page);
    const notes = await page.locator('[data-mark^="note-doubt"]').allTextContents();
    expect(notes.join(" ")).toBe("hatched: below 1.96 standard errors of a 2 cm height error");
    expect(await page.locator('[data-mark="zonal-mean-date-band"]').count()).toBe(1);
    expect(await page.locator(".readout-row").first().textContent()).toMatch(/± error.* ± \d/);
    const hatch = async () => (await page.locator('[data-mark="map-doubt"]').getAttribute("d"))?.length ?? 0;
    const small = await hatch();
    await page.getByLabel("Of heights, cm").fill("0.2");
    await page.getByLabel("Of heights, cm").press("Enter");
    await steady(page);
    expect(await hatch()).toBeLessThan(small);
    await page.screenshot({ path: "out/app/error.png" });
    await undo().click();
    await undo().click();
    await steady(page);
    expect(await page.locator('[data-mark="map-doubt"]').count()).toBe(0);
    expect(shown.complaints).toEqual([]);
  });

  test("errors asked of files that hold none are told as a fault, and undo mends it", async () => {
    const { page } = shown;
    await section("Height error").click();
    await page.getByLabel("Standard error").selectOption("file");
    await page.locator(".notice.error").waitFor();
    expect(await page.locator(".notice.error").textContent()).toContain("error variable");
    await undo().click();
    await steady(page);
  });

  test("a setting that takes long says how far it is and can be taken back at once", async () => {
    const { page } = shown;
    const before = await pictures();
    await section("Taken off").click();
    await page.getByLabel("Large-scale surface of each date").check();
    await page.locator(".toolbar .loading").waitFor({ timeout: 20_000 });
    await undo().click();
    const started = performance.now();
    await steady(page);
    expect(await pictures()).toEqual(before);
    // The whole computation takes a minute and more; what was overtaken must not be waited for.
    expect(performance.now() - started).toBeLessThan(20_000);
  });
});
