import type { Port } from "../../core/contract/port";

/** The way this window reaches its engine: a loopback web host or the desktop's preload. */
export interface Door {
  /** Opens a fresh port; rejects where none can be had right now. */
  connect(): Promise<Port>;
}
