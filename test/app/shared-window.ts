import { mkdirSync } from "node:fs";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, beforeEach } from "vitest";
import { launchBrowser } from "./browser";
import { type Door, startDoor } from "./door";
import { drawn, openWindow, startAfresh, type TestWindow } from "./window";

/**
 * One window on a study for all tests of a file, started afresh and drawn before each of them.
 * The window is filled in before the first test; its pictures may be saved under `out/app`.
 */
export function sharedWindow(study: string): TestWindow {
  const shown = {} as TestWindow;
  let browser: Browser | undefined;
  let door: Door | undefined;

  beforeAll(async () => {
    mkdirSync("out/app", { recursive: true });
    browser = await launchBrowser();
    door = await startDoor([study]);
    Object.assign(shown, await openWindow(browser, door.address));
  });

  afterAll(async () => {
    await browser?.close();
    await door?.stop();
  });

  beforeEach(async () => {
    await startAfresh(shown);
    await drawn(shown.page);
  });

  return shown;
}
