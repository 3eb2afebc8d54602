import { lstat, realpath, stat } from "node:fs/promises";
import path from "node:path";
import { Fault } from "../../../core/model/errors";

/**
 * What a window may reach: the folders and files the person opened, by their real paths (every link followed, letter case
 * as the disk has it). Reading: an opened file, or anything below an opened folder. Writing: below an opened folder, or
 * below the folder an opened file lies in, so that a study can be saved beside its data.
 */
export interface Grants {
  /** Opens paths to the window: a folder with all below it, a study file with its folder, another file by itself. */
  grant(paths: readonly string[]): Promise<readonly string[]>;
  /** Lets one file be read, whatever its name, and nothing beside it be written; for what the window has just saved. */
  grantFile(written: string): Promise<void>;
  /** Lets one path, which need not exist, and all below it be written; for a place the person chose to save at. */
  grantPlace(chosen: string): Promise<void>;
  /** The real path where it may be read; throws a Fault tagged "request" otherwise. A missing file below a grant passes. */
  readable(requested: string): Promise<string>;
  /** The real path where it may be written; the end of it need not exist. Throws a Fault tagged "request" otherwise. */
  writable(requested: string): Promise<string>;
}

const longestPath = 4096;
const studyEnding = ".study.json";

/** True where `inner` is `outer` or lies below it: whole components are compared, so that "/data-2" is not below "/data". */
export function isWithin(outer: string, inner: string): boolean {
  const between = path.relative(outer, inner);
  return between === "" || (between !== ".." && !between.startsWith(`..${path.sep}`) && !path.isAbsolute(between));
}

function notGranted(requested: string, got: string): Fault {
  return new Fault({
    tag: "request",
    where: requested.slice(0, 200).replaceAll("\0", "\\0"),
    expected: "a path that was opened, or one below an opened folder",
    got,
    advice: "open its folder: in the desktop window by the menu, else by naming it after `strake open`",
  });
}

/** Real path of the deepest part that exists, with the rest appended. Throws where the path cannot be one. */
export async function realPathOf(requested: string): Promise<string> {
  if (requested.length > longestPath) throw notGranted(requested, `${requested.length} characters`);
  if (requested.includes("\0")) throw notGranted(requested, "a path with a null character");
  if (!path.isAbsolute(requested)) throw notGranted(requested, "a path that does not start at the root");
  let existing = path.resolve(requested);
  const rest: string[] = [];
  for (;;) {
    try {
      return path.join(await realpath(existing), ...rest);
    } catch (error) {
      const code = (error as NodeJS.ErrnoException).code;
      // Only what is not there may be stepped over: a loop of links or a closed folder hides where the path leads.
      if (code !== "ENOENT") throw notGranted(requested, `a path that cannot be followed (${code})`);
      if (await isDanglingLink(existing)) throw notGranted(requested, "a link to nothing");
      rest.unshift(path.basename(existing));
      existing = path.dirname(existing);
    }
  }
}

async function isDanglingLink(location: string): Promise<boolean> {
  return lstat(location).then(
    () => true,
    () => false,
  );
}

function isBelow(granted: Iterable<string>, real: string): boolean {
  return [...granted].some((outer) => isWithin(outer, real));
}

/** No grants at first. */
export function createGrants(): Grants {
  const folders = new Set<string>();
  const files = new Set<string>();
  const writtenFiles = new Set<string>();
  const places = new Set<string>();

  async function grantOne(requested: string): Promise<string> {
    const real = await realPathOf(path.resolve(requested));
    const found = await stat(real).catch(() => undefined);
    if (!found) throw missing(requested);
    if (found.isDirectory()) folders.add(real);
    else {
      files.add(real);
      if (real.endsWith(studyEnding)) folders.add(path.dirname(real));
    }
    return real;
  }

  return {
    grant: (paths) => Promise.all(paths.map(grantOne)),
    async grantFile(written) {
      writtenFiles.add(await realPathOf(written));
    },
    async grantPlace(chosen) {
      places.add(await realPathOf(chosen));
    },
    async readable(requested) {
      const real = await realPathOf(requested);
      if (files.has(real) || writtenFiles.has(real) || isBelow(folders, real)) return real;
      throw notGranted(requested, "one that was not");
    },
    async writable(requested) {
      const real = await realPathOf(requested);
      const besideFiles = [...files].map((file) => path.dirname(file));
      if (isBelow(folders, real) || isBelow(places, real) || isBelow(besideFiles, real)) return real;
      throw notGranted(requested, "one that was not");
    },
  };
}

function missing(requested: string): Fault {
  return new Fault({
    tag: "file",
    where: requested,
    expected: "a file or folder",
    got: "nothing there",
    advice: "check the spelling; relative paths start at the folder the command is given in",
  });
}
