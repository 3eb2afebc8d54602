import { spawn } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import path from "node:path";

/** Longest time the fetch of Electron's runtime is waited for, in milliseconds. */
const fetchMilliseconds = 20_000;

function electronFolder(root: string): string | undefined {
  try {
    return path.dirname(createRequire(path.join(root, "package.json")).resolve("electron/package.json"));
  } catch {
    return undefined;
  }
}

function presentRuntime(folder: string): string | undefined {
  const note = path.join(folder, "path.txt");
  if (!existsSync(note)) return undefined;
  const dist = process.env.ELECTRON_OVERRIDE_DIST_PATH ?? path.join(folder, "dist");
  const executable = path.join(dist, readFileSync(note, "utf8").trim());
  return existsSync(executable) ? executable : undefined;
}

function fetchRuntime(folder: string): Promise<void> {
  return new Promise((resolve) => {
    // The package's own installer, quiet: where it cannot reach the network the second door opens, and one line says so.
    const child = spawn(process.execPath, [path.join(folder, "install.js")], { stdio: "ignore" });
    const patience = setTimeout(() => child.kill("SIGKILL"), fetchMilliseconds);
    const done = () => {
      clearTimeout(patience);
      resolve();
    };
    child.on("exit", done);
    child.on("error", done);
  });
}

/**
 * Path of Electron's executable; undefined where the package or its runtime is not there and cannot be fetched within 20 s.
 * The package without a runtime fetches it once, by its own installer, into its own folder.
 */
export async function findElectron(root: string): Promise<string | undefined> {
  const folder = electronFolder(root);
  if (!folder) return undefined;
  const present = presentRuntime(folder);
  if (present) return present;
  await fetchRuntime(folder);
  return presentRuntime(folder);
}
