import { execFileSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { requirePython } from "./python";

/** Builds what the tests start as processes, and makes sure of Debian's Python packages, once before all tests. */
export default function setup(): void {
  requirePython();
  const root = fileURLToPath(new URL("../..", import.meta.url));
  execFileSync(process.execPath, ["node_modules/electron-vite/bin/electron-vite.js", "build"], {
    cwd: root,
    stdio: ["ignore", "ignore", "inherit"],
  });
}
