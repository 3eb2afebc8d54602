import { connectEngine } from "../../../core/contract/client";
import type { Engine } from "../../../core/contract/engine";
import type { ProcessStarter } from "./process-port";
import { restartingPort } from "./restarting-port";

/** The engine in a process of its own, as a door sees it. */
export interface EngineHost {
  /** Stays the same over restarts of the process; serves any number of windows. */
  readonly engine: Engine;
  /** Calls `listener` each time the process was started anew and is ready; gives back how to stop listening. */
  onRestart(listener: () => void): () => void;
  /** Id of the process now running. */
  pid(): number | undefined;
  /** Ends the process; settles when it is gone. */
  close(): Promise<void>;
}

/** Starts the engine's process and keeps one running until closed; see restartingPort. */
export function startEngineHost(start: ProcessStarter): EngineHost {
  const { port, pid, close } = restartingPort(start);
  const listeners = new Set<() => void>();
  const engine = connectEngine(port, {
    onHello: (_welcome, again) => {
      if (again) for (const listener of listeners) listener();
    },
  });
  return {
    engine,
    onRestart(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    pid,
    close,
  };
}
