import { readCookie } from "./cookie";
import { isSameSecret, makeSecret } from "./secret";

/**
 * Who may use the door. The address printed at the start carries a token that is good once: the first browser to present
 * it gets a session cookie in its place, which lasts until the browser or Strake is closed, so that a reload goes on
 * working. Presented again the token is refused, unless by the browser that already holds the cookie, which is let in as
 * it would be without it.
 *
 * A browser sends cookies to every port of a host: another server of this machine that the person visits at the same host
 * name would see this cookie. It is of use only to a program that can connect to this machine's loopback.
 */
export interface Session {
  readonly token: string;
  /** Takes the token in exchange for a Set-Cookie value; undefined where it is wrong or spent. */
  exchange(presented: string): string | undefined;
  /** True where the Cookie header holds this session's cookie, once. */
  admits(cookieHeader: string | undefined): boolean;
}

/** A session of the door on `port`; the port is in the cookie's name, so that two doors at once do not disturb each other. */
export function createSession(port: number): Session {
  const token = makeSecret();
  const cookieName = `strake-${port}`;
  let secret: string | undefined;
  return {
    token,
    exchange(presented) {
      const isRight = isSameSecret(token, presented);
      if (!isRight || secret !== undefined) return undefined;
      secret = makeSecret();
      return `${cookieName}=${secret}; Path=/; HttpOnly; SameSite=Strict`;
    },
    admits(cookieHeader) {
      const presented = readCookie(cookieHeader, cookieName);
      return secret !== undefined && presented !== undefined && isSameSecret(secret, presented);
    },
  };
}
