import type { Browser, Page } from "playwright-core";

/** A page on the window, with everything it complained about. */
export interface TestWindow {
  readonly page: Page;
  /** Console errors and warnings, uncaught errors and failed requests so far. */
  readonly complaints: string[];
}

export interface WindowOptions {
  readonly width?: number;
  readonly height?: number;
  readonly scheme?: "light" | "dark";
  readonly pixelRatio?: number;
}

export async function openWindow(browser: Browser, address: string, options: WindowOptions = {}): Promise<TestWindow> {
  const { width = 1440, height = 900, scheme = "light", pixelRatio = 1 } = options;
  const context = await browser.newContext({
    viewport: { width, height },
    colorScheme: scheme,
    deviceScaleFactor: pixelRatio,
  });
  const page = await context.newPage();
  const complaints: string[] = [];
  page.on("console", (message) => {
    // The door's entrance page has no icon, which some browsers ask for all the same; the window's page names its own.
    if (message.location().url.endsWith("/favicon.ico")) return;
    if (message.type() === "error" || message.type() === "warning") complaints.push(message.text());
  });
  page.on("pageerror", (error) => complaints.push(error.message));
  page.on("requestfailed", (request) => complaints.push(`${request.url()} failed`));
  await page.goto(address);
  // The address leads on to the page by a refresh.
  await page.waitForSelector("#root > *", { timeout: 20_000 });
  return { page, complaints };
}

/** Loads the page again as if for the first time: nothing kept from before, no complaints. */
export async function startAfresh({ page, complaints }: TestWindow): Promise<void> {
  await page.evaluate(() => {
    localStorage.clear();
    // The page being left must not keep a last draft on its way out.
    Storage.prototype.setItem = () => {};
  });
  await page.mouse.move(0, 0);
  await page.reload();
  complaints.length = 0;
}

/** Waits until the figure is drawn and nothing more is being computed for it. */
export async function drawn(page: Page): Promise<void> {
  await page.waitForSelector(".scene canvas", { timeout: 60_000 });
  await page.waitForSelector('[data-mark="spectrum-line"]', { state: "attached", timeout: 60_000 });
  await steady(page);
}

/** Waits until nothing is being computed and two looks a tenth of a second apart see the same pixels. */
export async function steady(page: Page): Promise<void> {
  let before = "";
  for (let look = 0; look < 60; look++) {
    await page.waitForTimeout(100);
    await page.waitForSelector('.figure-pane[aria-busy="false"]', { timeout: 30_000 });
    const now = await rasterHash(page);
    if (now === before) return;
    before = now;
  }
  throw new Error("the figure does not come to rest");
}

export interface Frame {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Frame of a panel in page pixels. */
export async function panelFrame(page: Page, panel: string): Promise<Frame> {
  const frame = await page.locator(`[data-panel="${panel}"]`).boundingBox();
  if (!frame) throw new Error(`the panel "${panel}" is not drawn`);
  return frame;
}

/** Numbers that tell two drawings of a panel apart, and how many colours it has. */
export async function panelPixels(page: Page, panel: string): Promise<{ hash: string; colours: number }> {
  return page.evaluate((id) => {
    const canvas = document.querySelector<HTMLCanvasElement>(".scene canvas");
    const hit = document.querySelector<SVGRectElement>(`[data-panel="${id}"]`);
    if (!canvas || !hit) throw new Error(`nothing is drawn for ${id}`);
    // Read from a copy: reading back the window's own canvas would make the browser warn about it.
    const context = new OffscreenCanvas(canvas.width, canvas.height).getContext("2d", { willReadFrequently: true });
    if (!context) throw new Error("no canvas to copy to");
    context.drawImage(canvas, 0, 0);
    const ratio = canvas.width / canvas.clientWidth;
    const [x, y, width, height] = [hit.x, hit.y, hit.width, hit.height].map((each) => each.baseVal.value * ratio);
    const { data } = context.getImageData(x + 2, y + 2, width - 4, height - 4);
    const words = new Uint32Array(data.buffer);
    let hash = 2166136261;
    for (const word of words) hash = Math.imul(hash ^ word, 16777619) >>> 0;
    return { hash: hash.toString(16), colours: new Set(words).size };
  }, panel);
}

async function rasterHash(page: Page): Promise<string> {
  const panels = await Promise.all(["map", "latitude-time"].map((panel) => panelPixels(page, panel)));
  return panels.map(({ hash }) => hash).join(" ");
}
