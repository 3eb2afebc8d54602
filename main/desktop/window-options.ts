import type { BrowserWindowConstructorOptions } from "electron";

/** Where the page lives: a scheme of Strake's own, so that no page has the rights of file:. */
export const pageScheme = "strake";
export const pageOrigin = `${pageScheme}://window`;
export const pageAddress = `${pageOrigin}/`;

/** Options of the one window: the page in a sandbox, apart from the preload, without Node, other origins or other windows. */
export function windowOptions(preload: string): BrowserWindowConstructorOptions {
  return {
    width: 1440,
    height: 900,
    minWidth: 960,
    minHeight: 600,
    show: false,
    title: "Strake",
    webPreferences: {
      preload,
      sandbox: true,
      contextIsolation: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      webSecurity: true,
      allowRunningInsecureContent: false,
      experimentalFeatures: false,
      webviewTag: false,
      navigateOnDragDrop: false,
      spellcheck: false,
    },
  };
}

/** True for an address of Strake's own page. The origin is compared whole. */
export function isOwnAddress(address: string): boolean {
  return address === pageOrigin || address.startsWith(pageAddress);
}
