import { mkdirSync } from "node:fs";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser } from "./browser";
import { type Door, sampleStudy, startDoor } from "./door";
import { drawn, openWindow, panelPixels, type TestWindow } from "./window";

let browser: Browser;
let door: Door;
let shown: TestWindow;

beforeAll(async () => {
  mkdirSync("out/app", { recursive: true });
  browser = await launchBrowser();
  door = await startDoor([sampleStudy]);
  shown = await openWindow(browser, door.address);
  await drawn(shown.page);
  await shown.page.getByRole("tab", { name: "Scales" }).click();
});

afterAll(async () => {
  await browser?.close();
  await door?.stop();
});

/** Scales of the whole sample take some ten seconds of two cores. */
const patience = { timeout: 90_000 };

async function settled(): Promise<void> {
  await shown.page.locator(".scales-scene").waitFor(patience);
  await shown.page.locator('.scales-pane[aria-busy="false"]').waitFor(patience);
}

/** Texts of the scene that reach beyond it. */
function cutOff(): Promise<(string | null)[]> {
  return shown.page.evaluate(() => {
    const scene = document.querySelector(".scales-scene")?.getBoundingClientRect();
    if (!scene) return ["no scene"];
    return [...document.querySelectorAll(".scales-scene text")]
      .filter((each) => {
        const box = each.getBoundingClientRect();
        return box.left < scene.left - 1 || box.right > scene.right + 1 || box.bottom > scene.bottom + 1;
      })
      .map((each) => each.textContent);
  });
}

test("opening the view computes with progress, can be stopped and asked for again, and draws every panel", async () => {
  const { page } = shown;
  await page.getByText("Computing the scales").first().waitFor();
  await page.getByRole("button", { name: "Cancel" }).click();
  expect(await page.getByText("The computation was stopped.").isVisible()).toBe(true);
  await page.getByRole("button", { name: "Compute again" }).click();
  await settled();
  const panels = await page
    .locator(".scales-scene [data-panel]")
    .evaluateAll((all) => all.map((each) => each.getAttribute("data-panel")));
  const every = ["energy", "wavelengths", "zonality", "waves", "drift-along", "drift-across", "period", "mean-flow"];
  expect(panels).toEqual(expect.arrayContaining([...every, "push", "gradient"]));
  for (const id of ["energy", "waves", "drift-along", "drift-across"]) {
    expect((await panelPixels(page, id)).colours).toBeGreaterThan(10);
  }
  expect(await cutOff()).toEqual([]);
  await page.screenshot({ path: "out/app/scales.png" });
  expect(shown.complaints).toEqual([]);
});

test("the pages are reached by the arrow keys and each fits", async () => {
  const { page } = shown;
  await page.getByRole("radio", { name: "All" }).focus();
  for (const [name, panel] of [
    ["Lengths", "zonality"],
    ["Waves and drift", "drift-along"],
    ["Eddies and jets", "longest-run"],
  ]) {
    await page.keyboard.press("ArrowRight");
    expect(await page.getByRole("radio", { name }).isChecked()).toBe(true);
    await page.locator(`.scales-scene [data-panel="${panel}"]`).waitFor();
    expect(await cutOff()).toEqual([]);
  }
  expect((await panelPixels(page, "persistence")).colours).toBeGreaterThan(10);
});

test("the pointer tells value and place", async () => {
  const { page } = shown;
  await page.locator('.scales-scene [data-panel="mean-flow"]').hover();
  expect(await page.locator(".hover").textContent()).toMatch(/cm s.*° N/);
});

test("the numbers stand in tables behind a disclosure that the keyboard opens", async () => {
  const { page } = shown;
  await page.locator(".scales-numbers summary").focus();
  await page.keyboard.press("Enter");
  for (const caption of ["Lengths, as half-wavelengths", "Forcing and energy", /^Persistence of the zonal mean/]) {
    await page.getByRole("table", { name: caption }).waitFor();
  }
  expect(
    await page
      .getByRole("row", { name: /Deformation|deformation radius/ })
      .first()
      .textContent(),
  ).toMatch(/km/);
  await page.keyboard.press("Enter");
});

test("another latitude keeps the old picture, marked, until the new one is there", async () => {
  const { page } = shown;
  await page.getByText("Waves and drift", { exact: true }).click();
  const heading = () => page.locator('[data-mark="drift-along-heading"]').textContent();
  const before = await heading();
  const field = page.getByLabel("Latitude of waves and drift, degrees north");
  await field.fill("25");
  await field.press("Enter");
  expect(await page.getByText("of earlier settings").isVisible()).toBe(true);
  expect(await heading()).toBe(before);
  await settled();
  expect(await heading()).toContain("Drift along 24.9");
  expect(await page.getByText("of earlier settings").count()).toBe(0);
  expect(shown.complaints).toEqual([]);
});
