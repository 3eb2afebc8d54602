/**
 * What a page of Strake may load: its own files and nothing else; no inline script or style, no evaluation, no frame
 * around it, no form. `socketAddress` is where the page's WebSocket goes, left out where it has none. Pictures may be made
 * by the page itself (blob:, data:), for canvas and export.
 */
export function contentPolicy(socketAddress?: string): string {
  return [
    "default-src 'none'",
    "script-src 'self'",
    "style-src 'self'",
    "font-src 'self'",
    "img-src 'self' blob: data:",
    "worker-src 'self'",
    `connect-src 'self'${socketAddress ? ` ${socketAddress}` : ""}`,
    "base-uri 'none'",
    "form-action 'none'",
    "frame-ancestors 'none'",
  ].join("; ");
}

/** Headers of every answer to a page, refusals included. With the last three the page is cross-origin isolated. */
export function pageHeaders(socketAddress?: string): Readonly<Record<string, string>> {
  return {
    "Content-Security-Policy": contentPolicy(socketAddress),
    "X-Content-Type-Options": "nosniff",
    "Referrer-Policy": "no-referrer",
    "Cache-Control": "no-store",
    "Permissions-Policy": "camera=(), microphone=(), geolocation=(), usb=(), serial=(), hid=(), payment=()",
    "Cross-Origin-Opener-Policy": "same-origin",
    "Cross-Origin-Embedder-Policy": "require-corp",
    "Cross-Origin-Resource-Policy": "same-origin",
  };
}
