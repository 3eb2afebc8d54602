import { useBench, useBenchState } from "../app/bench-context";
import { Button } from "../controls/Button";
import { ProgressLine } from "../controls/ProgressLine";
import { OpenPaths } from "./sources/OpenPaths";

/** What a view shows while it has nothing to draw: why, and what to do. */
export function NothingYet() {
  const bench = useBench();
  const link = useBenchState((state) => state.link);
  const loading = useBenchState((state) => state.loading);
  const fault = useBenchState((state) => state.loadFault);
  const hasStudy = useBenchState((state) => state.studies !== null);

  if (loading) {
    return (
      <div className="centre">
        <h2>Reading the record</h2>
        <ProgressLine progress={loading} label="Reading" />
        <div className="sheet-actions">
          <Button onPress={() => bench.loader.cancel()}>Cancel</Button>
        </div>
      </div>
    );
  }
  if (fault) {
    return (
      <div className="centre">
        <h2>{hasStudy ? "The record could not be read" : "Nothing was opened"}</h2>
        <p className="any-text">{fault}</p>
        {hasStudy ? (
          <div className="sheet-actions">
            <Button kind="main" onPress={() => void bench.loader.load()}>
              Try again
            </Button>
            <Button onPress={() => bench.set({ view: "sources" })}>Look at the sources</Button>
          </div>
        ) : (
          <OpenPaths />
        )}
      </div>
    );
  }
  if (link !== "ready") {
    return (
      <div className="centre">
        <h2>{link === "lost" ? "The engine is being started again" : "Connecting to the engine"}</h2>
        <p className="quiet">This takes a moment.</p>
      </div>
    );
  }
  if (hasStudy) {
    return (
      <div className="centre">
        <p className="quiet">Computing …</p>
      </div>
    );
  }
  return (
    <div className="centre">
      <h2>No study is open</h2>
      <p>Open a study, or the gridded height files to make one from.</p>
      <OpenPaths />
    </div>
  );
}
