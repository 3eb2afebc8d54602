/**
 * Entry of the engine's own process: forked by Node (channel of child_process) or started by Electron as a utility process
 * (process.parentPort). Nothing but the parent can reach it: it opens no socket.
 */
import { createEngine } from "../engine";
import { type ElectronMessagePortLike, electronMessagePort } from "./message-port";
import { parentProcessPort } from "./process-port";
import { serveProcess } from "./serve-process";

const { parentPort } = process as typeof process & { parentPort?: ElectronMessagePortLike };

if (!parentPort && !process.send) {
  console.error("engine-process: expected to be started by Strake, got a start by hand; use the strake command");
  process.exit(2);
}
serveProcess(createEngine(), parentPort ? electronMessagePort(parentPort) : parentProcessPort(process), (code) =>
  process.exit(code),
);
