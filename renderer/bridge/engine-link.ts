import { connectDoor, type DoorConnection } from "../../core/contract/client";
import type { Engine, EngineMethod } from "../../core/contract/engine";
import type { Choice, Welcome } from "../../core/contract/wire";
import { engineMethods } from "../../core/contract/wire-methods";
import type { FaultData } from "../../core/model/errors";
import type { Door } from "./door";

export type LinkState = "connecting" | "ready" | "lost";

export interface LinkListener {
  readonly onState: (state: LinkState) => void;
  /** An engine is there; `again` where it is not the first, so that records must be loaded anew. */
  readonly onEngine: (welcome: Welcome, again: boolean) => void;
  /** The person opened paths by the door's own menu. */
  readonly onOpened: (paths: readonly string[]) => void;
}

/** An engine that may go away and come back. */
export interface EngineLink {
  readonly engine: Engine;
  /** Has the door show a dialog; rejects where the door has none. */
  ask(what: Choice): Promise<readonly string[]>;
  start(listener: LinkListener): void;
}

const firstPauseMs = 100;
const longestPauseMs = 1000;

/**
 * Keeps one engine connection through a door. When it ends, calls under way fail and a new port is asked for: soon at
 * first, then once a second, until there is one.
 */
export function engineLink(door: Door): EngineLink {
  let connection: DoorConnection | null = null;
  let greeted = false;

  const connect = async (listener: LinkListener, pauseMs: number): Promise<void> => {
    const again = (pause: number): void => {
      setTimeout(() => void connect(listener, Math.min(longestPauseMs, pause * 2)), pause);
    };
    try {
      const port = await door.connect();
      connection = connectDoor(port, {
        onHello: (welcome) => {
          const first = !greeted;
          greeted = true;
          listener.onState("ready");
          listener.onEngine(welcome, !first);
        },
        onOpened: listener.onOpened,
        onEnd: () => {
          connection = null;
          listener.onState("lost");
          again(firstPauseMs);
        },
      });
    } catch {
      again(pauseMs);
    }
  };

  return {
    engine: forwarding(() => connection?.engine ?? null),
    ask: async (what) => {
      if (!connection) throw notConnected;
      return connection.ask(what);
    },
    start(listener) {
      listener.onState("connecting");
      void connect(listener, firstPauseMs);
    },
  };
}

/** An Engine whose every call goes to whichever engine is there at that moment. */
function forwarding(current: () => Engine | null): Engine {
  const forward =
    (method: EngineMethod) =>
    async (request: unknown, options: unknown): Promise<unknown> => {
      const engine = current();
      if (!engine) throw notConnected;
      return (engine[method] as (request: unknown, options: unknown) => Promise<unknown>)(request, options);
    };
  // The list holds every method of the contract, or the contract would not compile.
  return Object.fromEntries(engineMethods.map((method) => [method, forward(method)])) as unknown as Engine;
}

const notConnected: FaultData = {
  tag: "internal",
  where: "engine",
  expected: "a running engine",
  got: "no connection to it",
  advice: "wait a moment: it is being started again",
};
