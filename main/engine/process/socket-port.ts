import type { RawData, WebSocket } from "ws";
import type { Port } from "../../../core/contract/port";
import { decodeFrame, encodeFrame } from "../../../core/contract/wire-frame";

export interface SocketLimits {
  /** Largest frame sent; a larger message throws from post. */
  readonly sentBytes: number;
  /** Largest frame taken; the socket's own maxPayload must not be above it. */
  readonly receivedBytes: number;
}

function bytesOf(data: RawData): Uint8Array {
  if (Array.isArray(data)) return Buffer.concat(data);
  return data instanceof ArrayBuffer ? new Uint8Array(data) : data;
}

/**
 * A WebSocket as a Port: one message, one binary frame of wire-frame's bytes. A frame that cannot be read, or a text
 * frame, is handed on as undefined, so that whoever serves the port counts it as refused. What is posted on a socket not
 * open is dropped.
 */
export function socketPort(socket: WebSocket, limits: SocketLimits): Port {
  const listeners: ((message: unknown) => void)[] = [];
  // ws reports a broken frame as an error and closes the socket itself; unheard, the error would end the process.
  socket.on("error", () => socket.terminate());
  socket.on("message", (data: RawData, isBinary: boolean) => {
    let message: unknown;
    try {
      if (isBinary) message = decodeFrame(bytesOf(data), limits.receivedBytes);
    } catch {
      message = undefined;
    }
    for (const listener of listeners) listener(message);
  });
  return {
    post(message) {
      const frame = encodeFrame(message, limits.sentBytes);
      if (socket.readyState === socket.OPEN) socket.send(frame);
    },
    onMessage: (listener) => void listeners.push(listener),
    onClose: (listener) => void socket.on("close", listener),
    close: () => socket.close(),
  };
}
