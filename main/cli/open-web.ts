import { spawn } from "node:child_process";
import { startEngineHost } from "../engine/process/engine-host";
import { forkEngine } from "../engine/process/fork-engine";
import { createGrants } from "../engine/process/grants";
import { readPageFiles } from "../engine/process/page-files";
import type { Places } from "../engine/process/places";
import type { ProcessStarter } from "../engine/process/process-port";
import { startWebHost } from "../web/web-host";

export interface OpenedWeb {
  /** Address with its token, good once. */
  readonly address: string;
  readonly port: number;
  close(): Promise<void>;
}

export interface WebOptions {
  readonly paths: readonly string[];
  readonly port?: number;
  /** How the engine's process starts; by forking the built entry unless a test says otherwise. */
  readonly startEngine?: ProcessStarter;
}

/** Starts the engine and the loopback door with `paths` granted. Throws a Fault where a path or the built page is missing. */
export async function openWeb(places: Places, options: WebOptions): Promise<OpenedWeb> {
  const files = await readPageFiles(places.pageFolder);
  const grants = createGrants();
  const paths = await grants.grant(options.paths);
  const engineHost = startEngineHost(options.startEngine ?? forkEngine(places.engineEntry));
  try {
    const door = await startWebHost({ files, engineHost, grants, paths, port: options.port });
    return {
      address: door.address,
      port: door.port,
      close: async () => {
        await door.close();
        await engineHost.close();
      },
    };
  } catch (error) {
    await engineHost.close();
    throw error;
  }
}

/** Shows an address by a command of the system; false where the command is not there or fails. */
export function showAddress(command: readonly [string, ...string[]], address: string): Promise<boolean> {
  return new Promise((resolve) => {
    const [name, ...args] = command;
    const child = spawn(name, [...args, address], { stdio: "ignore", detached: true });
    child.on("error", () => resolve(false));
    // Some of these commands stay until the browser closes: still there after a second means shown.
    const shown = setTimeout(() => resolve(true), 1000);
    child.on("exit", (code) => {
      clearTimeout(shown);
      resolve(code === 0);
    });
    child.unref();
  });
}
