import { mkdtemp, realpath, rm, symlink, writeFile } from "node:fs/promises";
import { request as httpRequest, type IncomingMessage } from "node:http";
import { connect } from "node:net";
import { networkInterfaces, tmpdir } from "node:os";
import path from "node:path";
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { WebSocket } from "ws";
import { connectEngine } from "../../../core/contract/client";
import { largestRequestBytes } from "../../../core/contract/wire-frame";
import { createGrants } from "../../../main/engine/process/grants";
import { readPageFiles } from "../../../main/engine/process/page-files";
import { socketPort } from "../../../main/engine/process/socket-port";
import { startWebHost, type WebHost } from "../../../main/web/web-host";
import { createStandIn, type StandIn, standInStudy } from "../../core/contract/stand-in-engine";

let folder: string;
let host: WebHost;
let standIn: StandIn;
let restart: () => void;
const open: WebSocket[] = [];

beforeAll(async () => {
  folder = await realpath(await mkdtemp(path.join(tmpdir(), "strake-web-")));
  await writeFile(path.join(folder, "index.html"), "<!doctype html><title>page</title>");
  await writeFile(path.join(folder, "secret.key"), "not a page's file");
  await symlink("/etc/hostname", path.join(folder, "link.html"));
});
afterAll(() => rm(folder, { recursive: true }));

beforeEach(async () => {
  standIn = createStandIn();
  const listeners = new Set<() => void>();
  restart = () => {
    for (const listener of listeners) listener();
  };
  const grants = createGrants();
  const paths = await grants.grant([folder]);
  const engineHost = {
    engine: standIn,
    onRestart: (listener: () => void) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    pid: () => 1,
    close: async () => undefined,
  };
  host = await startWebHost({ files: await readPageFiles(folder), engineHost, grants, paths });
});
afterEach(async () => {
  for (const socket of open.splice(0)) socket.terminate();
  await host.close();
});

function ask(
  target: string,
  headers: Record<string, string> = {},
  method = "GET",
  body?: string,
): Promise<IncomingMessage> {
  return new Promise((resolve, reject) => {
    const sent = httpRequest({ host: "127.0.0.1", port: host.port, path: target, method, headers }, (answer) => {
      answer.resume();
      answer.on("end", () => resolve(answer));
    });
    sent.on("error", reject);
    sent.end(body);
  });
}

async function enter(): Promise<string> {
  const { pathname, search } = new URL(host.address);
  const answer = await ask(pathname + search);
  return String(answer.headers["set-cookie"]).split(";")[0];
}

/** Opens a web socket; gives it, or the status of the refusal. */
function openSocket(headers: Record<string, string>, origin?: string, target = "/engine"): Promise<WebSocket | number> {
  return new Promise((resolve) => {
    const socket = new WebSocket(`ws://127.0.0.1:${host.port}${target}`, { headers, origin });
    open.push(socket);
    socket.on("open", () => resolve(socket));
    socket.on("unexpected-response", (_request, answer) => resolve(Number(answer.statusCode)));
    socket.on("error", () => resolve(0));
  });
}

const ownOrigin = () => `http://127.0.0.1:${host.port}`;
const limits = { sentBytes: 2 ** 26, receivedBytes: 2 ** 28 };

async function ownSocket(cookie: string): Promise<WebSocket> {
  const socket = await openSocket({ cookie }, ownOrigin());
  if (typeof socket === "number") throw new Error(`refused with ${socket}`);
  return socket;
}

async function until(isSo: () => boolean): Promise<void> {
  const end = Date.now() + 5000;
  while (!isSo()) {
    if (Date.now() > end) throw new Error("it did not come to be within 5 s");
    await new Promise((resolve) => setTimeout(resolve, 5));
  }
}

describe("the loopback door", () => {
  test("listens on loopback and on no other address of this machine", async () => {
    const addresses = Object.values(networkInterfaces())
      .flatMap((list) => list ?? [])
      .map(({ address }) => address);
    const reaches = (address: string) =>
      new Promise<boolean>((resolve) => {
        const socket = connect({ host: address, port: host.port }, () => resolve(true));
        socket.on("error", () => resolve(false));
        socket.setTimeout(1000, () => resolve(false));
        socket.on("close", () => socket.destroy());
      });
    expect(await reaches("127.0.0.1")).toBe(true);
    for (const address of addresses.filter((each) => each !== "127.0.0.1")) expect(await reaches(address)).toBe(false);
  });

  test("serves the page for the cookie only, again after a reload, and the token is good once", async () => {
    expect((await ask("/")).statusCode).toBe(403);
    const cookie = await enter();
    expect((await ask("/", { cookie })).statusCode).toBe(200);
    expect((await ask("/", { cookie })).statusCode).toBe(200);
    expect((await ask(new URL(host.address).pathname + new URL(host.address).search)).statusCode).toBe(403);
  });

  test("serves neither links nor files of other kinds from the page's folder", async () => {
    const cookie = await enter();
    for (const target of ["/secret.key", "/link.html", "/../../etc/passwd", "/..%2f..%2fetc%2fpasswd"]) {
      expect((await ask(target, { cookie })).statusCode).toBe(404);
    }
  });

  test("refuses foreign hosts and origins, forms and their bodies, and goes on", async () => {
    const cookie = await enter();
    expect((await ask("/", { cookie, host: `rebound.example:${host.port}` })).statusCode).toBe(421);
    expect((await ask("/", { cookie, origin: "https://evil.example" })).statusCode).toBe(403);
    expect((await ask("/", { cookie }, "POST", "paths=/etc")).statusCode).toBe(405);
    expect((await ask("/", { cookie, "content-length": "3" }, "GET", "abc")).statusCode).toBe(400);
    expect((await ask("/", { cookie })).statusCode).toBe(200);
  });

  test("opens a web socket for its own page only", async () => {
    const cookie = await enter();
    expect(await openSocket({}, ownOrigin())).toBe(403);
    expect(await openSocket({ cookie })).toBe(403);
    expect(await openSocket({ cookie }, "null")).toBe(403);
    expect(await openSocket({ cookie }, "https://evil.example")).toBe(403);
    expect(await openSocket({ cookie }, `http://localhost:${host.port}`)).toBe(403);
    expect(
      await openSocket({ cookie, host: `rebound.example:${host.port}` }, `http://rebound.example:${host.port}`),
    ).toBe(421);
    expect(await openSocket({ cookie }, ownOrigin(), "/engine/../engine2")).toBe(404);
    expect(await openSocket({ cookie, "sec-fetch-site": "cross-site" }, ownOrigin())).toBe(403);
    expect(await openSocket({ cookie }, ownOrigin())).toBeInstanceOf(WebSocket);
    expect(standIn.called).toEqual([]);
  });

  test("carries calls of several windows apart, greets them with the paths, and again after a restart", async () => {
    const cookie = await enter();
    const heard: unknown[] = [];
    const windows = await Promise.all([1, 2].map(() => ownSocket(cookie)));
    const engines = windows.map((socket) =>
      connectEngine(socketPort(socket, limits), { onHello: (welcome, again) => heard.push([welcome, again]) }),
    );
    const answers = await Promise.all(
      engines.map((engine, index) => engine.open({ paths: [path.join(folder, `${index}.nc`)] })),
    );
    expect(answers.map((each) => each.path)).toEqual([0, 1].map((index) => path.join(folder, `${index}.nc`)));
    heard.length = 0;
    restart();
    await until(() => heard.length === 2);
    expect(heard).toEqual([1, 2].map(() => [{ door: "web", paths: [folder] }, expect.any(Boolean)]));
  });

  test("lets no window read what was not opened", async () => {
    const engine = connectEngine(socketPort(await ownSocket(await enter()), limits));
    for (const requested of ["/etc/passwd", `${folder}/../other`, `${folder}-2/a`, `${folder}/link.html`, "a.nc"]) {
      await expect(engine.open({ paths: [requested] })).rejects.toMatchObject({ tag: "request" });
    }
    expect(standIn.called).toEqual([]);
  });

  test("counts frames that are text, damaged or too deep, and closes on one too large", async () => {
    const socket = await ownSocket(await enter());
    for (const frame of ["text", Buffer.of(0xc1), Buffer.of(), Buffer.of(0x92, 1), Buffer.alloc(2 ** 20, 0x91)])
      socket.send(frame);
    await until(() => host.refused() === 5);
    const closed = new Promise((resolve) => socket.on("close", resolve));
    socket.send(Buffer.alloc(largestRequestBytes + 1));
    await closed;
    expect((await ask("/")).statusCode).toBe(403);
  });

  test("stops the work of a window that goes away", async () => {
    const socket = await ownSocket(await enter());
    const engine = connectEngine(socketPort(socket, limits));
    const open = { study: standInStudy, folder, path: "" };
    const running = engine.run({ open, folder: path.join(folder, "r"), overwrite: false });
    const failed = expect(running).rejects.toMatchObject({ where: "connection to the engine" });
    await until(() => standIn.called.includes("run"));
    socket.terminate();
    await failed;
    await until(() => standIn.cancelled() === 1);
  });

  test("takes at most sixteen windows", async () => {
    const cookie = await enter();
    for (let window = 0; window < 16; window++) await ownSocket(cookie);
    expect(await openSocket({ cookie }, ownOrigin())).toBe(429);
  });

  test("says which port is taken", async () => {
    const again = { files: new Map(), grants: createGrants(), paths: [], port: host.port };
    const engineHost = {
      engine: standIn,
      onRestart: () => () => undefined,
      pid: () => 1,
      close: async () => undefined,
    };
    await expect(startWebHost({ ...again, engineHost })).rejects.toMatchObject({
      where: `port ${host.port}`,
      got: "EADDRINUSE",
    });
  });
});

test("a page that is not built is told so", async () => {
  await expect(readPageFiles(path.join(folder, "none"))).rejects.toMatchObject({
    tag: "file",
    expected: "the built window",
  });
});
