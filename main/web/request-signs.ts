import type { IncomingMessage } from "node:http";
import type { RequestSigns } from "./request-checks";

function single(values: readonly string[] | undefined): string | undefined {
  // Several values of a header that is sent once are joined, so that they equal nothing the door expects.
  return values?.join(", ");
}

/** What the door judges a request by. */
export function requestSigns(request: IncomingMessage): RequestSigns {
  const headers = request.headersDistinct;
  const length = single(headers["content-length"]);
  return {
    method: request.method ?? "",
    target: request.url ?? "",
    hosts: headers.host ?? [],
    origin: single(headers.origin),
    cookie: headers.cookie?.join("; "),
    fetchSite: single(headers["sec-fetch-site"]),
    fetchMode: single(headers["sec-fetch-mode"]),
    hasBody: (length !== undefined && length !== "0") || headers["transfer-encoding"] !== undefined,
  };
}
