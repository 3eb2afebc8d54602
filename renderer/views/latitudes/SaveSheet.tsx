import { useState } from "react";
import { useBench } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { Sheet } from "../../controls/Sheet";
import { TextField } from "../../controls/TextField";

interface SaveSheetProps {
  readonly startPath: string;
  readonly onClose: () => void;
}

/** Asks where the study shall be saved. */
export function SaveSheet({ startPath, onClose }: SaveSheetProps) {
  const bench = useBench();
  const [path, setPath] = useState(startPath);
  const [busy, setBusy] = useState(false);
  const save = async (): Promise<void> => {
    setBusy(true);
    const done = await bench.results.save(path.trim());
    setBusy(false);
    if (done) onClose();
  };
  return (
    <Sheet title="Save the study" onClose={onClose}>
      <TextField title="File" value={path} onChange={setPath} />
      <p className="quiet">The study holds settings and paths, no data. A file of that name is replaced.</p>
      <div className="sheet-actions">
        <Button onPress={onClose}>Cancel</Button>
        <Button kind="main" disabled={busy || path.trim() === ""} onPress={() => void save()}>
          Save
        </Button>
      </div>
    </Sheet>
  );
}
