import { once } from "node:events";
import type { AddressInfo } from "node:net";
import { MessageChannel } from "node:worker_threads";
import { WebSocket, WebSocketServer } from "ws";
import { memoryPortPair } from "../../../core/contract/memory-port";
import type { Port } from "../../../core/contract/port";
import { electronMessagePort, nodeMessagePort } from "../../../main/engine/process/message-port";
import { socketPort } from "../../../main/engine/process/socket-port";

export interface Channel {
  readonly client: Port;
  readonly server: Port;
  /** Gives back what the channel holds besides its ports. */
  close(): Promise<void>;
}

const limits = { sentBytes: 2 ** 26, receivedBytes: 2 ** 22 };

async function socketChannel(): Promise<Channel> {
  const listening = new WebSocketServer({ host: "127.0.0.1", port: 0 });
  await once(listening, "listening");
  const arrived = once(listening, "connection");
  const outgoing = new WebSocket(`ws://127.0.0.1:${(listening.address() as AddressInfo).port}`);
  const client = socketPort(outgoing, { sentBytes: limits.receivedBytes, receivedBytes: limits.sentBytes });
  const [incoming] = (await arrived) as [WebSocket];
  await once(outgoing, "open");
  return {
    client,
    server: socketPort(incoming, limits),
    close: async () => {
      outgoing.terminate();
      await new Promise((resolve) => listening.close(resolve));
    },
  };
}

function threadChannel(): Channel {
  const { port1, port2 } = new MessageChannel();
  return { client: nodeMessagePort(port1), server: nodeMessagePort(port2), close: async () => port1.close() };
}

/** Node's MessageChannel in the dress of Electron's: messages inside an event. */
function electronChannel(): Channel {
  const { port1, port2 } = new MessageChannel();
  const dressed = {
    postMessage: (message: unknown) => port2.postMessage(message),
    on: (event: string, listener: (value: never) => void) =>
      port2.on(event, (data: unknown) => listener((event === "message" ? { data } : undefined) as never)),
    start: () => port2.start(),
    close: () => port2.close(),
  };
  return { client: nodeMessagePort(port1), server: electronMessagePort(dressed), close: async () => port1.close() };
}

function memoryChannel(): Channel {
  const [client, server] = memoryPortPair();
  return { client, server, close: async () => client.close() };
}

export const channels: readonly (readonly [string, () => Promise<Channel>])[] = [
  ["a pair in memory", async () => memoryChannel()],
  ["a message channel of threads", async () => threadChannel()],
  ["a message channel of Electron's kind", async () => electronChannel()],
  ["a web socket", socketChannel],
];
