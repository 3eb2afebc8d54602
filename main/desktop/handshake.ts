/**
 * How the page gets its MessagePort in the desktop door.
 *
 * 1. The page, once it listens, posts the text "strake-ask-port" to itself: window.postMessage(text, location.origin).
 * 2. The preload hears it and asks the main process.
 * 3. The main process makes a channel, serves the engine on one end and sends the other to the preload.
 * 4. The preload posts the text "strake-port" to the page with that end as `event.ports[0]`.
 *
 * A reloaded page asks again; the channel before it is closed. Messages on the port are the contract's, by structured clone.
 * The preload puts nothing on `window`.
 */
export const portRequest = "strake-ask-port";
export const portDelivery = "strake-port";
/** Channel between preload and main process; carries nothing but the two steps above. */
export const portChannel = "strake:port";

/** The part of a browser's window the preload uses. */
export interface PageLike {
  readonly location: { readonly origin: string };
  addEventListener(
    type: "message",
    listener: (event: { source: unknown; origin: string; data: unknown }) => void,
  ): void;
  postMessage(message: unknown, targetOrigin: string, ports: readonly unknown[]): void;
}

/** The part of Electron's ipcRenderer the preload uses. */
export interface PreloadIpc {
  send(channel: string): void;
  on(channel: string, listener: (event: { ports: readonly unknown[] }) => void): unknown;
}

/** The preload's whole work: passes the page's request on, and the port back. Only the page itself is heard. */
export function forwardPort(page: PageLike, ipc: PreloadIpc): void {
  page.addEventListener("message", (event) => {
    if (event.source === page && event.origin === page.location.origin && event.data === portRequest)
      ipc.send(portChannel);
  });
  ipc.on(portChannel, (event) => {
    const [port] = event.ports;
    if (port) page.postMessage(portDelivery, page.location.origin, [port]);
  });
}
