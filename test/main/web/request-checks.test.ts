import { describe, expect, test } from "vitest";
import { readCookie } from "../../../main/web/cookie";
import {
  enteringToken,
  isOwnOrigin,
  isOwnSite,
  ownHost,
  type RequestSigns,
  socketRefusal,
} from "../../../main/web/request-checks";
import { isSameSecret, makeSecret } from "../../../main/web/secret";
import { createSession } from "../../../main/web/session";

const port = 4321;

describe("a Host", () => {
  test.each([[["127.0.0.1:4321"]], [["localhost:4321"]]])("%j is the door's own", (hosts) => {
    expect(ownHost(hosts, port)).toBe(hosts[0]);
  });

  test.each([
    [[]],
    [[""]],
    [["127.0.0.1"]],
    [["localhost"]],
    [["127.0.0.1:80"]],
    [["evil.example:4321"]],
    [["127.0.0.1:4321.evil.example"]],
    [["evil.example/127.0.0.1:4321"]],
    [["x127.0.0.1:4321"]],
    [["127.0.0.1:43210"]],
    [["LOCALHOST:4321"]],
    [["localhost.:4321"]],
    [["[::1]:4321"]],
    [["0.0.0.0:4321"]],
    [["2130706433:4321"]],
    [["127.0.0.1:4321 "]],
    [["user@127.0.0.1:4321"]],
    [["127.0.0.1:4321", "127.0.0.1:4321"]],
    [["127.0.0.1:4321", "evil.example"]],
  ])("%j is not", (hosts) => {
    expect(ownHost(hosts, port)).toBeUndefined();
  });
});

describe("an Origin", () => {
  test("is the door's own where it is exactly the page's", () => {
    expect(isOwnOrigin("http://127.0.0.1:4321", "127.0.0.1:4321")).toBe(true);
  });

  test.each([
    undefined,
    "",
    "null",
    "http://localhost:4321",
    "https://127.0.0.1:4321",
    "http://127.0.0.1",
    "http://127.0.0.1:4321/",
    "http://127.0.0.1:43210",
    "http://127.0.0.1:4321.evil.example",
    "http://evil.example",
    "http://127.0.0.1:4321, http://127.0.0.1:4321",
  ])("that is %j is not", (origin) => {
    expect(isOwnOrigin(origin, "127.0.0.1:4321")).toBe(false);
  });
});

test("a request's site is the door's own unless the browser says another", () => {
  for (const site of [undefined, "none", "same-origin"]) expect(isOwnSite(site)).toBe(true);
  for (const site of ["same-site", "cross-site", "", "same-origin, none"]) expect(isOwnSite(site)).toBe(false);
});

test("a token is found in the entrance's target and nowhere else", () => {
  expect(enteringToken("/enter?token=aB-_9")).toBe("aB-_9");
  const others = ["/", "/enter", "/enter?token=", "/enter?token=a&b=c", "/enter?token=a%20", "/enter?token=a#b"];
  const more = ["/x/enter?token=a", "/enter/?token=a", "//enter?token=a", "http://h/enter?token=a", "/enter?token=a\n"];
  for (const target of [...others, ...more, `/enter?token=${"a".repeat(129)}`])
    expect(enteringToken(target)).toBeUndefined();
});

describe("a cookie", () => {
  test.each([
    ["a=1", "1"],
    ["b=2; a=1; c=3", "1"],
    ["a=", ""],
    ["a=1=2", "1=2"],
    ["aa=1; ba=2", undefined],
    ["a=1; a=2", undefined],
    ["a", undefined],
    ["", undefined],
    [undefined, undefined],
  ])("named a in %j has the value %j", (header, value) => {
    expect(readCookie(header, "a")).toBe(value);
  });
});

describe("a secret", () => {
  test("is 256 bits that an address carries as they are, and never the same twice", () => {
    const made = Array.from({ length: 100 }, makeSecret);
    expect(new Set(made).size).toBe(100);
    for (const secret of made) expect(secret).toMatch(/^[A-Za-z0-9_-]{43}$/);
  });

  test("is the same only as itself, whatever the lengths", () => {
    const secret = makeSecret();
    expect(isSameSecret(secret, secret)).toBe(true);
    for (const other of ["", secret.slice(1), `${secret}a`, makeSecret()])
      expect(isSameSecret(secret, other)).toBe(false);
  });
});

describe("a session", () => {
  test("gives its cookie for the right token, once", () => {
    const session = createSession(port);
    expect(session.exchange("wrong")).toBeUndefined();
    const cookie = session.exchange(session.token);
    expect(cookie).toMatch(/^strake-4321=[A-Za-z0-9_-]{43}; Path=\/; HttpOnly; SameSite=Strict$/);
    expect(session.exchange(session.token)).toBeUndefined();
    expect(session.admits(cookie?.split(";")[0])).toBe(true);
  });

  test("admits nobody before the exchange, and afterwards no other cookie, the token least", () => {
    const session = createSession(port);
    for (const header of [undefined, "", "strake-4321=", "strake-4321=undefined"])
      expect(session.admits(header)).toBe(false);
    const pair = String(session.exchange(session.token)).split(";")[0];
    const wrong = [undefined, "", "strake-4321=", `strake-4321=${session.token}`, `${pair}a`, `${pair}; ${pair}`];
    for (const header of [...wrong, pair.replace("4321", "4322")]) expect(session.admits(header)).toBe(false);
  });
});

describe("a web socket", () => {
  const right: RequestSigns = {
    method: "GET",
    target: "/engine",
    hosts: ["127.0.0.1:4321"],
    origin: "http://127.0.0.1:4321",
    cookie: "the right one",
    fetchSite: undefined,
    fetchMode: undefined,
    hasBody: false,
  };
  const refusal = (signs: Partial<RequestSigns>) =>
    socketRefusal({ ...right, ...signs }, port, (cookie) => cookie === "the right one");

  test("opens with every sign right", () => {
    expect(refusal({})).toBeUndefined();
    expect(refusal({ fetchSite: "same-origin" })).toBeUndefined();
  });

  test.each([
    [405, { method: "POST" }],
    [421, { hosts: ["evil.example:4321"] }],
    [404, { target: "/engine/" }],
    [404, { target: "/engine?" }],
    [403, { origin: undefined }],
    [403, { origin: "null" }],
    [403, { origin: "http://evil.example" }],
    [403, { origin: "http://localhost:4321" }],
    [403, { fetchSite: "cross-site" }],
    [403, { cookie: undefined }],
  ])("is answered %i where it has %j", (status, signs) => {
    expect(refusal(signs)).toBe(status);
  });
});
