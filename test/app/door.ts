import { type ChildProcess, spawn } from "node:child_process";
import { existsSync, readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("../..", import.meta.url));
const command = path.join(root, "dist/main/strake.js");
export const sampleStudy = path.join(root, "sample-data/halcyon.study.json");

/** The loopback door of the built application, started for a test. */
export interface Door {
  /** Good for one browser. */
  readonly address: string;
  /** Process ids of the engine: children of the door. */
  enginePids(): readonly number[];
  stop(): Promise<void>;
}

/** Starts `strake open --web` with the paths given; settles when it has printed its address. */
export async function startDoor(paths: readonly string[]): Promise<Door> {
  if (!existsSync(command)) {
    throw new Error('The app tests need the built application: run "npx electron-vite build" first.');
  }
  const child = spawn(process.execPath, [command, "open", "--web", "--port", "0", ...paths], {
    cwd: root,
    // Without a display the address is printed instead of shown.
    env: { ...process.env, DISPLAY: "", WAYLAND_DISPLAY: "" },
    stdio: ["ignore", "pipe", "pipe"],
  });
  const address = await printedAddress(child);
  const { pid } = child;
  return {
    address,
    enginePids: () => (pid === undefined ? [] : childrenOf(pid)),
    stop: () =>
      new Promise((resolve) => {
        if (child.exitCode !== null || child.signalCode !== null) return resolve();
        child.once("exit", () => resolve());
        child.kill("SIGTERM");
      }),
  };
}

function printedAddress(child: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = "";
    const hear = (chunk: Buffer): void => {
      said += chunk.toString();
      const found = /http:\/\/127\.0\.0\.1:\d+\/\S*/.exec(said);
      if (found) resolve(found[0]);
    };
    child.stdout?.on("data", hear);
    child.stderr?.on("data", hear);
    child.once("exit", (code) => reject(new Error(`the door ended with code ${code}: ${said.trim()}`)));
  });
}

/** Direct children of a process, from the kernel's own list (Linux). */
function childrenOf(parent: number): readonly number[] {
  return readdirSync("/proc")
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => parentOf(pid) === parent);
}

function parentOf(pid: number): number | undefined {
  try {
    // The name in brackets may hold spaces: the parent is the second field after the last bracket.
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    return Number(stat.slice(stat.lastIndexOf(")") + 2).split(" ")[1]);
  } catch {
    return undefined;
  }
}
