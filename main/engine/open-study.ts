import { readFile } from "node:fs/promises";
import { dirname } from "node:path";
import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import { parseStudy } from "../../core/study/read";
import { describeFile } from "../readers/describe";
import { studyAround } from "./make-study";
import { sourceFiles } from "./source-files";

/** A study file larger than this is refused unread. */
const largestStudyBytes = 4 * 2 ** 20;

/** Reads one *.json study, or makes a study around data files and folders of them. Refuses a mix. */
export async function openStudy(paths: readonly string[]): Promise<OpenStudy> {
  const studies = paths.filter((path) => path.toLowerCase().endsWith(".json"));
  if (studies.length > 0 && paths.length > 1) {
    throw new Fault({
      tag: "request",
      where: studies[0],
      expected: "one study, or data files",
      got: `${paths.length} paths with ${studies.length === 1 ? "a study" : "several studies"} among them`,
      advice: "open the study alone",
    });
  }
  if (studies.length === 1) return readStudyFile(studies[0]);
  const files: string[] = [];
  for (const path of paths) files.push(...(await sourceFiles([path], dirname(path), "open")));
  const reports = [];
  for (const file of files) reports.push(await describeFile(file));
  return studyAround(reports);
}

async function readStudyFile(path: string): Promise<OpenStudy> {
  let text: string;
  try {
    text = await readFile(path, "utf8");
  } catch (cause) {
    const code = (cause as NodeJS.ErrnoException).code ?? "an error";
    const got = code === "ENOENT" ? "no such file" : code === "EISDIR" ? "a folder" : code;
    throw new Fault({ tag: "study", where: path, expected: "a study file", got, advice: "check the path" }, { cause });
  }
  if (text.length > largestStudyBytes) {
    throw new Fault({
      tag: "study",
      where: path,
      expected: "a study of at most 4 MB",
      got: `${Math.round(text.length / 2 ** 20)} MB`,
      advice: "check that this is a study file",
    });
  }
  return { study: parseStudy(text, path), folder: dirname(path), path };
}
