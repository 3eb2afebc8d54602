import { describe, expect, test } from "vitest";
import { answerRequest, type DoorState } from "../../../main/web/answer";
import type { RequestSigns } from "../../../main/web/request-checks";
import { createSession } from "../../../main/web/session";

const port = 4321;
const file = (text: string, type: string) => ({ type, body: new TextEncoder().encode(text) });
const page = file("<!doctype html>", "text/html; charset=utf-8");
const files = new Map([
  ["/", page],
  ["/index.html", page],
  ["/assets/a.js", file("1", "text/javascript; charset=utf-8")],
]);

const base: RequestSigns = {
  method: "GET",
  target: "/",
  hosts: [`127.0.0.1:${port}`],
  origin: undefined,
  cookie: undefined,
  fetchSite: "none",
  fetchMode: "navigate",
  hasBody: false,
};

function entered(): { state: DoorState; cookie: string } {
  const session = createSession(port);
  const cookie = String(session.exchange(session.token)).split(";")[0];
  return { state: { port, files, session }, cookie };
}

function ask(signs: Partial<RequestSigns>) {
  const { state, cookie } = entered();
  return answerRequest({ ...base, cookie, ...signs }, state);
}

describe("with the session's cookie", () => {
  test("the page and its files are served with their types, under either name of loopback", () => {
    expect(ask({}).body).toBe(page.body);
    expect(ask({ target: "/assets/a.js" }).headers["Content-Type"]).toBe("text/javascript; charset=utf-8");
    expect(ask({ hosts: [`localhost:${port}`], method: "HEAD" }).status).toBe(200);
    expect(ask({ origin: `http://127.0.0.1:${port}`, fetchSite: "same-origin" }).status).toBe(200);
  });

  test.each([
    "/assets",
    "/assets/",
    "//",
    "/./",
    "/../",
    "/assets/../index.html",
    "/assets/..%2findex.html",
    "/%2e%2e/%2e%2e/etc/passwd",
    "/..%5c..%5cwindows",
    "/assets/a.js%00",
    "/assets/a.js?x",
    "/assets/a.js#x",
    "/ASSETS/a.js",
    "/assets//a.js",
    "/assets%2fa.js",
    "http://127.0.0.1:4321/",
    "*",
    "",
    "/etc/passwd",
    "/%c0%ae%c0%ae/",
    "/constructor",
    "__proto__",
  ])("%j is not found", (target) => {
    expect(ask({ target }).status).toBe(404);
  });

  test.each(["POST", "PUT", "DELETE", "OPTIONS", "PATCH", "TRACE", "CONNECT", "get", ""])(
    "%j is not allowed",
    (method) => {
      expect(ask({ method }).status).toBe(405);
    },
  );

  test.each([
    [421, { hosts: ["rebound.example:4321"] }],
    [421, { hosts: [] }],
    [403, { origin: "null" }],
    [403, { origin: "http://evil.example" }],
    [403, { fetchSite: "cross-site" }],
    [403, { fetchSite: "same-site" }],
    [400, { hasBody: true }],
  ])("is answered %i where the request has %j", (status, signs) => {
    expect(ask(signs).status).toBe(status);
  });
});

describe("without the cookie", () => {
  test.each(["/", "/assets/a.js", "/none", "/enter"])("%s is refused", (target) => {
    expect(ask({ target, cookie: undefined }).status).toBe(403);
  });

  test("the token opens the door once, also from a link on another site, and the browser that has the cookie passes again", () => {
    const session = createSession(port);
    const state = { port, files, session };
    const target = `/enter?token=${session.token}`;
    expect(answerRequest({ ...base, target: "/enter?token=wrong" }, state).status).toBe(403);
    const first = answerRequest({ ...base, target, fetchSite: "cross-site" }, state);
    expect(first.status).toBe(200);
    expect(new TextDecoder().decode(first.body)).toContain("url=/");
    expect(new TextDecoder().decode(first.body)).not.toContain(session.token);
    const cookie = first.headers["Set-Cookie"].split(";")[0];
    expect(answerRequest({ ...base, target }, state).status).toBe(403);
    const again = answerRequest({ ...base, target, cookie }, state);
    expect([again.status, again.headers["Set-Cookie"]]).toEqual([200, undefined]);
    expect(answerRequest({ ...base, cookie }, state).status).toBe(200);
  });

  test("the token is not spent by another site's picture or script, by a look ahead, nor under a foreign host", () => {
    const session = createSession(port);
    const state = { port, files, session };
    const target = `/enter?token=${session.token}`;
    expect(answerRequest({ ...base, target, fetchSite: "cross-site", fetchMode: "no-cors" }, state).status).toBe(403);
    const lookAhead = answerRequest({ ...base, target, method: "HEAD" }, state);
    expect([lookAhead.status, lookAhead.headers.Allow]).toEqual([405, "GET"]);
    expect(answerRequest({ ...base, target, hosts: ["evil.example"] }, state).status).toBe(421);
    expect(answerRequest({ ...base, target, origin: "null" }, state).status).toBe(403);
    expect(answerRequest({ ...base, target }, state).status).toBe(200);
  });
});

test("every answer, refusals included, forbids sniffing, framing, storing, referrers, inline script and foreign loads", () => {
  const answers = [
    {},
    { target: "/none" },
    { method: "POST" },
    { hosts: [] },
    { cookie: undefined },
    { hasBody: true },
  ].map(ask);
  for (const { headers } of answers) {
    const policy = new Map(
      headers["Content-Security-Policy"].split("; ").map((part) => part.split(/ (.*)/, 2) as [string, string]),
    );
    expect(policy.get("default-src")).toBe("'none'");
    expect(policy.get("script-src")).toBe("'self'");
    expect(policy.get("frame-ancestors")).toBe("'none'");
    expect(headers["Content-Security-Policy"]).not.toMatch(/unsafe|\*/);
    expect(headers["X-Content-Type-Options"]).toBe("nosniff");
    expect(headers["Referrer-Policy"]).toBe("no-referrer");
    expect(headers["Cache-Control"]).toBe("no-store");
    expect(headers["Cross-Origin-Opener-Policy"]).toBe("same-origin");
    expect(headers["Cross-Origin-Embedder-Policy"]).toBe("require-corp");
    expect(Object.keys(headers).filter((name) => /^access-control/i.test(name))).toEqual([]);
  }
});
