import { readdir } from "node:fs/promises";
import path from "node:path";

const mostFiles = 200_000;
const wildcard = /[*?[\]{}!()+@]/;

/** True where a name could match the component of a pattern: only what every dialect of wildcards agrees on is told apart. */
function couldMatch(component: string, name: string): boolean {
  const head = component.slice(0, component.search(wildcard));
  return name.startsWith(head);
}

async function expand(folder: string, components: readonly string[], found: string[]): Promise<void> {
  if (found.length > mostFiles) return;
  const [component, ...rest] = components;
  if (component === undefined) {
    found.push(folder);
    return;
  }
  if (!wildcard.test(component)) return expand(path.join(folder, component), rest, found);
  const entries = await readdir(folder, { withFileTypes: true }).catch(() => []);
  for (const entry of entries) {
    if (!couldMatch(component, entry.name)) continue;
    const inner = path.join(folder, entry.name);
    if (component.includes("**")) {
      found.push(inner);
      if (entry.isDirectory()) await expand(inner, components, found);
    } else await expand(inner, rest, found);
  }
}

/**
 * Every path a pattern could stand for, at least: with wildcards in its components, all names that agree up to the first
 * wildcard. Used to check where links lead; the engine's own matching can only be narrower. A pattern that steps up
 * behind a wildcard could stand for anything, and gives the root. `folder` is absolute.
 */
export async function pathsOfPattern(folder: string, pattern: string): Promise<readonly string[]> {
  const whole = path.resolve(folder, pattern);
  const { root } = path.parse(whole);
  // A step up behind a wildcard would be resolved against the pattern's text and not against what it stands for.
  const written = pattern.split(/[\\/]/);
  const firstWild = written.findIndex((part) => wildcard.test(part));
  if (firstWild >= 0 && written.slice(firstWild).includes("..")) return [root];
  const found: string[] = [];
  await expand(root, whole.slice(root.length).split(path.sep).filter(Boolean), found);
  return found;
}
