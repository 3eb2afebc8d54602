import type { OpenStudy } from "../../core/contract/engine";

/** Paths of a study's grid files as the study's folder gives them; patterns stay patterns. */
export function dataPaths({ folder, study }: OpenStudy): readonly string[] {
  return [...study.grids, ...study.tracks].flatMap((source) => source.files.map((file) => joinPath(folder, file)));
}

/** `path` seen from `folder`; absolute paths (POSIX, drive letter, network share) stay as they are. */
export function joinPath(folder: string, path: string): string {
  if (folder === "" || path.startsWith("/") || path.startsWith("\\\\") || /^[A-Za-z]:[\\/]/.test(path)) return path;
  const separator = folder.includes("\\") && !folder.includes("/") ? "\\" : "/";
  return folder.endsWith(separator) ? folder + path : folder + separator + path;
}

/** The last part of a path, for showing. */
export function fileName(path: string): string {
  return path.split(/[\\/]/).at(-1) ?? path;
}

/** One path a line, blank lines and surrounding quotes left out, as pasted from a file manager or a terminal. */
export function pathsFromText(text: string): readonly string[] {
  const lines = text.split(/\r?\n/).map((line) => line.trim().replace(/^(["'])(.*)\1$/, "$2"));
  return lines.filter((line) => line !== "");
}
