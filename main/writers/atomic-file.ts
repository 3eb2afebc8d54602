import { randomUUID } from "node:crypto";
import { type FileHandle, open, rename, rm, stat } from "node:fs/promises";
import { basename, dirname, join } from "node:path";
import { Fault } from "../../core/model/errors";

/**
 * Writes a file whole or not at all: into a neighbour of its own name, every byte (short writes are continued), flushed
 * to the disk, its size checked, then renamed over `path`. Strings are written as UTF-8. Leaves nothing behind on failure.
 */
export async function writeFileWhole(path: string, content: Uint8Array | string): Promise<void> {
  const bytes = typeof content === "string" ? new TextEncoder().encode(content) : content;
  const staging = join(dirname(path), `.${basename(path)}.${randomUUID()}.part`);
  try {
    const handle = await open(staging, "wx");
    try {
      await writeFully(handle, bytes);
      await handle.sync();
    } finally {
      await handle.close();
    }
    const { size } = await stat(staging);
    if (size !== bytes.byteLength) throw incomplete(path, bytes.byteLength, size);
    await rename(staging, path);
    await flushFolder(dirname(path));
  } catch (error) {
    await rm(staging, { force: true });
    throw outputFault(path, error);
  }
}

/** Writes all of `bytes` at the handle's position; the system may take fewer bytes at a time than it is given. */
export async function writeFully(handle: Pick<FileHandle, "write">, bytes: Uint8Array): Promise<void> {
  let done = 0;
  while (done < bytes.byteLength) {
    const { bytesWritten } = await handle.write(bytes, done, bytes.byteLength - done);
    if (bytesWritten === 0) throw new Error(`the disk took only ${done} of ${bytes.byteLength} bytes`);
    done += bytesWritten;
  }
}

/** Flushes a file that someone else wrote. */
export async function flushFile(path: string): Promise<void> {
  const handle = await open(path, "r+");
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** Flushes a folder's entries, so that a rename survives a power cut. Systems that cannot open a folder are let be. */
export async function flushFolder(path: string): Promise<void> {
  let handle: FileHandle;
  try {
    handle = await open(path, "r");
  } catch {
    return;
  }
  try {
    await handle.sync();
  } catch {
    // Some file systems refuse to flush a folder; the files themselves are flushed.
  } finally {
    await handle.close();
  }
}

function incomplete(path: string, expected: number, got: number): Fault {
  return new Fault({
    tag: "output",
    where: path,
    expected: `${expected} bytes on the disk`,
    got: `${got}`,
    advice: "check the space left on the disk and write again",
  });
}

/** A system error met while writing as a Fault about the output; a Fault passes unchanged. */
export function outputFault(path: string, error: unknown): unknown {
  if (error instanceof Fault) return error;
  const code = error instanceof Error && "code" in error ? String(error.code) : "";
  if (!(code in reasons)) return error;
  const [got, advice] = reasons[code];
  return new Fault({ tag: "output", where: path, expected: "a place to write", got, advice }, { cause: error });
}

const reasons: Readonly<Record<string, readonly [string, string]>> = {
  ENOSPC: ["a full disk", "free some space or choose another folder"],
  EDQUOT: ["a used-up quota", "free some space or choose another folder"],
  EACCES: ["no permission to write there", "choose a folder that you may write to"],
  EPERM: ["no permission to write there", "choose a folder that you may write to"],
  EROFS: ["a read-only disk", "choose a folder that you may write to"],
  ENOENT: ["no such folder", "make the folder that is to hold it, or choose another"],
  ENOTDIR: ["a file where a folder should be", "choose another folder"],
};
