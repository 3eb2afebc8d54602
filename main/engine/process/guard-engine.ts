import path from "node:path";
import type { Engine, OpenStudy } from "../../../core/contract/engine";
import { Fault } from "../../../core/model/errors";
import { studySchema } from "../../../core/study/schema";
import type { Grants } from "./grants";
import { pathsOfPattern } from "./study-files";

const studyEnding = ".study.json";
const mostRemembered = 1000;

function studyFault(where: string, got: string): Fault {
  const advice = "open the study again; if it happens again please report it";
  return new Fault({ tag: "study", where, expected: "a study with every default written out", got, advice });
}

function endingFault(requested: string): Fault {
  return new Fault({
    tag: "output",
    where: requested,
    expected: `a file name that ends in ${studyEnding}`,
    got: path.basename(requested),
    advice: `save under another name, such as band${studyEnding}`,
  });
}

/**
 * The engine as a window may use it: every path in a request, those a study names included, must have been granted, with
 * every link followed; otherwise the call rejects with a Fault tagged "request" and the engine hears nothing of it. Paths
 * go on to the engine as real paths. A study is saved only under a name that ends in .study.json, so that no other file of
 * the person can be replaced; the file saved may be opened again.
 */
export function guardEngine(engine: Engine, grants: Grants): Engine {
  // Grants only grow, so what passed once passes again; without this each drag would follow thousands of links.
  const passed = new Set<string>();

  async function checkPattern(folder: string, pattern: string): Promise<void> {
    const key = `${folder}\0${pattern}`;
    if (passed.has(key)) return;
    await grants.readable(path.resolve(folder, pattern));
    for (const location of await pathsOfPattern(folder, pattern)) await grants.readable(location);
    if (passed.size >= mostRemembered) passed.clear();
    passed.add(key);
  }

  async function readablePaths(requested: readonly string[]): Promise<readonly string[]> {
    const real: string[] = [];
    for (const location of requested) {
      real.push(await grants.readable(location));
      for (const meant of await pathsOfPattern(path.sep, location)) await grants.readable(meant);
      // Of a folder, what lies in it is read too, and may be a link to elsewhere.
      for (const inner of await pathsOfPattern(location, "*")) await grants.readable(inner);
    }
    return real;
  }

  async function checkedStudy(open: OpenStudy): Promise<OpenStudy> {
    const read = studySchema.safeParse(open.study);
    if (!read.success)
      throw studyFault(read.error.issues[0]?.path.join(".") || "study", read.error.issues[0]?.message ?? "");
    if (!path.isAbsolute(open.folder))
      throw studyFault("folder of the study", "a path that does not start at the root");
    // Without its steps up the folder means the same to whoever joins a name to it, links in it or not.
    const folder = path.resolve(open.folder);
    if (open.path !== "") await grants.readable(open.path);
    for (const source of [...read.data.grids, ...read.data.tracks]) {
      for (const pattern of source.files) await checkPattern(folder, pattern);
    }
    const { deformation } = read.data.scales;
    if (typeof deformation === "object" && "file" in deformation) await checkPattern(folder, deformation.file);
    return { study: read.data, folder, path: open.path };
  }

  return {
    open: async (request, options) => engine.open({ paths: await readablePaths(request.paths) }, options),
    describe: async (request, options) => engine.describe({ paths: await readablePaths(request.paths) }, options),
    check: (request, options) => engine.check(request, options),
    load: async (request, options) => engine.load({ ...request, open: await checkedStudy(request.open) }, options),
    latitudes: async (request, options) =>
      engine.latitudes({ ...request, open: await checkedStudy(request.open) }, options),
    spectrum: async (request, options) =>
      engine.spectrum({ ...request, open: await checkedStudy(request.open) }, options),
    velocities: async (request, options) =>
      engine.velocities({ ...request, open: await checkedStudy(request.open) }, options),
    jets: async (request, options) => engine.jets({ ...request, open: await checkedStudy(request.open) }, options),
    eddyTest: async (request, options) =>
      engine.eddyTest({ ...request, open: await checkedStudy(request.open) }, options),
    scales: async (request, options) => engine.scales({ ...request, open: await checkedStudy(request.open) }, options),
    run: async (request, options) => {
      const folder = await grants.writable(request.folder);
      return engine.run({ ...request, folder, open: await checkedStudy(request.open) }, options);
    },
    save: async (request, options) => {
      const location = await grants.writable(request.path);
      if (!location.endsWith(studyEnding)) throw endingFault(location);
      // A study that is only kept reads nothing, so its own files are not checked; opening them is.
      const saved = await engine.save({ ...request, path: location }, options);
      await grants.grantFile(saved.path);
      return saved;
    },
  };
}
