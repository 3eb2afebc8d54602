import { mkdirSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { launchBrowser } from "./browser";
import { sampleStudy, startDoor } from "./door";

/** Takes the README's pictures from the running app: `npm run pictures`, after a build. */
async function takePictures(): Promise<void> {
  const folder = fileURLToPath(new URL("pictures", import.meta.url));
  mkdirSync(folder, { recursive: true });
  const door = await startDoor([sampleStudy]);
  const browser = await launchBrowser();
  try {
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, colorScheme: "light" });
    await page.goto(door.address);
    await page.getByText("Which periods to keep").waitFor({ timeout: 60_000 });
    await page.waitForTimeout(1500);
    await page.getByText("Jets in this band").waitFor({ timeout: 60_000 });
    await page.waitForTimeout(5000);
    await page.screenshot({ path: `${folder}/latitudes.png` });
    await page.getByRole("tab", { name: "Scales" }).click();
    await page.getByText("Lengths on one ruler").waitFor({ timeout: 120_000 });
    await page.waitForTimeout(1500);
    await page.screenshot({ path: `${folder}/scales.png` });
  } finally {
    await browser.close();
    await door.stop();
  }
}

await takePictures();
