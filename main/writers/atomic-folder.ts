import { randomUUID } from "node:crypto";
import { lstat, mkdir, readdir, rename, rm } from "node:fs/promises";
import { basename, dirname, join, resolve } from "node:path";
import { Fault } from "../../core/model/errors";
import { flushFile, flushFolder, outputFault } from "./atomic-file";

export { writeFileWhole } from "./atomic-file";

export interface FolderOptions {
  /** Replace a folder that is already there. */
  readonly overwrite: boolean;
  /** Checked before the folder is put in place: a cancelled job leaves nothing behind. */
  readonly signal?: AbortSignal;
}

/**
 * Fills a folder whole or not at all. `fill` writes into a staging folder beside `folder` (same disk, so that a rename is
 * one step); its files are flushed and the staging folder is renamed into place. With `overwrite` the old folder steps
 * aside under a name of this call, and is deleted once the new one stands; if the new one cannot take its place the old
 * one goes back. Refuses an existing folder otherwise. On failure or cancelling, what was there before is there still.
 * Only names made by this call are ever deleted. Throws Fault "output" or "cancelled", or what `fill` throws.
 */
export async function writeFolderAtomically<T>(
  folder: string,
  options: FolderOptions,
  fill: (stage: string) => Promise<T>,
): Promise<T> {
  const place = resolve(folder);
  await refuseExisting(place, options.overwrite);
  const mark = randomUUID();
  const stage = join(dirname(place), `.${basename(place)}.${mark}.new`);
  const aside = join(dirname(place), `.${basename(place)}.${mark}.old`);
  try {
    await mkdir(dirname(place), { recursive: true });
    await mkdir(stage);
    const result = await fill(stage);
    await flushTree(stage);
    refuseCancelled(place, options.signal);
    await swapIn(stage, place, aside, options.overwrite);
    return result;
  } catch (error) {
    await rm(stage, { recursive: true, force: true });
    throw outputFault(place, error);
  }
}

async function swapIn(stage: string, place: string, aside: string, overwrite: boolean): Promise<void> {
  // Looked at again: another writer may have come first while this one was filling its stage.
  await refuseExisting(place, overwrite);
  const replaces = (await kindOf(place)) !== "nothing";
  if (replaces) await rename(place, aside);
  try {
    await rename(stage, place);
  } catch (error) {
    if (replaces) await rename(aside, place);
    throw error;
  }
  await flushFolder(dirname(place));
  if (replaces) await rm(aside, { recursive: true, force: true });
}

/** Throws Fault "output" where `place` is a file, or a folder that may not be replaced. */
export async function refuseExisting(place: string, overwrite: boolean): Promise<void> {
  const kind = await kindOf(place);
  if (kind === "nothing" || (kind === "folder" && overwrite)) return;
  throw new Fault({
    tag: "output",
    where: place,
    expected: kind === "folder" ? "a folder that does not exist yet" : "a folder",
    got: kind === "folder" ? "an existing one" : "a file of that name",
    advice: kind === "folder" ? "choose another folder or allow overwriting" : "choose another name",
  });
}

async function kindOf(place: string): Promise<"nothing" | "folder" | "file"> {
  try {
    return (await lstat(place)).isDirectory() ? "folder" : "file";
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return "nothing";
    throw outputFault(place, error);
  }
}

function refuseCancelled(place: string, signal: AbortSignal | undefined): void {
  if (signal?.aborted !== true) return;
  throw new Fault({
    tag: "cancelled",
    where: place,
    expected: "the job to finish",
    got: "a request to stop",
    advice: "nothing was written; start it again when you like",
  });
}

async function flushTree(folder: string): Promise<void> {
  for (const entry of await readdir(folder, { withFileTypes: true })) {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) await flushTree(path);
    else if (entry.isFile()) await flushFile(path);
  }
  await flushFolder(folder);
}
