import { useState } from "react";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { Check } from "../../controls/Check";
import { FaultLine } from "../../controls/FaultLine";
import { ProgressLine } from "../../controls/ProgressLine";
import { Sheet } from "../../controls/Sheet";
import { joinPath } from "../../state/paths";
import { PlaceField } from "./PlaceField";

interface WriteSheetProps {
  /** The study's own folder, where the suggestion starts from. */
  readonly folder: string;
  readonly onClose: () => void;
}

/** Asks for a folder and writes the results into it, with progress and a way to stop. */
export function WriteSheet({ folder, onClose }: WriteSheetProps) {
  const bench = useBench();
  const writing = useBenchState((state) => state.writing);
  const [place, setPlace] = useState(joinPath(folder, "results"));
  const [overwrite, setOverwrite] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const write = async (): Promise<void> => {
    setFault(null);
    const why = await bench.results.write(place.trim(), overwrite);
    setFault(why);
    if (why === null) onClose();
  };
  return (
    <Sheet title="Write results" onClose={onClose}>
      <PlaceField title="Folder" value={place} onChange={setPlace} what="result-place" />
      <Check title="Replace an earlier result in this place" checked={overwrite} onChange={setOverwrite} />
      <p className="quiet">Summary, fields, profile, spectra, figures and a methods text: whole, or nothing at all.</p>
      <FaultLine text={fault} />
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
