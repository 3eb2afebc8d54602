import { existsSync } from "node:fs";
import { resolve } from "node:path";
import { glob } from "tinyglobby";
import { Fault } from "../../core/model/errors";

/** Files that a source's patterns name, sorted, absolute. A pattern that is itself a file's name is that file. Error: no match. */
export async function sourceFiles(patterns: readonly string[], folder: string, where: string): Promise<string[]> {
  const found = new Set<string>();
  for (const pattern of patterns) {
    const literal = resolve(folder, pattern);
    if (existsSync(literal)) {
      found.add(literal);
      continue;
    }
    const matches = await glob(pattern, { cwd: folder, absolute: true, onlyFiles: true, followSymbolicLinks: false });
    if (matches.length === 0) {
      throw new Fault({
        tag: "file",
        where: `${where}: ${pattern}`,
        expected: `a file in ${folder}`,
        got: "none of that name",
        advice: "check the name and the folder; paths in a study start from the study's own folder",
      });
    }
    for (const match of matches) found.add(match);
  }
  return [...found].sort();
}
