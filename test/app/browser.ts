import { execFileSync } from "node:child_process";
import { accessSync, constants } from "node:fs";
import path from "node:path";
import { type Browser, chromium } from "playwright-core";

const names = ["chromium", "chromium-browser", "google-chrome"];
const calm = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

/** A headless Chromium of this machine; installed first where there is none. Fails with one line that says what to do. */
export async function launchBrowser(): Promise<Browser> {
  const executablePath = onPath() ?? installed();
  return chromium.launch({ executablePath, args: calm });
}

function onPath(): string | undefined {
  const folders = (process.env.PATH ?? "").split(path.delimiter).filter((folder) => folder !== "");
  return folders.flatMap((folder) => names.map((name) => path.join(folder, name))).find(isExecutable);
}

function isExecutable(file: string): boolean {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function installed(): string {
  const isDebianRoot = process.platform === "linux" && process.getuid?.() === 0 && isExecutable("/usr/bin/apt-get");
  const [command, ...rest] = isDebianRoot
    ? ["apt-get", "install", "-y", "--no-install-recommends", "chromium"]
    : ["npx", "playwright-core", "install", "chromium"];
  try {
    execFileSync(command, rest, { stdio: "ignore", timeout: 170_000 });
  } catch {
    throw new Error(
      `The app tests need Chromium: install it with "${[command, ...rest].join(" ")}" and run them again.`,
    );
  }
  const found = onPath() ?? chromium.executablePath();
  if (isExecutable(found)) return found;
  throw new Error(`The app tests need Chromium on the PATH as ${names.join(", ")}; none was found after installing.`);
}
