import type { Port } from "../../core/contract/port";

/** Kind of the window message by which the desktop's preload asks for and hands over the engine's port. */
export const askForPort = "strake-ask-port";
export const handOverPort = "strake-port";

const patienceMs = 10_000;

/** A port from the desktop's preload: asked for by a window message, answered by one that carries a MessagePort. */
export function openDesktopPort(): Promise<Port> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => {
      window.removeEventListener("message", receive);
      reject(new Error("the desktop did not hand over a port"));
    }, patienceMs);
    const receive = (event: MessageEvent): void => {
      // Only this window's own preload is listened to, never a frame or an opener.
      if (event.source !== window || event.data !== handOverPort || event.ports.length !== 1) return;
      clearTimeout(timer);
      window.removeEventListener("message", receive);
      resolve(messagePort(event.ports[0]));
    };
    window.addEventListener("message", receive);
    window.postMessage(askForPort, location.origin === "null" ? "*" : location.origin);
  });
}

function messagePort(port: MessagePort): Port {
  return {
    post: (message) => port.postMessage(message),
    onMessage(listener) {
      port.onmessage = (event) => listener(event.data);
    },
    onClose: (listener) => port.addEventListener("close", () => listener()),
    close: () => port.close(),
  };
}
