import { useState } from "react";
import type { OpenStudy } from "../../../core/contract/engine";
import { useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { joinPath } from "../../state/paths";
import { SaveSheet } from "./SaveSheet";
import { WriteSheet } from "./WriteSheet";

/** Saving the study and writing its results; a dot says that there are edits to save. */
export function StudyActions({ open }: { readonly open: OpenStudy }) {
  const edited = useBenchState((state) => state.saved !== state.studies?.present);
  const [sheet, setSheet] = useState<"save" | "write" | null>(null);
  const startPath = open.path === "" ? joinPath(open.folder, "new.study.json") : open.path;
  return (
    <section className="keep" aria-label="Keep">
      <div className="side-actions">
        <Button onPress={() => setSheet("save")}>{edited ? "Save study •" : "Save study"}</Button>
        <Button kind="main" onPress={() => setSheet("write")}>
          Write results…
        </Button>
      </div>
      {sheet === "save" ? <SaveSheet startPath={startPath} onClose={() => setSheet(null)} /> : null}
      {sheet === "write" ? <WriteSheet folder={open.folder} onClose={() => setSheet(null)} /> : null}
    </section>
  );
}
