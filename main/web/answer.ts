import { pageHeaders } from "../engine/process/content-policy";
import type { PageFiles } from "../engine/process/page-files";
import { enteringToken, isOwnOrigin, isOwnSite, ownHost, type RequestSigns } from "./request-checks";
import type { Session } from "./session";

export interface Answer {
  readonly status: number;
  readonly headers: Readonly<Record<string, string>>;
  readonly body: Uint8Array;
}

export interface DoorState {
  readonly port: number;
  readonly files: PageFiles;
  readonly session: Session;
}

const encoder = new TextEncoder();

// The page is led on by a refresh and not by a redirect: a cookie with SameSite=Strict is not sent along a redirect that
// began on another site, such as a link in a browser's terminal, but it is sent when our own page moves on.
const entrance = encoder.encode(
  '<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Strake</title>' +
    '<meta http-equiv="refresh" content="0;url=/"></head><body><p><a href="/">Open Strake</a></p></body></html>\n',
);

function say(status: number, text: string, more: Readonly<Record<string, string>> = {}): Answer {
  const headers = { ...pageHeaders(), "Content-Type": "text/plain; charset=utf-8", ...more };
  return { status, headers, body: encoder.encode(`${text}\n`) };
}

function enter(signs: RequestSigns, token: string, session: Session): Answer {
  const isNavigation = isOwnSite(signs.fetchSite) || signs.fetchMode === "navigate";
  if (signs.method !== "GET") return say(405, "GET only", { Allow: "GET" });
  if (!isNavigation) return say(403, "Another site asked for this.");
  const headers = { ...pageHeaders(), "Content-Type": "text/html; charset=utf-8" };
  if (session.admits(signs.cookie)) return { status: 200, headers, body: entrance };
  const cookie = session.exchange(token);
  if (cookie) return { status: 200, headers: { ...headers, "Set-Cookie": cookie }, body: entrance };
  return say(403, "This address was used already, or is not whole. Start `strake open --web` again for a new one.");
}

/**
 * The door's answer to one request that is no WebSocket. Only GET and HEAD, only under its own Host, only from its own
 * pages, only with the session's cookie, only the files listed at the start under their exact paths; everything else is a
 * refusal of the 400s with the same headers. Changes nothing but the session, which spends its token.
 */
export function answerRequest(signs: RequestSigns, { port, files, session }: DoorState): Answer {
  const host = ownHost(signs.hosts, port);
  if (host === undefined) return say(421, "This door answers under its own address only.");
  if (signs.method !== "GET" && signs.method !== "HEAD") return say(405, "GET and HEAD only", { Allow: "GET, HEAD" });
  if (signs.hasBody) return say(400, "No request here has a body.");
  if (signs.origin !== undefined && !isOwnOrigin(signs.origin, host)) return say(403, "Another site asked for this.");
  const token = enteringToken(signs.target);
  if (token !== undefined) return enter(signs, token, session);
  if (!isOwnSite(signs.fetchSite)) return say(403, "Another site asked for this.");
  if (!session.admits(signs.cookie)) return say(403, "Open the address that `strake open` printed when it started.");
  const file = files.get(signs.target);
  if (!file) return say(404, "No such file.");
  const headers = { ...pageHeaders(`ws://${host}/engine`), "Content-Type": file.type };
  return { status: 200, headers, body: file.body };
}
