import type { Engine } from "../../../core/contract/engine";
import type { Port } from "../../../core/contract/port";
import { serveEngine } from "../../../core/contract/server";

/** An engine that can give back its threads and files. */
export type ClosableEngine = Engine & { close(): Promise<void> };

/** Longest time the engine has to end its work, in milliseconds, before its process ends regardless. */
const graceMilliseconds = 1500;

/**
 * Serves `engine` on `port` until the port closes, which is also how the death of the parent shows; then closes the engine
 * and calls `exit`, after 1.5 s at the latest, so that no process is left behind.
 */
export function serveProcess(engine: ClosableEngine, port: Port, exit: (code: number) => void): void {
  serveEngine(engine, port);
  port.onClose(() => {
    setTimeout(() => exit(0), graceMilliseconds).unref();
    engine.close().then(
      () => exit(0),
      () => exit(1),
    );
  });
}
