import { useState } from "react";
import type { OpenStudy } from "../../../core/contract/engine";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { joinPath } from "../../state/paths";
import { SaveSheet } from "./SaveSheet";
import { WriteSheet } from "./WriteSheet";

/** Saving the study and writing its results. */
export function StudyActions({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const edited = useBenchState((state) => state.saved !== state.studies?.present);
  const desktop = useBenchState((state) => state.door === "desktop");
  const [sheet, setSheet] = useState<"save" | "write" | null>(null);
  const startPath = open.path === "" ? joinPath(open.folder, "new.study.json") : open.path;

  const save = async (): Promise<void> => {
    if (!desktop || open.path !== "") return setSheet("save");
    try {
      const [path] = await bench.link.ask("study-place");
      if (path) await bench.results.save(path);
    } catch (error) {
      bench.fail(error);
    }
  };
  return (
    <section className="keep" aria-label="Keep">
      <div className="side-actions">
        <Button onPress={() => void save()}>{edited ? "Save study •" : "Save study"}</Button>
        <Button kind="main" onPress={() => setSheet("write")}>
          Write results…
        </Button>
      </div>
      {sheet === "save" ? <SaveSheet startPath={startPath} onClose={() => setSheet(null)} /> : null}
      {sheet === "write" ? <WriteSheet folder={open.folder} onClose={() => setSheet(null)} /> : null}
    </section>
  );
}
