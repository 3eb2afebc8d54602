import { fork } from "node:child_process";
import type { ProcessStarter } from "./process-port";

export interface ForkOptions {
  /** Arguments for Node itself, before the entry; none by default, whatever the parent was given. */
  readonly execArgv?: readonly string[];
}

/**
 * A starter that forks Node with the engine's entry file and a channel that keeps typed arrays (structured clone). Where
 * the process writes to the terminal, so does the parent.
 */
export function forkEngine(entryPath: string, options: ForkOptions = {}): ProcessStarter {
  return () => {
    const child = fork(entryPath, [], {
      serialization: "advanced",
      execArgv: [...(options.execArgv ?? [])],
      // A Ctrl-C on the terminal reaches the whole group; a group of its own leaves the end to the host, in order.
      detached: process.platform !== "win32",
      stdio: ["ignore", "inherit", "inherit", "ipc"],
    });
    let exited = false;
    const exitListeners: Parameters<ReturnType<ProcessStarter>["onExit"]>[0][] = [];
    const exit = (code: number | null, signal: string | null) => {
      if (exited) return;
      exited = true;
      for (const listener of exitListeners) listener({ code, signal });
    };
    child.on("exit", exit);
    child.on("error", () => {
      // A fault of the channel alone (a write to an ended process) is followed by the exit itself.
      if (child.pid === undefined) exit(null, null);
    });
    return {
      pid: child.pid,
      send: (message) => {
        if (child.connected) child.send(message as object, () => undefined);
      },
      onMessage: (listener) => void child.on("message", listener),
      onExit: (listener) => void exitListeners.push(listener),
      disconnect: () => {
        if (child.connected) child.disconnect();
      },
      kill: () => void child.kill("SIGKILL"),
    };
  };
}
