import { Fault, type FaultData, faultData } from "../model/errors";
import type { Engine, EngineMethod } from "./engine";
import type { CallOptions } from "./job";
import type { Port } from "./port";
import {
  type AskMessage,
  type CallMessage,
  type Choice,
  type EngineMessage,
  type RequestOf,
  type ValueOf,
  type Welcome,
  wireVersion,
} from "./wire";
import { type CancelSource, cancelSource } from "./wire-cancel";
import { readClientMessage, refusedCallId } from "./wire-check";
import { throttleProgress } from "./wire-progress";

export interface ServeOptions {
  /** Said to the client on arrival; by default the engine's own process without paths. */
  readonly welcome?: Welcome;
  /** Shows a dialog and gives the paths chosen; where it is left out, asking is refused with a reason. */
  readonly onAsk?: (what: Choice) => Promise<readonly string[]>;
  /** Clock in milliseconds for the spacing of progress; the system's by default. */
  readonly now?: () => number;
  /** Calls a client may have under way at once; 256 by default. */
  readonly mostAtOnce?: number;
}

export interface Served {
  /** Greets again: the client learns that the engine was started anew. */
  greet(): void;
  /** Tells the client of paths opened by the door's own means. */
  opened(paths: readonly string[]): void;
  /** Messages refused so far: no message at all, unknown method, wrong shape, id in use, too many at once. */
  refused(): number;
  /** Calls under way. */
  running(): number;
}

type Handlers = { [M in EngineMethod]: (args: RequestOf<M>, options?: CallOptions) => Promise<ValueOf<M>> };

function start<M extends EngineMethod>(engine: Engine, message: CallMessage<M>, options: CallOptions) {
  const handlers: Handlers = engine;
  return handlers[message.method](message.args, options);
}

const badRequest: FaultData = {
  tag: "request",
  where: "message to the engine",
  expected: "a known method with its arguments, under an id not in use, fewer calls at once",
  got: "something else",
  advice: "reload the window; if it happens again please report it",
};

const noDialogs: FaultData = {
  tag: "request",
  where: "choosing files",
  expected: "a window of the desktop application",
  got: "a page in a browser, which has no dialogs for files of this machine",
  advice: "type the path of a file or folder below one that was opened at the start",
};

/**
 * Answers the calls that arrive on `port` with `engine`. Never throws into the port: whatever is wrong with a message is
 * refused and counted, and told to the sender where the message bears an id. Thrown errors cross as FaultData. A cancelled
 * call gets no answer; when the port closes everything under way is cancelled.
 */
export function serveEngine(engine: Engine, port: Port, options: ServeOptions = {}): Served {
  const { welcome = { door: "process", paths: [] }, onAsk, now = Date.now, mostAtOnce = 256 } = options;
  const underWay = new Map<number, CancelSource>();
  let refused = 0;

  function post(message: EngineMessage): boolean {
    try {
      port.post(message);
      return true;
    } catch {
      return false;
    }
  }

  function refuse(message: unknown): void {
    refused += 1;
    const id = refusedCallId(message);
    // An id in use belongs to a call that will get its own answer.
    if (id !== undefined && !underWay.has(id)) post({ kind: "failure", id, fault: badRequest });
  }

  async function work(message: CallMessage | AskMessage, source: CancelSource): Promise<unknown> {
    if (message.kind === "ask") {
      if (!onAsk) throw new Fault(noDialogs);
      return onAsk(message.what);
    }
    const { id } = message;
    const send = throttleProgress((progress) => post({ kind: "progress", id, progress }), now);
    const value = await start(engine, message, {
      signal: source.signal,
      onProgress: (progress) => {
        if (underWay.get(id) === source && !source.signal.aborted) send.report(progress);
      },
    });
    if (!source.signal.aborted) send.flush();
    return value;
  }

  async function answer(message: CallMessage | AskMessage): Promise<void> {
    const { id } = message;
    const source = cancelSource();
    underWay.set(id, source);
    let reply: EngineMessage;
    try {
      reply = { kind: "result", id, value: await work(message, source) };
    } catch (error) {
      reply = { kind: "failure", id, fault: faultData(error) };
    }
    underWay.delete(id);
    if (source.signal.aborted || post(reply) || reply.kind === "failure") return;
    const got = "a result that cannot be sent (too large, or not plain data)";
    post({ kind: "failure", id, fault: { ...faultData(undefined), where: "answer of the engine", got } });
  }

  port.onMessage((value) => {
    const message = readClientMessage(value);
    if (message?.kind === "cancel") return underWay.get(message.id)?.cancel();
    if (!message || underWay.has(message.id) || underWay.size >= mostAtOnce) return refuse(value);
    void answer(message);
  });
  port.onClose(() => {
    for (const source of underWay.values()) source.cancel();
  });

  const served: Served = {
    greet: () => void post({ kind: "hello", version: wireVersion, ...welcome }),
    opened: (paths) => void post({ kind: "opened", paths }),
    refused: () => refused,
    running: () => underWay.size,
  };
  served.greet();
  return served;
}
