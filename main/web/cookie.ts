/**
 * Value of one cookie in a Cookie header; undefined where it is absent or there more than once, since which of two a
 * browser meant cannot be known (RFC 6265 leaves the order open).
 */
export function readCookie(header: string | undefined, name: string): string | undefined {
  const values = (header ?? "")
    .split(";")
    .map((pair) => pair.trim())
    .filter((pair) => pair.startsWith(`${name}=`))
    .map((pair) => pair.slice(name.length + 1));
  return values.length === 1 ? values[0] : undefined;
}
