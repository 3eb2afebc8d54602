import type { Port } from "../../../core/contract/port";

/** A started engine process, whichever way it was started. */
export interface ProcessHandle {
  readonly pid: number | undefined;
  send(message: unknown): void;
  onMessage(listener: (message: unknown) => void): void;
  /** Called once, also when the process could not be started at all. */
  onExit(listener: (how: { code: number | null; signal: string | null }) => void): void;
  /** Asks the process to end by closing its channel, or ends it where there is no channel to close. */
  disconnect(): void;
  /** Ends it at once. */
  kill(): void;
}

/** Starts the engine process anew. */
export type ProcessStarter = () => ProcessHandle;

/** The sides of `process` in a forked child that are used. */
export interface ForkedProcessLike {
  send?(message: unknown, callback?: (error: Error | null) => void): boolean;
  on(event: "message", listener: (message: unknown) => void): unknown;
  on(event: "disconnect", listener: () => void): unknown;
  disconnect?(): void;
}

/** The channel to the parent, seen from a process forked with serialization "advanced". */
export function parentProcessPort(own: ForkedProcessLike): Port {
  return {
    // Without a callback a parent that has gone away would raise an error event of the process.
    post: (message) => void own.send?.(message, () => undefined),
    onMessage: (listener) => void own.on("message", listener),
    onClose: (listener) => void own.on("disconnect", listener),
    close: () => own.disconnect?.(),
  };
}
