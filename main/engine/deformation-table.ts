import { readFile, stat } from "node:fs/promises";
import { resolve } from "node:path";
import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { DeformationChoice } from "../../core/study/scales/deformation";
import { parseRadiusTable } from "../../core/study/scales/radius-table";

/** A table larger than this is refused unread: a line a kilometre from pole to pole takes less. */
const largestBytes = 2 ** 20;

/** The study's choice of deformation radius, a file's table read. Errors (Fault "file"): missing, too large, see parseRadiusTable. */
export async function deformationChoice({ study, folder }: OpenStudy): Promise<DeformationChoice> {
  const { deformation } = study.scales;
  if (deformation === "table" || "waveSpeed" in deformation) return deformation;
  const path = resolve(folder, deformation.file);
  try {
    const { size } = await stat(path);
    if (size > largestBytes) throw unreadable(path, `${Math.ceil(size / 2 ** 20)} MB`);
    return { table: parseRadiusTable(await readFile(path, "utf8"), path) };
  } catch (error) {
    if (error instanceof Fault) throw error;
    const code = (error as NodeJS.ErrnoException).code ?? "an error";
    throw unreadable(path, code === "ENOENT" ? "no such file" : code === "EISDIR" ? "a folder" : code);
  }
}

function unreadable(path: string, got: string): Fault {
  return new Fault({
    tag: "file",
    where: path,
    expected: "a text file of at most 1 MB with lines of latitude, km",
    got,
    advice: 'check scales.deformation.file in the study, or set scales.deformation to "table"',
  });
}
