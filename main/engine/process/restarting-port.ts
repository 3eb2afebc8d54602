import type { Port } from "../../../core/contract/port";
import type { FailureMessage } from "../../../core/contract/wire";
import { isFields } from "../../../core/contract/wire-shape";
import type { FaultData } from "../../../core/model/errors";
import type { ProcessHandle, ProcessStarter } from "./process-port";

/** Restarts allowed within a minute; after that the process is started again by the next call only. */
export const restartsAMinute = 5;
const minuteMilliseconds = 60_000;
/** Longest time a process asked to end is waited for, in milliseconds, before it is ended regardless. */
const graceMilliseconds = 2000;

export interface RestartingPort {
  /** Stays the same over restarts. One client only: call ids are one space. */
  readonly port: Port;
  pid(): number | undefined;
  /** Ends the process; settles when it is gone. Never starts another. */
  close(): Promise<void>;
}

function stoppedFault(how: { code: number | null; signal: string | null }, isRestarted: boolean): FaultData {
  return {
    tag: "internal",
    where: "engine",
    expected: "an answer",
    got: `the engine stopped (${how.signal ?? `exit code ${how.code ?? "unknown"}`}) and ${
      isRestarted ? "was restarted" : "stopped again each time it was restarted"
    }`,
    advice: isRestarted
      ? "the study and saved results are kept; try again"
      : "the study and saved results are kept; close other programs or choose a smaller region, then try again",
  };
}

/**
 * A port to a process that is started at once, and started anew when it ends unasked. Calls then under way fail with a
 * Fault that says so; later ones reach the new process. The first message of each process is its hello. `now` in ms.
 */
export function restartingPort(start: ProcessStarter, now: () => number = Date.now): RestartingPort {
  const messageListeners: ((message: unknown) => void)[] = [];
  const closeListeners: (() => void)[] = [];
  const calls = new Set<number>();
  let restarts: number[] = [];
  let current: ProcessHandle | undefined;
  let closing: Promise<void> | undefined;

  function deliver(message: unknown): void {
    for (const listener of messageListeners) listener(message);
  }

  function launch(): ProcessHandle {
    const started = start();
    current = started;
    started.onMessage((message) => {
      if (current !== started) return;
      if (isFields(message) && (message.kind === "result" || message.kind === "failure"))
        calls.delete(Number(message.id));
      deliver(message);
    });
    started.onExit((how) => {
      if (current !== started) return;
      current = undefined;
      if (!closing) ended(how);
    });
    return started;
  }

  function ended(how: { code: number | null; signal: string | null }): void {
    const failed = [...calls];
    calls.clear();
    restarts = restarts.filter((time) => now() - time < minuteMilliseconds);
    const isRestarted = restarts.length < restartsAMinute;
    if (isRestarted) {
      restarts.push(now());
      launch();
    }
    const fault = stoppedFault(how, isRestarted);
    for (const id of failed) deliver({ kind: "failure", id, fault } satisfies FailureMessage);
  }

  function endProcess(): Promise<void> {
    const handle = current;
    for (const listener of closeListeners) listener();
    if (!handle) return Promise.resolve();
    return new Promise((resolve) => {
      const patience = setTimeout(() => handle.kill(), graceMilliseconds);
      handle.onExit(() => {
        clearTimeout(patience);
        resolve();
      });
      handle.disconnect();
    });
  }

  function close(): Promise<void> {
    closing ??= endProcess();
    return closing;
  }

  launch();
  return {
    port: {
      post(message) {
        if (closing) return;
        const handle = current ?? launch();
        handle.send(message);
        if (!isFields(message)) return;
        if (message.kind === "call") calls.add(Number(message.id));
        // A cancelled call is not answered, so there is nothing left to fail.
        if (message.kind === "cancel") calls.delete(Number(message.id));
      },
      onMessage: (listener) => void messageListeners.push(listener),
      onClose: (listener) => void closeListeners.push(listener),
      close: () => void close(),
    },
    pid: () => current?.pid,
    close,
  };
}
