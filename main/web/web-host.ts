import { createServer, type IncomingMessage, type Server, STATUS_CODES } from "node:http";
import type { AddressInfo } from "node:net";
import type { Duplex } from "node:stream";
import { type WebSocket, WebSocketServer } from "ws";
import { type Served, serveEngine } from "../../core/contract/server";
import { largestAnswerBytes, largestRequestBytes } from "../../core/contract/wire-frame";
import { Fault } from "../../core/model/errors";
import type { EngineHost } from "../engine/process/engine-host";
import type { Grants } from "../engine/process/grants";
import { guardEngine } from "../engine/process/guard-engine";
import type { PageFiles } from "../engine/process/page-files";
import { socketPort } from "../engine/process/socket-port";
import { answerRequest, type DoorState } from "./answer";
import { socketRefusal } from "./request-checks";
import { requestSigns } from "./request-signs";
import { createSession } from "./session";

/** Windows at once; each has calls of its own. */
const mostSockets = 16;
const loopback = "127.0.0.1";

export interface WebHostOptions {
  readonly files: PageFiles;
  readonly engineHost: EngineHost;
  readonly grants: Grants;
  /** Granted paths the page opens by itself. */
  readonly paths: readonly string[];
  /** 0, the default, leaves the choice to the system. */
  readonly port?: number;
}

export interface WebHost {
  /** Where to go, token included: http://127.0.0.1:PORT/enter?token=… Good once. */
  readonly address: string;
  readonly port: number;
  /** Messages refused on the sockets now open. */
  refused(): number;
  close(): Promise<void>;
}

function listen(server: Server, port: number): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once("error", (cause: NodeJS.ErrnoException) => {
      const advice = "choose another port with --port, or leave it out";
      const where = `port ${port}`;
      reject(new Fault({ tag: "request", where, expected: "a free port", got: cause.code ?? "", advice }, { cause }));
    });
    server.listen({ host: loopback, port, exclusive: true }, () => resolve((server.address() as AddressInfo).port));
  });
}

function refuseUpgrade(socket: Duplex, status: number): void {
  socket.on("error", () => socket.destroy());
  socket.end(`HTTP/1.1 ${status} ${STATUS_CODES[status]}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`);
}

/**
 * Opens the loopback door: serves the page, and its WebSocket at /engine on the same address (one message, one binary frame,
 * see wire-frame). Listens on 127.0.0.1 only and writes no log, so the token is nowhere but in the address. Behind an ssh
 * tunnel both ends must have the same port number, since the Host is compared. Throws a Fault where the port is taken.
 */
export async function startWebHost(options: WebHostOptions): Promise<WebHost> {
  const { files, engineHost, grants, paths } = options;
  const engine = guardEngine(engineHost.engine, grants);
  const served = new Map<WebSocket, Served>();
  const sockets = new WebSocketServer({
    noServer: true,
    maxPayload: largestRequestBytes,
    perMessageDeflate: false,
    clientTracking: false,
  });
  const server = createServer({ maxHeaderSize: 16_384, requestTimeout: 30_000, headersTimeout: 10_000 });
  const port = await listen(server, options.port ?? 0);
  const state: DoorState = { port, files, session: createSession(port) };

  function welcomeSocket(socket: WebSocket): void {
    const limits = { sentBytes: largestAnswerBytes, receivedBytes: largestRequestBytes };
    const window = serveEngine(engine, socketPort(socket, limits), { welcome: { door: "web", paths } });
    const stop = engineHost.onRestart(() => window.greet());
    served.set(socket, window);
    socket.on("close", () => {
      stop();
      served.delete(socket);
    });
  }

  server.on("request", (request, response) => {
    const signs = requestSigns(request);
    const { status, headers, body } = answerRequest(signs, state);
    const ending = signs.hasBody ? { Connection: "close" } : {};
    response.writeHead(status, { ...headers, ...ending, "Content-Length": body.byteLength });
    response.end(signs.method === "HEAD" ? undefined : body);
  });
  server.on("upgrade", (request: IncomingMessage, stream: Duplex, head: Buffer) => {
    const refusal = socketRefusal(requestSigns(request), port, state.session.admits);
    if (refusal !== undefined) refuseUpgrade(stream, refusal);
    else if (served.size >= mostSockets) refuseUpgrade(stream, 429);
    else sockets.handleUpgrade(request, stream, head, welcomeSocket);
  });

  return {
    address: `http://${loopback}:${port}/enter?token=${state.session.token}`,
    port,
    refused: () => [...served.values()].reduce((sum, window) => sum + window.refused(), 0),
    close: () =>
      new Promise((resolve) => {
        for (const socket of served.keys()) socket.terminate();
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}
