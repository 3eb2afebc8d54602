import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

export interface Places {
  readonly root: string;
  readonly desktopEntry: string;
  readonly preload: string;
  readonly engineEntry: string;
  readonly workerEntry: string;
  readonly pageFolder: string;
  /** The study opened where none is named. */
  readonly sampleStudy: string;
}

/**
 * Where the built parts lie. `from` is the address of a module of Strake, built or not: the folder of Strake is the nearest
 * above it whose package.json bears the name, since bundling moves modules about. Throws where there is none.
 */
export function findPlaces(from: string): Places {
  let root = path.dirname(fileURLToPath(from));
  while (!isRoot(root)) {
    const above = path.dirname(root);
    if (above === root) throw new Error(`no package.json of Strake above ${from}`);
    root = above;
  }
  return {
    root,
    desktopEntry: path.join(root, "dist", "main", "desktop.js"),
    preload: path.join(root, "dist", "preload", "preload.cjs"),
    engineEntry: path.join(root, "dist", "main", "engine-process.js"),
    workerEntry: path.join(root, "dist", "main", "worker.js"),
    pageFolder: path.join(root, "dist", "renderer"),
    sampleStudy: path.join(root, "sample-data", "halcyon.study.json"),
  };
}

function isRoot(folder: string): boolean {
  const file = path.join(folder, "package.json");
  return existsSync(file) && (JSON.parse(readFileSync(file, "utf8")) as { name?: unknown }).name === "strake";
}
