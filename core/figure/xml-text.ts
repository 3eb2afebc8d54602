const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&apos;",
};

/** Whether a code point may be shown: no control or format characters, no bidirectional marks, nothing XML 1.0 forbids. */
function isShown(code: number): boolean {
  if (code < 0x20 || (code >= 0x7f && code <= 0x9f) || code === 0xad) return false;
  if (code === 0x61c || (code >= 0x200b && code <= 0x200f) || (code >= 0x2028 && code <= 0x202e)) return false;
  if ((code >= 0x2060 && code <= 0x206f) || code === 0xfeff || (code >= 0xd800 && code <= 0xdfff)) return false;
  return (code & 0xfffe) !== 0xfffe;
}

/** One line of text without control, bidirectional and other invisible characters; line breaks and tabs become spaces. */
export function plainLine(text: string): string {
  let line = "";
  for (const character of text.replace(/[\t\n\r]+/g, " ")) {
    if (isShown(character.codePointAt(0) ?? 0)) line += character;
  }
  return line;
}

/** Text as XML content or attribute value: cleaned by plainLine and escaped. */
export function xmlText(text: string): string {
  return plainLine(text).replace(/[&<>"']/g, (character) => entities[character]);
}

/**
 * JSON as XML content. Every character outside printable ASCII, and the three that XML reserves, are written as JSON
 * escapes, so that any reader gets the very same value back and no text can leave the element.
 */
export function xmlJson(value: unknown): string {
  const json = JSON.stringify(value) ?? "null";
  return json.replace(/[^\x20-\x7e]|[<>&]/g, (unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, "0")}`);
}
