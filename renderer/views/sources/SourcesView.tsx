import { useBenchState } from "../../app/bench-context";
import { ProgressLine } from "../../controls/ProgressLine";
import { CoverageBar } from "./CoverageBar";
import { ExtentForm } from "./ExtentForm";
import { FileList } from "./FileList";
import { OpenPaths } from "./OpenPaths";
import { RecordFacts } from "./RecordFacts";
import { SuppliedVelocity } from "./SuppliedVelocity";

/** What was opened, what was recognised and refused, and the part of it the study uses. */
export function SourcesView() {
  const open = useBenchState((state) => state.studies?.present ?? null);
  const files = useBenchState((state) => state.files);
  const record = useBenchState((state) => state.record);
  const loading = useBenchState((state) => state.loading);
  const refused = files.filter((file) => "refused" in file).length;
  return (
    <div className="sources">
      <div className="sources-main">
        {loading ? <ProgressLine progress={loading} label="Reading" /> : null}
        {record ? (
          <section aria-label="Record in use">
            <h2>Record in use</h2>
            <RecordFacts record={record} />
            <CoverageBar record={record} />
            <p className="quiet">Share of cells with data, by date; dates without any in red.</p>
          </section>
        ) : null}
        {open && record ? <SuppliedVelocity open={open} /> : null}
        <section aria-label="Files">
          <h2>
            Files
            {files.length > 0 ? <span className="quiet"> {countText(files.length - refused, refused)}</span> : null}
          </h2>
          {files.length === 0 ? (
            <p className="quiet">{open ? "Looking at the study's files …" : "No files are open yet."}</p>
          ) : (
            <FileList files={files} />
          )}
        </section>
      </div>
      <aside className="side" aria-label="Open and choose">
        <section aria-label="Open">
          <h2>Open</h2>
          <OpenPaths />
        </section>
        {open ? (
          <ExtentForm key={JSON.stringify([open.study.region, open.study.period, open.path])} open={open} />
        ) : null}
      </aside>
    </div>
  );
}

function countText(recognised: number, refused: number): string {
  return refused > 0 ? `${recognised} recognised, ${refused} refused` : `${recognised} recognised`;
}
