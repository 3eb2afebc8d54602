import type { ProcessStarter } from "../engine/process/process-port";

/** The parts of Electron's UtilityProcess that are used. */
export interface UtilityProcessLike {
  readonly pid: number | undefined;
  postMessage(message: unknown): void;
  on(event: "message", listener: (message: unknown) => void): unknown;
  once(event: "exit", listener: (code: number) => void): unknown;
  kill(): boolean;
}

/** A starter by Electron's utilityProcess.fork, passed in. Such a process has no channel to close: asked to end, it is ended. */
export function utilityEngine(fork: () => UtilityProcessLike): ProcessStarter {
  return () => {
    const child = fork();
    return {
      pid: child.pid,
      send: (message) => child.postMessage(message),
      onMessage: (listener) => void child.on("message", listener),
      onExit: (listener) => void child.once("exit", (code) => listener({ code, signal: null })),
      disconnect: () => void child.kill(),
      kill: () => void child.kill(),
    };
  };
}
