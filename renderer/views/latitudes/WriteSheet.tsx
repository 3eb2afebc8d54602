import { useState } from "react";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { Check } from "../../controls/Check";
import { ProgressLine } from "../../controls/ProgressLine";
import { Sheet } from "../../controls/Sheet";
import { TextField } from "../../controls/TextField";
import { joinPath } from "../../state/paths";

interface WriteSheetProps {
  /** The study's own folder, where the suggestion starts from. */
  readonly folder: string;
  readonly onClose: () => void;
}

/** Asks for a folder and writes the results into it, with progress and a way to stop. */
export function WriteSheet({ folder, onClose }: WriteSheetProps) {
  const bench = useBench();
  const writing = useBenchState((state) => state.writing);
  const desktop = useBenchState((state) => state.door === "desktop");
  const [place, setPlace] = useState(joinPath(folder, "results"));
  const [overwrite, setOverwrite] = useState(false);
  const write = async (): Promise<void> => {
    if (await bench.results.write(place.trim(), overwrite)) onClose();
  };
  const choose = async (): Promise<void> => {
    try {
      const [chosen] = await bench.link.ask("result-place");
      if (chosen) setPlace(chosen);
    } catch (error) {
      bench.fail(error);
    }
  };
  return (
    <Sheet title="Write results" onClose={onClose}>
      <TextField title="Folder" value={place} onChange={setPlace} />
      {desktop ? <Button onPress={() => void choose()}>Choose a place…</Button> : null}
      <Check title="Replace an earlier result in this folder" checked={overwrite} onChange={setOverwrite} />
      <p className="quiet">Summary, fields, profile, spectra, figures and a methods text: whole, or nothing at all.</p>
      {writing ? <ProgressLine progress={writing} label="Writing results" /> : null}
      <div className="sheet-actions">
        <Button onPress={writing ? () => bench.results.cancel() : onClose}>{writing ? "Stop" : "Cancel"}</Button>
        <Button kind="main" disabled={writing !== null || place.trim() === ""} onPress={() => void write()}>
          Write
        </Button>
      </div>
    </Sheet>
  );
}
