import { useState } from "react";
import { useBench } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { FaultLine } from "../../controls/FaultLine";
import { Sheet } from "../../controls/Sheet";
import { PlaceField } from "./PlaceField";

interface SaveSheetProps {
  readonly startPath: string;
  readonly onClose: () => void;
}

/** Asks where the study shall be saved. */
export function SaveSheet({ startPath, onClose }: SaveSheetProps) {
  const bench = useBench();
  const [path, setPath] = useState(startPath);
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const save = async (): Promise<void> => {
    setBusy(true);
    const why = await bench.results.save(path.trim());
    setBusy(false);
    setFault(why);
    if (why === null) onClose();
  };
  return (
    <Sheet title="Save the study" onClose={onClose}>
      <PlaceField title="File" value={path} onChange={setPath} what="study-place" />
      <p className="quiet">The study holds settings and paths, no data. A file of that name is replaced.</p>
      <FaultLine text={fault} />
      <div className="sheet-actions">
        <Button onPress={onClose}>Cancel</Button>
        <Button kind="main" disabled={busy || path.trim() === ""} onPress={() => void save()}>
          Save
        </Button>
      </div>
    </Sheet>
  );
}
