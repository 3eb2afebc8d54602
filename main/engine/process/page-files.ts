import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import { Fault } from "../../../core/model/errors";

export interface PageFile {
  readonly type: string;
  readonly body: Uint8Array<ArrayBuffer>;
}

/** The page's files by the exact path they are asked for under, "/" being the page itself. */
export type PageFiles = ReadonlyMap<string, PageFile>;

const types: Readonly<Record<string, string>> = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json",
  ".svg": "image/svg+xml",
  ".png": "image/png",
  ".ttf": "font/ttf",
  ".woff2": "font/woff2",
  ".wasm": "application/wasm",
};

/**
 * Reads the built page into memory, once: a request is then looked up by its exact path and never becomes a path on the
 * disk. Links and files of other kinds are left out. Throws a Fault tagged "file" where there is no index.html.
 */
export async function readPageFiles(folder: string): Promise<PageFiles> {
  const files = new Map<string, PageFile>();
  const entries = await readdir(folder, { recursive: true, withFileTypes: true }).catch(() => []);
  for (const entry of entries) {
    const type = types[path.extname(entry.name)];
    if (!entry.isFile() || !type) continue;
    const location = path.join(entry.parentPath, entry.name);
    const name = path.relative(folder, location).split(path.sep).join("/");
    files.set(encodeURI(`/${name}`), { type, body: new Uint8Array(await readFile(location)) });
  }
  const page = files.get("/index.html");
  if (!page) {
    throw new Fault({
      tag: "file",
      where: path.join(folder, "index.html"),
      expected: "the built window",
      got: "no such file",
      advice: "run `npm run build` first",
    });
  }
  return files.set("/", page);
}
