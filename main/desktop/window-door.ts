import { type Served, serveEngine } from "../../core/contract/server";
import type { Choice } from "../../core/contract/wire";
import type { EngineHost } from "../engine/process/engine-host";
import type { Grants } from "../engine/process/grants";
import { guardEngine } from "../engine/process/guard-engine";
import { type ElectronMessagePortLike, electronMessagePort } from "../engine/process/message-port";
import { isOwnAddress } from "./window-options";

export interface WindowDoor {
  /** Serves the engine on a new channel and closes the one before; gives the end that goes to the page. */
  connect(): ElectronMessagePortLike;
  /** Tells the page of paths opened by the menu. */
  opened(paths: readonly string[]): void;
}

export interface WindowDoorOptions {
  readonly engineHost: EngineHost;
  readonly grants: Grants;
  readonly paths: readonly string[];
  readonly onAsk: (what: Choice) => Promise<readonly string[]>;
  /** Electron's MessageChannelMain, made anew. */
  readonly makeChannel: () => { port1: ElectronMessagePortLike; port2: ElectronMessagePortLike };
}

/** The engine behind the window's one port: guarded by the grants, greeting again when the engine was started anew. */
export function createWindowDoor(options: WindowDoorOptions): WindowDoor {
  const { engineHost, grants, paths, onAsk, makeChannel } = options;
  const engine = guardEngine(engineHost.engine, grants);
  let current: { served: Served; port: ElectronMessagePortLike } | undefined;
  engineHost.onRestart(() => current?.served.greet());
  return {
    connect() {
      current?.port.close?.();
      const { port1, port2 } = makeChannel();
      const served = serveEngine(engine, electronMessagePort(port1), { welcome: { door: "desktop", paths }, onAsk });
      current = { served, port: port1 };
      return port2;
    },
    opened: (opened) => current?.served.opened(opened),
  };
}

/** True where a request for the port comes from the page itself: the window's main frame, at Strake's own address. */
export function isOwnFrame(frame: { url: string; parent: unknown } | null): boolean {
  return frame !== null && frame.parent === null && isOwnAddress(frame.url);
}
