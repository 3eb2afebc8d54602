import { ipcRenderer } from "electron";
import { forwardPort, type PageLike, type PreloadIpc } from "./handshake";

// In the sandbox globalThis is the page's window, which this side of the build has no types for.
forwardPort(globalThis as unknown as PageLike, ipcRenderer as unknown as PreloadIpc);
