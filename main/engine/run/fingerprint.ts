import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";
import { relative } from "node:path";
import { pipeline } from "node:stream/promises";
import type { GridIndex } from "../../readers/joined-grid";

export interface InputFile {
  readonly path: string;
  readonly bytes: number;
  readonly sha256: string;
}

/** SHA-256 of every input file; paths relative to the study's folder. `poll` is called a file, and may throw to stop. */
export async function fingerprints(index: GridIndex, folder: string, poll: () => void): Promise<InputFile[]> {
  const inputs: InputFile[] = [];
  for (const file of index.files) {
    poll();
    const hash = createHash("sha256");
    await pipeline(createReadStream(file.path), hash);
    const path = relative(folder, file.path).replaceAll("\\", "/");
    inputs.push({ path, bytes: file.bytes, sha256: hash.digest("hex") });
  }
  return inputs;
}
