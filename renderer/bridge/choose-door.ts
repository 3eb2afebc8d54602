import { openDesktopPort } from "./desktop-port";
import type { Door } from "./door";
import { openWebPort } from "./web-port";

/** The web door where the page came from a host by http, else the desktop's. */
export function chooseDoor(): Door {
  return { connect: /^https?:$/.test(location.protocol) ? openWebPort : openDesktopPort };
}
