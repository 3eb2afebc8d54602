import { mkdir, mkdtemp, realpath, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { browserCommand, hasDisplay, noDesktopReason, type Surroundings } from "../../../main/cli/display";
import { openCommand } from "../../../main/cli/open";
import type { Places } from "../../../main/engine/process/places";
import { findPlaces } from "../../../main/engine/process/places";
import { forkStandIn, isAlive, waitFor } from "../engine/process/fork-stand-in";

let places: Places;
const bare: Surroundings = { platform: "linux", env: {}, isRoot: false };

beforeAll(async () => {
  const root = await realpath(await mkdtemp(path.join(tmpdir(), "strake-open-")));
  places = {
    root,
    desktopEntry: path.join(root, "desktop.js"),
    preload: path.join(root, "preload.cjs"),
    engineEntry: path.join(root, "engine.js"),
    workerEntry: path.join(root, "worker.js"),
    pageFolder: path.join(root, "page"),
    sampleStudy: path.join(root, "sample.study.json"),
  };
  await mkdir(places.pageFolder);
  await writeFile(path.join(places.pageFolder, "index.html"), "<!doctype html>");
  await writeFile(places.sampleStudy, "{}");
});
afterAll(() => rm(places.root, { recursive: true }));

describe("strake open", () => {
  test("without a display says so in one line, prints the address, and an interrupt ends door and engine", async () => {
    const out: string[] = [];
    const err: string[] = [];
    const pids: number[] = [];
    let interrupt: () => void = () => undefined;
    const start = forkStandIn();
    const done = openCommand(
      { paths: [], web: false },
      {
        out: (line) => out.push(line),
        err: (line) => err.push(line),
        onInterrupt: (end) => {
          interrupt = end;
        },
        surroundings: bare,
        places,
        startEngine: () => {
          const handle = start();
          pids.push(Number(handle.pid));
          return handle;
        },
      },
    );
    await waitFor(() => out.length === 3, 5000);
    expect(err).toEqual([
      "The desktop window cannot open: there is no display; opening the window in a browser instead.",
    ]);
    const address = out[0].replace("Strake is at ", "");
    expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/enter\?token=[A-Za-z0-9_-]{43}$/);
    expect((await fetch(address)).status).toBe(200);
    interrupt();
    expect(await done).toBe(0);
    await expect(fetch(address)).rejects.toThrow();
    expect(pids.map(isAlive)).toEqual([false]);
  });

  test("refuses a path that is not there before anything is started", async () => {
    const io = { out: () => undefined, err: () => undefined, onInterrupt: () => undefined, surroundings: bare, places };
    const startEngine = () => {
      throw new Error("an engine was started");
    };
    await expect(openCommand({ paths: ["none.nc"], web: true }, { ...io, startEngine })).rejects.toMatchObject({
      tag: "file",
      got: "nothing there",
    });
  });
});

test("a window is shown where there is a display, and the desktop's not as root on Linux", () => {
  const screen = { DISPLAY: ":0" };
  expect(hasDisplay(bare)).toBe(false);
  expect(hasDisplay({ ...bare, env: screen })).toBe(true);
  expect(hasDisplay({ ...bare, env: { WAYLAND_DISPLAY: "wayland-0" } })).toBe(true);
  expect(hasDisplay({ ...bare, platform: "darwin" })).toBe(true);
  expect(hasDisplay({ ...bare, platform: "win32", env: { SSH_CONNECTION: "1" } })).toBe(false);
  expect(noDesktopReason({ ...bare, env: screen, isRoot: true })).toBe("its sandbox does not run as root");
  expect(noDesktopReason({ ...bare, env: screen })).toBeUndefined();
  expect(["darwin", "win32", "linux"].map((name) => browserCommand(name as NodeJS.Platform)[0])).toEqual([
    "open",
    "rundll32",
    "xdg-open",
  ]);
});

test("the folder of Strake is found from any depth of it", () => {
  const here = findPlaces(import.meta.url);
  expect(findPlaces(new URL("../../../main/cli/open.ts", import.meta.url).href)).toEqual(here);
  expect(path.relative(here.root, here.engineEntry)).toBe(path.join("dist", "main", "engine-process.js"));
  expect(() => findPlaces("file:///nowhere/a.js")).toThrow(/no package.json of Strake/);
});
