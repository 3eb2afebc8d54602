import type { OpenDialogOptions, SaveDialogOptions } from "electron";
import type { Choice } from "../../core/contract/wire";
import type { Grants } from "../engine/process/grants";

/** What a choice opens: a dialog for what is there, or one for a name that need not exist. */
export type DialogPlan =
  | { readonly kind: "open"; readonly options: OpenDialogOptions }
  | { readonly kind: "save"; readonly options: SaveDialogOptions };

const studyFilter = { name: "Study", extensions: ["study.json", "json"] };
const dataFilter = {
  name: "Data and studies",
  extensions: ["nc", "nc4", "cdf", "h5", "hdf5", "tif", "tiff", "zarr", "json"],
};
const anyFilter = { name: "All files", extensions: ["*"] };

const plans: Readonly<Record<Choice, DialogPlan>> = {
  data: {
    kind: "open",
    options: {
      title: "Open data or a study",
      properties: ["openFile", "multiSelections"],
      filters: [dataFilter, anyFilter],
    },
  },
  folder: { kind: "open", options: { title: "Open a folder of data", properties: ["openDirectory"] } },
  "study-place": {
    kind: "save",
    options: { title: "Save the study", defaultPath: "jets.study.json", filters: [studyFilter] },
  },
  "result-place": {
    kind: "save",
    options: { title: "New folder for the results", buttonLabel: "Write results", properties: ["createDirectory"] },
  },
};

export function dialogPlan(what: Choice): DialogPlan {
  return plans[what];
}

/** The name with the ending every study has, in place of a bare .json. */
export function withStudyEnding(chosen: string): string {
  return chosen.endsWith(".study.json") ? chosen : `${chosen.replace(/\.json$/, "")}.study.json`;
}

/** The two dialogs of Electron that are used, already tied to the window. */
export interface Dialogs {
  open(options: OpenDialogOptions): Promise<{ canceled: boolean; filePaths: string[] }>;
  save(options: SaveDialogOptions): Promise<{ canceled: boolean; filePath: string }>;
}

/**
 * Shows the dialog for `what` and grants what was chosen; a place to save at grants that one path, which need not exist.
 * Gives the chosen paths, none when the dialog was closed.
 */
export async function choosePaths(dialogs: Dialogs, grants: Grants, what: Choice): Promise<readonly string[]> {
  const plan = dialogPlan(what);
  if (plan.kind === "open") {
    const { canceled, filePaths } = await dialogs.open(plan.options);
    return canceled ? [] : grants.grant(filePaths);
  }
  const { canceled, filePath } = await dialogs.save(plan.options);
  if (canceled || filePath === "") return [];
  const place = what === "study-place" ? withStudyEnding(filePath) : filePath;
  await grants.grantPlace(place);
  return [place];
}
