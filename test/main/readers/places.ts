import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll } from "vitest";
import { Fault } from "../../../core/model/errors";

/** A folder of the test file's own, removed when it is done. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), "strake-readers-"));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

export function fixture(name: string): string {
  return fileURLToPath(new URL(`../../fixtures/readers/${name}`, import.meta.url));
}

/** Deterministic numbers in [0, 1): the minimal standard generator of Park and Miller 1988. */
export function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

/** The Fault that the call ends in; fails the test for none and for any other error. */
export async function faultOf(call: () => unknown): Promise<Fault> {
  try {
    await call();
  } catch (error) {
    if (error instanceof Fault) return error;
    throw error;
  }
  throw new Error("no fault was thrown");
}
