import { describe, expect, test } from "vitest";
import { answerPage } from "../../../main/desktop/page-protocol";
import {
  mayRequest,
  type SealableContents,
  type SealableSession,
  sealContents,
  sealSession,
} from "../../../main/desktop/seal-window";
import { isOwnFrame } from "../../../main/desktop/window-door";
import { isOwnAddress, windowOptions } from "../../../main/desktop/window-options";

const foreign = [
  "https://evil.example/",
  "http://127.0.0.1/",
  "file:///etc/passwd",
  "strake://other/",
  "strake://window.evil.example/",
  "strake://window@evil.example/",
  "strake://windowx",
  "strake:window/",
  "data:text/html,<script>1</script>",
  "javascript:1",
  "about:blank",
  "",
];

describe("the window", () => {
  test("has the sandbox, isolation and web security on, Node and web views off", () => {
    expect(windowOptions("/p/preload.cjs").webPreferences).toMatchObject({
      preload: "/p/preload.cjs",
      sandbox: true,
      contextIsolation: true,
      webSecurity: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      allowRunningInsecureContent: false,
      webviewTag: false,
      navigateOnDragDrop: false,
    });
  });

  test.each(foreign)("takes %j for no address of its own and fetches nothing from there", (address) => {
    expect(isOwnAddress(address)).toBe(false);
    expect(mayRequest(address)).toBe(false);
  });

  test("fetches its own files and the pictures it makes", () => {
    for (const address of [
      "strake://window/",
      "strake://window/a.js",
      "blob:strake://window/1",
      "data:image/png;base64,",
    ]) {
      expect(mayRequest(address)).toBe(true);
    }
  });
});

describe("a sealed window", () => {
  test("stays where it is, opens no other and attaches no web view", () => {
    const listeners = new Map<string, (event: { url: string; preventDefault(): void }) => void>();
    let opened: { action: string } | undefined;
    const contents = {
      on: (event: string, listener: never) => listeners.set(event, listener),
      setWindowOpenHandler: (handler: () => { action: "deny" }) => {
        opened = handler();
      },
    };
    sealContents(contents as unknown as SealableContents);
    const isPrevented = (event: string, url: string) => {
      let prevented = false;
      listeners.get(event)?.({
        url,
        preventDefault: () => {
          prevented = true;
        },
      });
      return prevented;
    };
    for (const event of ["will-navigate", "will-redirect", "will-frame-navigate"]) {
      for (const address of foreign) expect(isPrevented(event, address)).toBe(true);
      expect(isPrevented(event, "strake://window/")).toBe(false);
    }
    expect(isPrevented("will-attach-webview", "strake://window/")).toBe(true);
    expect(opened).toEqual({ action: "deny" });
  });

  test("grants no permission and no device, and cancels requests that leave it", () => {
    const answers: unknown[] = [];
    const session: SealableSession = {
      setPermissionRequestHandler: (handler) => handler(undefined, "media", (granted) => answers.push(granted)),
      setPermissionCheckHandler: (handler) => answers.push(handler()),
      setDevicePermissionHandler: (handler) => answers.push(handler()),
      webRequest: {
        onBeforeRequest: (listener) => {
          listener({ url: "https://evil.example/" }, (response) => answers.push(response.cancel));
          listener({ url: "strake://window/a.js" }, (response) => answers.push(response.cancel));
        },
      },
    };
    sealSession(session);
    expect(answers).toEqual([false, false, false, true, false]);
  });
});

describe("the page's own scheme", () => {
  const files = new Map([["/", { type: "text/html; charset=utf-8", body: new TextEncoder().encode("page") }]]);

  test("serves listed files with the content policy", async () => {
    const answer = answerPage(files, "GET", "strake://window/");
    expect([answer.status, await answer.text()]).toEqual([200, "page"]);
    expect(answer.headers.get("Content-Security-Policy")).toContain("script-src 'self'");
    expect(answer.headers.get("Cross-Origin-Opener-Policy")).toBe("same-origin");
  });

  test.each([
    "strake://window",
    "strake://window/../etc",
    "strake://window/%2e%2e/",
    "strake://window/?",
    "strake://other/",
  ])("does not find %s", (address) => {
    expect(answerPage(files, "GET", address).status).toBe(404);
  });

  test("only gives", () => {
    expect(answerPage(files, "POST", "strake://window/").status).toBe(404);
  });
});

test("only the page's own main frame may ask for the port", () => {
  expect(isOwnFrame({ url: "strake://window/", parent: null })).toBe(true);
  expect(isOwnFrame({ url: "strake://window/", parent: {} })).toBe(false);
  expect(isOwnFrame({ url: "https://evil.example/", parent: null })).toBe(false);
  expect(isOwnFrame(null)).toBe(false);
});
