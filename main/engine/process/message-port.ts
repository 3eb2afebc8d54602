import type { Port } from "../../../core/contract/port";

/** What a MessagePort of node:worker_threads does, as far as it is used. */
export interface NodeMessagePortLike {
  postMessage(message: unknown): void;
  on(event: "message", listener: (message: unknown) => void): unknown;
  on(event: "close", listener: () => void): unknown;
  start(): void;
  close(): void;
}

/** A MessagePort of node:worker_threads as a Port. Messages wait until the first listener is there. */
export function nodeMessagePort(port: NodeMessagePortLike): Port {
  return {
    post: (message) => port.postMessage(message),
    onMessage: (listener) => {
      port.on("message", listener);
      port.start();
    },
    onClose: (listener) => void port.on("close", listener),
    close: () => port.close(),
  };
}

/** What Electron's MessagePortMain and a utility process' parentPort do, as far as used: messages come inside an event. */
export interface ElectronMessagePortLike {
  postMessage(message: unknown): void;
  on(event: "message", listener: (event: { data: unknown }) => void): unknown;
  on(event: "close", listener: () => void): unknown;
  /** parentPort has neither of these: it runs from the start, and ends with its process. */
  start?(): void;
  close?(): void;
}

/** A port of Electron as a Port. Messages of a MessagePortMain wait until the first listener is there. */
export function electronMessagePort(port: ElectronMessagePortLike): Port {
  return {
    post: (message) => port.postMessage(message),
    onMessage: (listener) => {
      port.on("message", (event) => listener(event.data));
      port.start?.();
    },
    onClose: (listener) => void port.on("close", listener),
    close: () => port.close?.(),
  };
}
