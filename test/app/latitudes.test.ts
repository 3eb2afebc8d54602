import { describe, expect, test } from "vitest";
import { sampleStudy } from "./door";
import { sharedWindow } from "./shared-window";
import { panelFrame, panelPixels, steady } from "./window";

const shown = sharedWindow(sampleStudy);

async function slider(name: "shortestDays" | "longestDays") {
  const handle = shown.page.locator(`[data-edge="${name}"]`);
  return { handle, days: async () => Number(await handle.getAttribute("aria-valuenow")) };
}

/** Drags an edge across; `held` runs while the button is still down. */
async function dragEdge(
  name: "shortestDays" | "longestDays",
  byPixels: number,
  held: () => Promise<void> = async () => {},
): Promise<void> {
  const { page } = shown;
  const grip = await page.locator(`[data-edge="${name}"] .grip`).boundingBox();
  if (!grip) throw new Error("the band has no handle");
  const [x, y] = [grip.x + grip.width / 2, grip.y + grip.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  for (let step = 1; step <= 12; step++) await page.mouse.move(x + (byPixels * step) / 12, y);
  await held();
  await page.mouse.up();
}

describe("the Latitudes view", () => {
  test("three panels show the sample on one latitude axis, without a complaint", async () => {
    const frames = await Promise.all(["map", "zonal-mean", "latitude-time"].map((id) => panelFrame(shown.page, id)));
    for (const frame of frames) {
      expect(frame.y).toBe(frames[0].y);
      expect(frame.height).toBe(frames[0].height);
      expect(frame.width).toBeGreaterThan(60);
    }
    // A blank panel has one colour, a frame and a ground two or three.
    expect((await panelPixels(shown.page, "map")).colours).toBeGreaterThan(30);
    expect((await panelPixels(shown.page, "latitude-time")).colours).toBeGreaterThan(30);
    const profile = await shown.page.locator('[data-mark^="zonal-mean"]').count();
    expect(profile).toBeGreaterThan(2);
    await shown.page.screenshot({ path: "out/app/latitudes.png" });
    expect(shown.complaints).toEqual([]);
  });

  test("dragging an edge of the band changes map and picture, as one step of undo", async () => {
    const { page } = shown;
    const before = [await panelPixels(page, "map"), await panelPixels(page, "latitude-time")];
    const { days } = await slider("shortestDays");
    const daysBefore = await days();
    await dragEdge("shortestDays", -60, async () => {
      await steady(page);
      expect((await panelPixels(page, "map")).hash).not.toBe(before[0].hash);
    });
    await steady(page);
    expect(await days()).toBeGreaterThan(daysBefore);
    expect((await panelPixels(page, "map")).hash).not.toBe(before[0].hash);
    expect((await panelPixels(page, "latitude-time")).hash).not.toBe(before[1].hash);
    await page.getByRole("button", { name: "Undo" }).click();
    await steady(page);
    expect(await days()).toBe(daysBefore);
    expect((await panelPixels(page, "map")).hash).toBe(before[0].hash);
    expect(await page.getByRole("button", { name: "Undo" }).isDisabled()).toBe(true);
    expect(shown.complaints).toEqual([]);
  });

  test("no edge can be dragged past the other or below twice the sampling", async () => {
    const { page } = shown;
    const [short, long] = [await slider("shortestDays"), await slider("longestDays")];
    // The sample leaves the long side open: this closes it well inside the record.
    await dragEdge("longestDays", 60);
    await dragEdge("shortestDays", -3000);
    expect(await short.days()).toBe((await long.days()) - 1);
    // Where they meet both can still be taken hold of.
    const met = await long.days();
    await dragEdge("longestDays", -40);
    expect(await long.days()).toBeGreaterThan(met);
    await dragEdge("shortestDays", 3000);
    const least = Number(await short.handle.getAttribute("aria-valuemin"));
    expect(await short.days()).toBeGreaterThanOrEqual(least);
    await short.handle.focus();
    await page.keyboard.press("Home");
    expect(await short.days()).toBe(least);
    expect(await short.handle.getAttribute("aria-valuetext")).toBe(`${least} days`);
    await steady(page);
    expect(shown.complaints).toEqual([]);
  });

  test("the cursor is one line at one latitude through all panels", async () => {
    const { page } = shown;
    const map = await panelFrame(page, "map");
    const picture = await panelFrame(page, "latitude-time");
    const y = Math.round(map.y + map.height / 3);
    await page.mouse.click(map.x + 40, y);
    const line = await page.locator('[data-cursor="latitude"]').boundingBox();
    if (!line) throw new Error("there is no cursor");
    expect(line.x).toBeLessThanOrEqual(map.x);
    expect(line.x + line.width).toBeGreaterThanOrEqual(picture.x + picture.width);
    expect(Math.abs(line.y + line.height / 2 - y)).toBeLessThanOrEqual(1);
    const tag = await page.locator(".cursor-tag text").textContent();
    for (const panel of [map, picture]) {
      await page.mouse.move(panel.x + panel.width / 2, y);
      // Panels show cells: the place read out is the middle of the cell under the pointer.
      const place = await page.locator(".hover .place").textContent();
      expect(Math.abs(Number.parseFloat(place ?? "") - Number.parseFloat(tag ?? ""))).toBeLessThan(0.5);
    }
  });

  test("a click in the latitude-time picture sets latitude and date, and the map follows", async () => {
    const { page } = shown;
    const before = await panelPixels(page, "map");
    const date = await page.locator(".toolbar .date").textContent();
    const picture = await panelFrame(page, "latitude-time");
    await page.mouse.click(picture.x + picture.width * 0.2, picture.y + picture.height * 0.8);
    await steady(page);
    expect(await page.locator(".toolbar .date").textContent()).not.toBe(date);
    expect((await panelPixels(page, "map")).hash).not.toBe(before.hash);
    const frame = await page.locator('[data-cursor="date latitude-time"]').boundingBox();
    expect(Math.abs((frame?.x ?? 0) - (picture.x + picture.width * 0.2))).toBeLessThan(6);
  });

  test("the keyboard does what the mouse does, and says where the cursor is", async () => {
    const { page } = shown;
    const tag = page.locator(".cursor-tag text");
    const latitude = await tag.textContent();
    await page.keyboard.press("ArrowUp");
    expect(await tag.textContent()).not.toBe(latitude);
    await page.keyboard.press("ArrowDown");
    expect(await tag.textContent()).toBe(latitude);
    const date = await page.locator(".toolbar .date").textContent();
    await page.keyboard.press("ArrowRight");
    expect(await page.locator(".toolbar .date").textContent()).not.toBe(date);
    const { days } = await slider("shortestDays");
    const before = await days();
    await page.keyboard.press("]");
    expect(await days()).toBeGreaterThan(before);
    await page.keyboard.press("Control+z");
    expect(await days()).toBe(before);
    await steady(page);
    await page.waitForFunction(() => {
      const said = document.querySelector('[data-spoken="cursor"]')?.textContent ?? "";
      return /degrees (north|south), \d+ \w+ \d+: /.test(said);
    });
    await page.keyboard.press("?");
    expect(await page.getByRole("dialog").isVisible()).toBe(true);
    await page.keyboard.press("Escape");
    expect(await page.getByRole("dialog").count()).toBe(0);
    expect(shown.complaints).toEqual([]);
  });

  test("space plays the dates one after another until it is pressed again", async () => {
    const { page } = shown;
    const date = page.locator(".toolbar .date");
    const seen = new Set<string | null>();
    await page.keyboard.press(" ");
    for (let look = 0; look < 40 && seen.size < 4; look++) {
      seen.add(await date.textContent());
      await page.waitForTimeout(100);
    }
    await page.keyboard.press(" ");
    expect(seen.size).toBeGreaterThanOrEqual(4);
    await steady(page);
    const rest = await date.textContent();
    await page.waitForTimeout(400);
    expect(await date.textContent()).toBe(rest);
  });

  test("quantity and band switch change title, units and colours", async () => {
    const { page } = shown;
    const before = await panelPixels(page, "map");
    await page.getByLabel("Quantity").selectOption("vorticity");
    await page.waitForFunction(() =>
      document.querySelector('[data-mark="map-heading"]')?.textContent?.includes("Relative vorticity"),
    );
    await steady(page);
    const vorticity = await panelPixels(page, "map");
    expect(vorticity.hash).not.toBe(before.hash);
    await page.getByText("As it stands").click();
    await page.waitForFunction(() =>
      document.querySelector('[data-mark="map-subheading"]')?.textContent?.includes("all periods"),
    );
    await steady(page);
    expect((await panelPixels(page, "map")).hash).not.toBe(vorticity.hash);
    expect(shown.complaints).toEqual([]);
  });

  test("the profile can be read as a table", async () => {
    const { page } = shown;
    await page.getByText("Profile as a table").click();
    const rows = page.locator(".profile-table tbody tr");
    await rows.first().waitFor();
    expect(await rows.count()).toBeGreaterThan(10);
    expect(await page.locator(".profile-table tr.at-cursor").count()).toBe(1);
  });
});
