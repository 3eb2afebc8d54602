import { Fault, type FaultData, faultData } from "../model/errors";
import type { Engine, EngineMethod } from "./engine";
import type { CallOptions } from "./job";
import type { Port } from "./port";
import {
  type Choice,
  type ClientMessage,
  type EngineMessage,
  type RequestOf,
  type ValueOf,
  type Welcome,
  wireVersion,
} from "./wire";
import { readEngineMessage } from "./wire-check";

export interface ConnectOptions {
  /** On arrival, and again (`again` true) each time the engine was started anew and has forgotten its records. */
  readonly onHello?: (welcome: Welcome, again: boolean) => void;
  /** The person opened paths by the door's menu. */
  readonly onOpened?: (paths: readonly string[]) => void;
  /** The connection ended; every call under way and every later one is rejected with this fault. */
  readonly onEnd?: (fault: Fault) => void;
  /** Messages refused so far, each time one is. */
  readonly onRefused?: (count: number) => void;
}

export interface DoorConnection {
  readonly engine: Engine;
  /** Has the door show a dialog; the paths chosen are granted. Rejects with a Fault in the web door. */
  ask(what: Choice): Promise<readonly string[]>;
}

interface Pending {
  settle(): void;
  resolve(value: unknown): void;
  reject(fault: Fault): void;
  progress?: CallOptions["onProgress"];
}

const closedFault: FaultData = {
  tag: "internal",
  where: "connection to the engine",
  expected: "an open connection",
  got: "a closed one",
  advice: "start Strake again, or reload the window; the study on screen is kept",
};

function versionFault(version: number): Fault {
  return new Fault({
    tag: "internal",
    where: "connection to the engine",
    expected: `messages of version ${wireVersion}`,
    got: `version ${version}`,
    advice: "close all windows of Strake and start it again",
  });
}

function cancelledFault(method: string): Fault {
  return new Fault({
    tag: "cancelled",
    where: method,
    expected: "time to finish",
    got: "a cancel",
    advice: "start it again when you want it",
  });
}

function unsendableFault(method: string, error: unknown): Fault {
  const got = faultData(error).got;
  const advice = "reload the window; if it happens again please report it";
  return new Fault(
    { tag: "request", where: method, expected: "a request of plain data", got, advice },
    { cause: error },
  );
}

/**
 * The engine at the other end of `port`, and its door. Each call settles once: with its value, with the Fault the engine
 * threw, at once with a Fault tagged "cancelled" when its signal aborts, or with a Fault when the connection ends.
 */
export function connectDoor(port: Port, options: ConnectOptions = {}): DoorConnection {
  const pending = new Map<number, Pending>();
  let nextId = 0;
  let refused = 0;
  let greeted = false;
  let ended: Fault | undefined;

  function end(fault: Fault): void {
    if (ended) return;
    ended = fault;
    for (const call of [...pending.values()]) {
      call.settle();
      call.reject(fault);
    }
    options.onEnd?.(fault);
  }

  function send(where: string, make: (id: number) => ClientMessage, { signal, onProgress }: CallOptions = {}) {
    return new Promise<unknown>((resolve, reject) => {
      if (ended) return reject(ended);
      if (signal?.aborted) return reject(cancelledFault(where));
      const id = nextId++;
      const onAbort = () => {
        settle();
        reject(cancelledFault(where));
        try {
          port.post({ kind: "cancel", id } satisfies ClientMessage);
        } catch {
          // A port that cannot take a cancel is closing, which stops the work as well.
        }
      };
      const settle = () => {
        pending.delete(id);
        signal?.removeEventListener("abort", onAbort);
      };
      pending.set(id, { settle, resolve, reject, progress: onProgress });
      signal?.addEventListener("abort", onAbort);
      try {
        port.post(make(id));
      } catch (error) {
        settle();
        reject(unsendableFault(where, error));
      }
    });
  }

  function call<M extends EngineMethod>(method: M, args: RequestOf<M>, callOptions?: CallOptions): Promise<ValueOf<M>> {
    // The server checks the request against the method; the value is what the engine's own types promise.
    const make = (id: number) => ({ kind: "call", id, method, args }) as ClientMessage;
    return send(method, make, callOptions) as Promise<ValueOf<M>>;
  }

  function greet(version: number, welcome: Welcome): void {
    if (version !== wireVersion) {
      end(versionFault(version));
      return;
    }
    const again = greeted;
    greeted = true;
    options.onHello?.(welcome, again);
  }

  function receive(message: EngineMessage): void {
    if (message.kind === "opened") options.onOpened?.(message.paths);
    else if (message.kind === "hello") greet(message.version, { door: message.door, paths: message.paths });
    else if (message.kind === "progress") pending.get(message.id)?.progress?.(message.progress);
    else {
      const waiting = pending.get(message.id);
      // An answer may cross the cancel of its call on the way; nobody waits for it.
      waiting?.settle();
      if (message.kind === "result") waiting?.resolve(message.value);
      else waiting?.reject(new Fault(message.fault));
    }
  }

  port.onMessage((value) => {
    try {
      const message = readEngineMessage(value);
      if (message) receive(message);
      else options.onRefused?.(++refused);
    } catch {
      // A listener of the caller threw; the port must go on delivering to the others.
    }
  });
  port.onClose(() => end(new Fault(closedFault)));

  const engine: Engine = {
    open: (args, callOptions) => call("open", args, callOptions),
    describe: (args, callOptions) => call("describe", args, callOptions),
    check: (args, callOptions) => call("check", args, callOptions),
    load: (args, callOptions) => call("load", args, callOptions),
    latitudes: (args, callOptions) => call("latitudes", args, callOptions),
    spectrum: (args, callOptions) => call("spectrum", args, callOptions),
    velocities: (args, callOptions) => call("velocities", args, callOptions),
    jets: (args, callOptions) => call("jets", args, callOptions),
    eddyTest: (args, callOptions) => call("eddyTest", args, callOptions),
    scales: (args, callOptions) => call("scales", args, callOptions),
    run: (args, callOptions) => call("run", args, callOptions),
    save: (args, callOptions) => call("save", args, callOptions),
  };
  return {
    engine,
    ask: (what) => send("choosing files", (id) => ({ kind: "ask", id, what })) as Promise<readonly string[]>,
  };
}

/** The engine at the other end of `port`; see connectDoor. */
export function connectEngine(port: Port, options: ConnectOptions = {}): Engine {
  return connectDoor(port, options).engine;
}
