import type { FileReport } from "../../core/model/source";
import type { ReadChoices } from "./grid-file";
import { describeGridFile } from "./grid-file";
import { openContainer } from "./index";
import { recognise } from "./recognise";
import { describeTrackFile } from "./track-file";

/**
 * What is in one file: gridded maps or along-track points. `forcedHeight` names the height variable; "auto" finds it. Throws
 * a Fault (tag "file" or "memory") that says why a file cannot be used.
 */
export async function describeFile(
  path: string,
  forcedHeight = "auto",
  choices: ReadChoices = {},
): Promise<FileReport> {
  const container = await openContainer(path);
  try {
    const found = recognise(container, forcedHeight);
    return found.kind === "track"
      ? describeTrackFile(container, found, choices)
      : describeGridFile(container, found, choices);
  } finally {
    container.close();
  }
}
