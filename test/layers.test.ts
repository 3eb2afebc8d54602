import { readdirSync, readFileSync, statSync } from "node:fs";
import { dirname, join, relative, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, test } from "vitest";

const root = fileURLToPath(new URL("..", import.meta.url));

/** Layer → layers whose values it may import; `types` are layers whose types alone it may import. Longest name wins. */
const allowed: Record<string, { readonly values: readonly string[]; readonly types?: readonly string[] }> = {
  "core/model": { values: [] },
  "core/numeric": { values: [] },
  "core/ocean": { values: ["core/model", "core/numeric"] },
  "core/jets": { values: ["core/model", "core/numeric", "core/ocean"] },
  "core/tracks": { values: ["core/model", "core/numeric", "core/ocean"] },
  "core/study": { values: ["core/model", "core/numeric", "core/ocean", "core/jets", "core/tracks"] },
  "core/figure": { values: ["core/model"] },
  "core/contract": { values: ["core/model"], types: ["core"] },
  "main/readers": { values: ["core"] },
  "main/writers": { values: ["core"] },
  "main/engine": { values: ["core", "main/readers", "main/writers"] },
  "main/desktop": { values: ["core/contract", "core/model", "main/engine/process"] },
  "main/web": { values: ["core/contract", "core/model", "main/engine/process"] },
  "main/cli": { values: ["core", "main/engine", "main/web"] },
  renderer: {
    values: ["core/contract", "core/figure", "core/model", "core/ocean/quantities"],
    types: ["core"],
  },
  "sample-data": { values: ["core", "main/writers"] },
};

/** npm packages a layer may use; layers not named may use any dependency. */
const packages: Record<string, readonly string[]> = {
  "core/model": [],
  "core/numeric": ["fft.js"],
  "core/ocean": [],
  "core/jets": [],
  "core/tracks": [],
  "core/study": ["zod"],
  "core/contract": ["msgpackr"],
};

interface Import {
  readonly from: string;
  readonly target: string;
  readonly typeOnly: boolean;
}

function sourceFiles(folder: string): string[] {
  return readdirSync(join(root, folder)).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(join(root, path)).isDirectory()) return sourceFiles(path);
    return /\.(ts|tsx)$/.test(name) ? [path] : [];
  });
}

function importsOf(file: string): Import[] {
  const text = readFileSync(join(root, file), "utf8");
  const pattern = /(?:^|\n)\s*(import|export)\s+(type\s+)?(?:[^"';]*?\sfrom\s+)?"([^"]+)"|import\(\s*"([^"]+)"\s*\)/g;
  return [...text.matchAll(pattern)].map((match) => ({
    from: file,
    target: match[3] ?? match[4],
    typeOnly: match[2] !== undefined,
  }));
}

/** The file an import of ours leads to, relative to the root; null for packages and assets. */
function destination({ from, target }: Import): string | null {
  if (!target.startsWith(".")) return null;
  const path = relative(root, resolve(root, dirname(from), target.replace(/\?.*$/, ""))).replaceAll("\\", "/");
  const known = [path, `${path}.ts`, `${path}.tsx`, `${path}/index.ts`].find((candidate) => files.has(candidate));
  return known ?? path;
}

function layerOf(path: string): string {
  const names = Object.keys(allowed).filter((name) => path === name || path.startsWith(`${name}/`));
  return names.sort((a, b) => b.length - a.length)[0] ?? path;
}

function within(path: string, layers: readonly string[]): boolean {
  return layers.some((layer) => path === layer || path.startsWith(`${layer}/`));
}

const files = new Set(["core", "main", "renderer", "sample-data"].flatMap(sourceFiles));
const imports = [...files].flatMap(importsOf);

describe("imports point one way", () => {
  test("every layer imports only what the table allows", () => {
    const wrong = imports.flatMap((each) => {
      const path = destination(each);
      if (path === null) return [];
      const layer = layerOf(each.from);
      const rule = allowed[layer] ?? { values: [] };
      const permitted = within(path, [layer, ...rule.values]) || (each.typeOnly && within(path, rule.types ?? []));
      return permitted ? [] : [`${each.from} -> ${path}`];
    });
    expect(wrong).toEqual([]);
  });

  test("core's layers use only the packages they are allowed", () => {
    const wrong = imports.flatMap((each) => {
      if (each.target.startsWith(".")) return [];
      const names = packages[layerOf(each.from)];
      return !names || names.some((name) => each.target === name) ? [] : [`${each.from} -> ${each.target}`];
    });
    expect(wrong).toEqual([]);
  });

  test("only the desktop door imports electron", () => {
    const wrong = imports.filter(
      (each) => /^electron(\/|$)/.test(each.target) && layerOf(each.from) !== "main/desktop",
    );
    expect(wrong).toEqual([]);
  });

  test("no module imports itself round a corner", () => {
    const graph = new Map<string, string[]>();
    for (const each of imports) {
      const path = each.typeOnly ? null : destination(each);
      if (path !== null && files.has(path)) graph.set(each.from, [...(graph.get(each.from) ?? []), path]);
    }
    expect(cycles(graph)).toEqual([]);
  });

  test("the table names every folder of core and main", () => {
    const folders = ["core", "main"].flatMap((top) =>
      readdirSync(join(root, top), { withFileTypes: true })
        .filter((entry) => entry.isDirectory())
        .map((entry) => `${top}/${entry.name}`),
    );
    expect(folders.filter((folder) => !allowed[folder])).toEqual([]);
  });

  test("the import scan sees the tree it is meant to judge", () => {
    expect(files.size).toBeGreaterThan(50);
    expect(imports.some((each) => each.from.startsWith("core/ocean") && each.target.includes("numeric"))).toBe(true);
  });
});

function cycles(graph: Map<string, string[]>): string[] {
  const found: string[] = [];
  const state = new Map<string, "open" | "done">();
  const visit = (node: string, trail: string[]): void => {
    if (state.get(node) === "done") return;
    if (state.get(node) === "open") {
      found.push([...trail.slice(trail.indexOf(node)), node].join(" -> "));
      return;
    }
    state.set(node, "open");
    for (const next of graph.get(node) ?? []) visit(next, [...trail, node]);
    state.set(node, "done");
  };
  for (const node of graph.keys()) visit(node, []);
  return found;
}
