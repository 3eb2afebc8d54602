import { fileURLToPath } from "node:url";
import { forkEngine } from "../../../../main/engine/process/fork-engine";
import type { ProcessStarter } from "../../../../main/engine/process/process-port";

/** Loader for TypeScript in plain Node, for processes the tests start. */
export const loader = ["--import", "tsx"] as const;

/** A starter of the stand-in's process. */
export function forkStandIn(): ProcessStarter {
  return forkEngine(fileURLToPath(new URL("./stand-in-process.ts", import.meta.url)), { execArgv: loader });
}

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

/** Waits until `isSo`, at most `milliseconds`; gives the time it took. */
export async function waitFor(isSo: () => boolean, milliseconds: number): Promise<number> {
  const begun = performance.now();
  while (!isSo()) {
    if (performance.now() - begun > milliseconds) throw new Error(`it did not come to be within ${milliseconds} ms`);
    await new Promise((resolve) => setTimeout(resolve, 5));
  }
  return performance.now() - begun;
}
