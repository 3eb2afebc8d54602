import { createHash, randomBytes, timingSafeEqual } from "node:crypto";

const secretBytes = 32;

/** 256 random bits as 43 characters that an address and a cookie can carry as they are. */
export function makeSecret(): string {
  return randomBytes(secretBytes).toString("base64url");
}

/** True where both are the same. Takes the same time whatever they are, so that a guess learns nothing from the clock. */
export function isSameSecret(expected: string, presented: string): boolean {
  const digest = (text: string) => createHash("sha256").update(text, "utf8").digest();
  return timingSafeEqual(digest(expected), digest(presented));
}
