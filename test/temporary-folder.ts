import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll } from "vitest";

/** A folder of the test file's own, removed when it is done. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), "strake-"));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}
