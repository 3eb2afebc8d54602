import { isOwnAddress, pageAddress } from "./window-options";

interface Preventable {
  preventDefault(): void;
}

/** The parts of Electron's WebContents that decide where a window may go. */
export interface SealableContents {
  on(event: "will-attach-webview", listener: (event: Preventable) => void): unknown;
  on(
    event: "will-navigate" | "will-redirect" | "will-frame-navigate",
    listener: (event: Preventable & { url: string }) => void,
  ): unknown;
  setWindowOpenHandler(handler: () => { action: "deny" }): void;
}

/** The parts of Electron's Session that grant permissions and reach the network. */
export interface SealableSession {
  setPermissionRequestHandler(
    handler: (contents: unknown, permission: string, answer: (granted: boolean) => void) => void,
  ): void;
  setPermissionCheckHandler(handler: () => boolean): void;
  setDevicePermissionHandler(handler: () => boolean): void;
  readonly webRequest: {
    onBeforeRequest(
      listener: (details: { url: string }, answer: (response: { cancel: boolean }) => void) => void,
    ): void;
  };
}

/** True for what the page may fetch: its own files, and pictures and files it makes itself. */
export function mayRequest(address: string): boolean {
  return isOwnAddress(address) || address.startsWith(`blob:${pageAddress}`) || address.startsWith("data:image/");
}

/** Refuses every way out of the page: navigation, redirects, new windows, web views. */
export function sealContents(contents: SealableContents): void {
  const stay = (event: Preventable & { url: string }) => {
    if (!isOwnAddress(event.url)) event.preventDefault();
  };
  contents.on("will-navigate", stay);
  contents.on("will-redirect", stay);
  contents.on("will-frame-navigate", stay);
  contents.on("will-attach-webview", (event) => event.preventDefault());
  contents.setWindowOpenHandler(() => ({ action: "deny" }));
}

/** Refuses every permission and device, and every request for anything but the page's own files. */
export function sealSession(session: SealableSession): void {
  session.setPermissionRequestHandler((_contents, _permission, answer) => answer(false));
  session.setPermissionCheckHandler(() => false);
  session.setDevicePermissionHandler(() => false);
  session.webRequest.onBeforeRequest(({ url }, answer) => answer({ cancel: !mayRequest(url) }));
}
