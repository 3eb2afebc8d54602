import type { Port } from "../../core/contract/port";
import { decodeFrame, encodeFrame, largestAnswerBytes, largestRequestBytes } from "../../core/contract/wire-frame";

/** A port over the page's own host: binary frames on a WebSocket at /engine. Rejects where the host does not answer. */
export function openWebPort(): Promise<Port> {
  return new Promise((resolve, reject) => {
    const scheme = location.protocol === "https:" ? "wss" : "ws";
    const socket = new WebSocket(`${scheme}://${location.host}/engine`);
    socket.binaryType = "arraybuffer";
    const refuse = (): void => reject(new Error("the host of this page does not answer"));
    socket.addEventListener("error", refuse, { once: true });
    socket.addEventListener("close", refuse, { once: true });
    const early = keepEarly(socket);
    socket.addEventListener("open", () => resolve(socketPort(socket, early)), { once: true });
  });
}

/** Keeps frames that arrive before anybody listens: the host greets at once. */
function keepEarly(socket: WebSocket): (listener: (data: unknown) => void) => void {
  const kept: unknown[] = [];
  let deliver: (data: unknown) => void = (data) => kept.push(data);
  socket.addEventListener("message", (event) => deliver(event.data));
  return (listener) => {
    deliver = listener;
    for (const data of kept.splice(0)) listener(data);
  };
}

function socketPort(socket: WebSocket, onData: (listener: (data: unknown) => void) => void): Port {
  return {
    post(message) {
      if (socket.readyState !== WebSocket.OPEN) throw new Error("the connection is closed");
      socket.send(encodeFrame(message, largestRequestBytes));
    },
    onMessage(listener) {
      onData((data) => {
        if (data instanceof ArrayBuffer) listener(decodeFrame(new Uint8Array(data), largestAnswerBytes));
      });
    },
    onClose: (listener) => socket.addEventListener("close", () => listener()),
    close: () => socket.close(),
  };
}
