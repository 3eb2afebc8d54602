/** The headers the door judges a request by, as sent; undefined where not sent. */
export interface RequestSigns {
  readonly method: string;
  /** The request's target as it stands on the first line: not decoded, not resolved. */
  readonly target: string;
  /** Every Host header sent. */
  readonly hosts: readonly string[];
  readonly origin: string | undefined;
  readonly cookie: string | undefined;
  /** Sec-Fetch-Site and Sec-Fetch-Mode, which browsers set and pages cannot. */
  readonly fetchSite: string | undefined;
  readonly fetchMode: string | undefined;
  /** True where the request announces a body. */
  readonly hasBody: boolean;
}

/**
 * The Host header where it is this door's own, compared for equality; undefined otherwise. A foreign name that was made to
 * resolve to 127.0.0.1 (DNS rebinding) shows here and nowhere else.
 */
export function ownHost(hosts: readonly string[], port: number): string | undefined {
  const [host] = hosts;
  if (hosts.length !== 1) return undefined;
  return host === `127.0.0.1:${port}` || host === `localhost:${port}` ? host : undefined;
}

/** True where the Origin is exactly the one of a page this door served under `host`; "null" and none at all are not. */
export function isOwnOrigin(origin: string | undefined, host: string): boolean {
  return origin === `http://${host}`;
}

/** True where the browser does not say that another site, or another port of this one, is behind the request. */
export function isOwnSite(fetchSite: string | undefined): boolean {
  return fetchSite === undefined || fetchSite === "same-origin" || fetchSite === "none";
}

const enterTarget = /^\/enter\?token=([A-Za-z0-9_-]{1,128})$/;

/** The token in a request for the entrance; undefined for any other target. */
export function enteringToken(target: string): string | undefined {
  return enterTarget.exec(target)?.[1];
}

/** Why a WebSocket is refused: the status to answer, or undefined where it may open. */
export function socketRefusal(
  signs: RequestSigns,
  port: number,
  admits: (cookie: string | undefined) => boolean,
): number | undefined {
  const host = ownHost(signs.hosts, port);
  if (signs.method !== "GET") return 405;
  if (host === undefined) return 421;
  if (signs.target !== "/engine") return 404;
  if (!isOwnOrigin(signs.origin, host) || !isOwnSite(signs.fetchSite) || !admits(signs.cookie)) return 403;
  return undefined;
}
