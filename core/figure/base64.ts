const alphabet = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";

/** Base64 with padding (RFC 4648 section 4). */
export function base64(bytes: Uint8Array): string {
  const pieces: string[] = [];
  for (let i = 0; i < bytes.length; i += 3) {
    const packed = (bytes[i] << 16) | ((bytes[i + 1] ?? 0) << 8) | (bytes[i + 2] ?? 0);
    const left = bytes.length - i;
    pieces.push(
      alphabet[packed >> 18] +
        alphabet[(packed >> 12) & 63] +
        (left > 1 ? alphabet[(packed >> 6) & 63] : "=") +
        (left > 2 ? alphabet[packed & 63] : "="),
    );
  }
  return pieces.join("");
}
