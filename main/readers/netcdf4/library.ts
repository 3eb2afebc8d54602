import { Module, ready } from "h5wasm/node";
import { fileFault } from "../faults";

type Hdf5 = NonNullable<typeof Module>;

/** The part of the library's file system that is watched. */
interface FileSystem {
  open(path: string, ...rest: unknown[]): unknown;
  write(
    stream: { fd?: number; nfd?: number },
    buffer: ArrayBufferView,
    offset: number,
    length: number,
    ...rest: unknown[]
  ): number;
  ErrnoError: new (code: number) => Error;
}

const permissionDenied = 2;
const standardError = 2;

/** The one file that may be opened while a call of ours runs; null outside our calls, where others may use the library. */
let permitted: string | null = null;
/** Another file that the data file asked for during the call. */
let refused: string | null = null;
/** What the library would have printed about its failure. */
let complaints = "";

/** Loads the library and takes up the watch over what it opens. Must have resolved before `callHdf5`. */
export async function loadHdf5(): Promise<void> {
  await ready;
  watchFileSystem();
}

/**
 * Runs a call into the HDF5 library on behalf of the file at `path`, an absolute path. While it runs the library can open
 * that file only: external storage, external links and virtual data sets that name other files fail, and the Fault says
 * so. The library's complaints go into the Fault instead of to the terminal. `what` names the variable or step.
 */
export function callHdf5<T>(path: string, what: string, call: (library: Hdf5) => T): T {
  permitted = path;
  refused = null;
  complaints = "";
  try {
    return call(Module);
  } catch (error) {
    throw hdf5Fault(path, what, error);
  } finally {
    permitted = null;
  }
}

/** Turns a negative status into an error; to be used inside `callHdf5`. */
export function checkStatus(status: number | bigint): void {
  if (status < 0) throw new Error("the library reports a failure");
}

function hdf5Fault(path: string, what: string, cause: unknown) {
  const where = what ? `${path}: ${what}` : path;
  if (refused !== null) {
    const advice = "Strake follows no links out of a data file: copy the data into one file";
    return fileFault(where, "all data inside the file", `a reference to ${refused}`, advice, cause);
  }
  return fileFault(
    where,
    "readable HDF5 data",
    failureText(cause),
    "the file is damaged or cut: fetch it again",
    cause,
  );
}

/** The innermost complaint of the library is the reason; an error thrown past it says less. */
function failureText(cause: unknown): string {
  const reasons = [...complaints.matchAll(/#\d+: .*?: (\S.*)$/gm)].map((match) => match[1]);
  const message = cause instanceof Error ? cause.message : String(cause);
  return (reasons.at(-1) ?? message).slice(0, 200);
}

let watched = false;

function watchFileSystem(): void {
  if (watched) return;
  watched = true;
  const system = Module.FS as unknown as FileSystem;
  const open = system.open;
  const pluginFolders = Module.get_plugin_search_paths();
  system.open = (path, ...rest) => {
    if (permitted !== null && path !== permitted) {
      // The library looks for a codec of its own accord: that is not the file's doing.
      if (!pluginFolders.some((folder) => path.startsWith(folder))) refused = path;
      throw new system.ErrnoError(permissionDenied);
    }
    return open.call(system, path, ...rest);
  };
  const write = system.write;
  system.write = (stream, buffer, offset, length, ...rest) => {
    if (permitted === null || (stream.nfd ?? stream.fd) !== standardError) {
      return write.call(system, stream, buffer, offset, length, ...rest);
    }
    if (complaints.length < 20_000)
      complaints += Buffer.from(buffer.buffer, buffer.byteOffset + offset, length).toString();
    return length;
  };
}
