import type { FaultData } from "../model/errors";
import type { Engine, EngineMethod } from "./engine";
import type { Progress } from "./job";

/** Raised whenever a message changes its meaning; both sides must agree. */
export const wireVersion = 1;

export type RequestOf<M extends EngineMethod> = Parameters<Engine[M]>[0];
export type ValueOf<M extends EngineMethod> = Awaited<ReturnType<Engine[M]>>;

type CallMessages = {
  [M in EngineMethod]: { readonly kind: "call"; readonly id: number; readonly method: M; readonly args: RequestOf<M> };
};
/** A call of one method; without a parameter, of any. `id` is the caller's own count: whole, at least 0, not in use. */
export type CallMessage<M extends EngineMethod = EngineMethod> = CallMessages[M];

/** The caller no longer wants the answer: work stops, nothing is answered. */
export interface CancelMessage {
  readonly kind: "cancel";
  readonly id: number;
}

/** What a door can be asked to let the person choose; desktop only. */
export type Choice = "data" | "folder" | "study-place" | "result-place";

/** Asks the door for a dialog. Answered by a result whose value is the paths chosen, none when the dialog was closed. */
export interface AskMessage {
  readonly kind: "ask";
  readonly id: number;
  readonly what: Choice;
}

export type ClientMessage = CallMessage | CancelMessage | AskMessage;

export interface ResultMessage {
  readonly kind: "result";
  readonly id: number;
  readonly value: unknown;
}

export interface FailureMessage {
  readonly kind: "failure";
  readonly id: number;
  readonly fault: FaultData;
}

export interface ProgressMessage {
  readonly kind: "progress";
  readonly id: number;
  readonly progress: Progress;
}

/** Which way the window reaches the engine; "process" is the engine's own process, with no window before it. */
export type DoorKind = "process" | "web" | "desktop";

/** What a client learns on arrival. */
export interface Welcome {
  readonly door: DoorKind;
  /** Paths the person opened before the window was there: absolute, already granted. */
  readonly paths: readonly string[];
}

/**
 * First message on a connection. A second one on the same connection says that the engine was started anew: records
 * loaded before are gone and are loaded again by asking for them.
 */
export interface HelloMessage extends Welcome {
  readonly kind: "hello";
  readonly version: number;
}

/** The person opened paths by the door's own menu; they are granted. */
export interface OpenedMessage {
  readonly kind: "opened";
  readonly paths: readonly string[];
}

export type EngineMessage = ResultMessage | FailureMessage | ProgressMessage | HelloMessage | OpenedMessage;
