import { mkdtemp, realpath, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { MessageChannel, type MessagePort } from "node:worker_threads";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { connectDoor } from "../../../core/contract/client";
import { choosePaths, type Dialogs, dialogPlan, withStudyEnding } from "../../../main/desktop/dialogs";
import { forwardPort, type PageLike, type PreloadIpc } from "../../../main/desktop/handshake";
import { menuTemplate } from "../../../main/desktop/menu";
import { utilityEngine } from "../../../main/desktop/utility-engine";
import { createWindowDoor } from "../../../main/desktop/window-door";
import { createGrants } from "../../../main/engine/process/grants";
import { type ElectronMessagePortLike, nodeMessagePort } from "../../../main/engine/process/message-port";
import { createStandIn } from "../../core/contract/stand-in-engine";

let folder: string;
beforeAll(async () => {
  folder = await realpath(await mkdtemp(path.join(tmpdir(), "strake-desktop-")));
  await writeFile(path.join(folder, "a.nc"), "x");
});
afterAll(() => rm(folder, { recursive: true }));

function dialogs(chosen: string | undefined): Dialogs {
  const canceled = chosen === undefined;
  return {
    open: async () => ({ canceled, filePaths: chosen === undefined ? [] : [chosen] }),
    save: async () => ({ canceled, filePath: chosen ?? "" }),
  };
}

describe("a dialog", () => {
  test("for data takes several files, for a folder one folder, for places a name", () => {
    expect(dialogPlan("data").options.properties).toEqual(["openFile", "multiSelections"]);
    expect(dialogPlan("folder").options.properties).toEqual(["openDirectory"]);
    expect([dialogPlan("study-place").kind, dialogPlan("result-place").kind]).toEqual(["save", "save"]);
  });

  test("opens what was chosen to the window and nothing beside it", async () => {
    const grants = createGrants();
    const file = path.join(folder, "a.nc");
    expect(await choosePaths(dialogs(file), grants, "data")).toEqual([file]);
    expect(await grants.readable(file)).toBe(file);
    await expect(grants.readable(path.join(folder, "b.nc"))).rejects.toMatchObject({ tag: "request" });
  });

  test("for a place lets it be written, under a study's name where it is one", async () => {
    const grants = createGrants();
    expect(await choosePaths(dialogs(path.join(folder, "s.json")), grants, "study-place")).toEqual([
      path.join(folder, "s.study.json"),
    ]);
    expect(await grants.writable(path.join(folder, "s.study.json"))).toBe(path.join(folder, "s.study.json"));
    await choosePaths(dialogs(path.join(folder, "r")), grants, "result-place");
    expect(await grants.writable(path.join(folder, "r", "summary.json"))).toBe(path.join(folder, "r", "summary.json"));
    await expect(grants.writable(path.join(folder, "other"))).rejects.toMatchObject({ tag: "request" });
  });

  test("closed opens nothing", async () => {
    for (const what of ["data", "folder", "study-place", "result-place"] as const) {
      expect(await choosePaths(dialogs(undefined), createGrants(), what)).toEqual([]);
    }
  });

  test.each([
    ["a", "a.study.json"],
    ["a.json", "a.study.json"],
    ["a.study.json", "a.study.json"],
  ])("names a study chosen as %s %s", (chosen, named) => {
    expect(withStudyEnding(chosen)).toBe(named);
  });
});

test("the menu opens files and folders, and has the application's own menu on a Mac only", () => {
  const done: string[] = [];
  const actions = { openFiles: () => done.push("files"), openFolder: () => done.push("folder") };
  const [file] = menuTemplate(actions, false);
  for (const item of file.submenu as { click?: () => void }[]) item.click?.();
  expect(done).toEqual(["files", "folder"]);
  expect(menuTemplate(actions, true)[0].role).toBe("appMenu");
});

describe("the preload", () => {
  function setUp() {
    const posted: unknown[][] = [];
    const sent: string[] = [];
    let fromPage: (event: { source: unknown; origin: string; data: unknown }) => void = () => undefined;
    let fromMain: (event: { ports: readonly unknown[] }) => void = () => undefined;
    const page: PageLike = {
      location: { origin: "strake://window" },
      addEventListener: (_type, listener) => {
        fromPage = listener;
      },
      postMessage: (...args) => posted.push(args),
    };
    const ipc: PreloadIpc = {
      send: (channel) => sent.push(channel),
      on: (_channel, listener) => {
        fromMain = listener;
      },
    };
    forwardPort(page, ipc);
    return {
      page,
      posted,
      sent,
      say: (event: Parameters<typeof fromPage>[0]) => fromPage(event),
      give: (ports: unknown[]) => fromMain({ ports }),
    };
  }

  test("passes the page's request on, and one port back to the page's own origin", () => {
    const { page, posted, sent, say, give } = setUp();
    say({ source: page, origin: "strake://window", data: "strake-ask-port" });
    expect(sent).toEqual(["strake:port"]);
    give(["the port"]);
    give([]);
    expect(posted).toEqual([["strake-port", "strake://window", ["the port"]]]);
  });

  test("hears no frame, no other origin and no other word", () => {
    const { page, sent, say } = setUp();
    say({ source: {}, origin: "strake://window", data: "strake-ask-port" });
    say({ source: page, origin: "https://evil.example", data: "strake-ask-port" });
    say({ source: page, origin: "strake://window", data: "strake-port" });
    say({ source: page, origin: "strake://window", data: { strake: "strake-ask-port" } });
    expect(sent).toEqual([]);
  });
});

describe("the door behind the window's port", () => {
  /** Node's port in the dress of Electron's. */
  function dress(port: MessagePort): ElectronMessagePortLike {
    return {
      postMessage: (message) => port.postMessage(message),
      on: (event: string, listener: (value: never) => void) =>
        port.on(event, (data: unknown) => listener((event === "message" ? { data } : undefined) as never)),
      start: () => port.start(),
      close: () => port.close(),
    };
  }

  test("greets, guards, asks and opens; a page loaded anew gets a new port and the old one ends", async () => {
    const standIn = createStandIn();
    const grants = createGrants();
    const paths = await grants.grant([folder]);
    const given: MessagePort[] = [];
    let restart: () => void = () => undefined;
    const door = createWindowDoor({
      engineHost: {
        engine: standIn,
        onRestart: (listener) => {
          restart = listener;
          return () => undefined;
        },
        pid: () => 1,
        close: async () => undefined,
      },
      grants,
      paths,
      onAsk: async () => [folder],
      makeChannel: () => {
        const { port1, port2 } = new MessageChannel();
        given.push(port2);
        return { port1: dress(port1), port2: dress(port2) };
      },
    });
    door.opened(["nobody hears this"]);
    door.connect();
    const heard: unknown[] = [];
    const ended = new Promise<void>((resolve) => {
      const connection = connectDoor(nodeMessagePort(given[0]), {
        onHello: (welcome, again) => heard.push([welcome, again]),
        onOpened: (opened) => heard.push(opened),
        onEnd: () => resolve(),
      });
      void (async () => {
        expect(await connection.ask("folder")).toEqual([folder]);
        await expect(connection.engine.open({ paths: ["/etc/passwd"] })).rejects.toMatchObject({ tag: "request" });
        expect((await connection.engine.open({ paths: [folder] })).path).toBe(folder);
        restart();
        door.opened([folder]);
        await connection.engine.check({ study: 1 });
        door.connect();
      })();
    });
    await ended;
    const welcome = { door: "desktop", paths: [folder] };
    expect(heard).toEqual([[welcome, false], [welcome, true], [folder]]);
    expect(standIn.called).toEqual(["open", "check"]);
    given[1].close();
  });
});

test("the engine as a utility process sends, hears, and is ended when asked", () => {
  const log: unknown[] = [];
  const listeners = new Map<string, (value: never) => void>();
  const start = utilityEngine(() => ({
    pid: 9,
    postMessage: (message) => log.push(message),
    on: (event, listener) => listeners.set(event, listener),
    once: (event, listener) => listeners.set(event, listener),
    kill: () => log.push("kill") > 0,
  }));
  const handle = start();
  handle.send("m");
  handle.onMessage((message) => log.push(message));
  handle.onExit((how) => log.push(how));
  listeners.get("message")?.("answer" as never);
  listeners.get("exit")?.(3 as never);
  handle.disconnect();
  handle.kill();
  expect([handle.pid, log]).toEqual([9, ["m", "answer", { code: 3, signal: null }, "kill", "kill"]]);
});
