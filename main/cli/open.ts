import { spawn } from "node:child_process";
import { existsSync } from "node:fs";
import path from "node:path";
import { findPlaces, type Places } from "../engine/process/places";
import { browserCommand, hasDisplay, noDesktopReason, ownSurroundings, type Surroundings } from "./display";
import { findElectron } from "./find-electron";
import { openWeb, showAddress, type WebOptions } from "./open-web";

export interface OpenRequest {
  /** Studies, data files and folders; the sample study where none is named. */
  readonly paths: readonly string[];
  /** The loopback door even where Electron's runtime is present. */
  readonly web: boolean;
  /** Port of the loopback door; the system's choice where left out. */
  readonly port?: number;
}

export interface OpenIo {
  /** Lines for the person: the address of the loopback door among them. */
  readonly out: (line: string) => void;
  readonly err: (line: string) => void;
  /** Calls its argument when the person wants an end; Ctrl-C and a polite kill where left out. */
  readonly onInterrupt?: (end: () => void) => void;
  readonly surroundings?: Surroundings;
  readonly places?: Places;
  readonly startEngine?: WebOptions["startEngine"];
}

/** A start that ends with a failure this soon, in milliseconds, is taken for a window that could not be shown. */
const failedStartMilliseconds = 10_000;

function onSignal(end: () => void): void {
  process.once("SIGINT", end);
  process.once("SIGTERM", end);
  process.once("SIGHUP", end);
}

function runDesktop(executable: string, places: Places, paths: readonly string[]): Promise<"closed" | "failed"> {
  return new Promise((resolve) => {
    const begun = Date.now();
    const child = spawn(executable, [places.desktopEntry, ...paths], { stdio: ["ignore", "inherit", "inherit"] });
    const forward = () => void child.kill("SIGTERM");
    process.on("SIGTERM", forward);
    const done = (how: "closed" | "failed") => {
      process.off("SIGTERM", forward);
      resolve(how);
    };
    child.on("error", () => done("failed"));
    child.on("exit", (code) => done(code !== 0 && Date.now() - begun < failedStartMilliseconds ? "failed" : "closed"));
  });
}

/** Opens the desktop window and waits for its end; gives why it could not be, as the end of a sentence. */
async function tryDesktop(
  request: OpenRequest,
  places: Places,
  surroundings: Surroundings,
): Promise<string | undefined> {
  const reason = noDesktopReason(surroundings);
  if (reason) return reason;
  const executable = await findElectron(places.root);
  if (!executable) return "its runtime is not here and could not be fetched";
  if (!existsSync(places.desktopEntry)) return "it is not built";
  return (await runDesktop(executable, places, request.paths)) === "failed" ? "its window did not start" : undefined;
}

async function runWeb(request: OpenRequest, places: Places, surroundings: Surroundings, io: OpenIo): Promise<void> {
  const ended = new Promise<void>((resolve) => (io.onInterrupt ?? onSignal)(resolve));
  const door = await openWeb(places, { paths: request.paths, port: request.port, startEngine: io.startEngine });
  const canShow = hasDisplay(surroundings);
  const isShown = canShow && (await showAddress(browserCommand(surroundings.platform), door.address));
  if (isShown) io.out(`Strake is open in your browser (port ${door.port}); Ctrl-C here closes it.`);
  else {
    io.out(`Strake is at ${door.address}`);
    io.out(
      `The address is good for one browser. From another machine: ssh -L ${door.port}:127.0.0.1:${door.port} HOST.`,
    );
    io.out("Ctrl-C here closes it.");
  }
  await ended;
  await door.close();
}

/**
 * `strake open`: the desktop window where Electron's runtime is here or can be fetched, else, after one line that says why
 * not, the loopback door in the local browser. The address is printed where no browser could be shown. Settles with exit
 * code 0 when the person closed it; throws a Fault where a path, the port or the build is at fault.
 */
export async function openCommand(request: OpenRequest, io: OpenIo): Promise<number> {
  const { places = findPlaces(import.meta.url), surroundings = ownSurroundings() } = io;
  const named = request.paths.length > 0 ? request.paths : [places.sampleStudy];
  const absolute = { ...request, paths: named.map((given) => path.resolve(given)) };
  if (!request.web) {
    const reason = await tryDesktop(absolute, places, surroundings);
    if (!reason) return 0;
    io.err(`The desktop window cannot open: ${reason}; opening the window in a browser instead.`);
  }
  await runWeb(absolute, places, surroundings, io);
  return 0;
}
