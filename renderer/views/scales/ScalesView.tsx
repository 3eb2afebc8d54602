import { useEffect, useRef } from "react";
import { useBench, useBenchState } from "../../app/bench-context";
import type { Ground } from "../../app/theme";
import { Button } from "../../controls/Button";
import { ProgressLine } from "../../controls/ProgressLine";
import { useSize } from "../../figure/use-size";
import { NothingYet } from "../NothingYet";
import { ScalesFigure } from "./ScalesFigure";
import { ScalesNumbers } from "./ScalesNumbers";
import { ScalesToolbar } from "./ScalesToolbar";
import { partFor } from "./scales-parts";
import { useScalesState } from "./use-scales-state";

/** Spectra, spacing against theory, waves and drift, forcing by the eddies: computed while somebody looks. */
export function ScalesView({ ground }: { readonly ground: Ground }) {
  const bench = useBench();
  const open = useBenchState((state) => state.studies?.present ?? null);
  const record = useBenchState((state) => state.record);
  const recordFor = useBenchState((state) => state.recordFor);
  const grid = useBenchState((state) => state.grid);
  const link = useBenchState((state) => state.link);
  const loading = useBenchState((state) => state.loading !== null);
  const hasPicture = useScalesState((state) => state.picture !== null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: each of these may ask for other scales
  useEffect(() => bench.scales.refresh(), [bench, open, record, recordFor, grid, link, loading]);
  if (!open || !record || (loading && !hasPicture)) return <NothingYet />;
  return <Shown ground={ground} />;
}

function Shown({ ground }: { readonly ground: Ground }) {
  const pane = useRef<HTMLDivElement>(null);
  const size = useSize(pane);
  const picture = useScalesState((state) => state.picture);
  const wanted = useScalesState((state) => state.wanted);
  const busy = useScalesState((state) => state.progress !== null);
  const chosen = useScalesState((state) => state.part);
  const part = chosen ?? (size ? partFor(size) : "all");
  const isEarlier = picture !== null && picture.key !== wanted && wanted !== "";
  return (
    <div className="scales">
      <ScalesToolbar part={part} isEarlier={isEarlier} />
      <div
        className={isEarlier ? "figure-pane scales-pane earlier" : "figure-pane scales-pane"}
        ref={pane}
        aria-busy={busy}
      >
        {picture && size ? <ScalesFigure picture={picture} part={part} pane={size} ground={ground} /> : null}
        {picture ? null : <Waiting />}
      </div>
      {picture ? <ScalesNumbers picture={picture} /> : null}
    </div>
  );
}

/** Before the first scales are there: how far they are, or why there are none. */
function Waiting() {
  const bench = useBench();
  const progress = useScalesState((state) => state.progress);
  const fault = useScalesState((state) => state.fault);
  if (fault !== "") {
    return (
      <div className="centre">
        <h2>No scales yet</h2>
        <p className="any-text">{fault}</p>
        <div className="sheet-actions">
          <Button kind="main" onPress={() => bench.scales.again()}>
            Compute again
          </Button>
        </div>
      </div>
    );
  }
  return (
    <div className="centre">
      <h2>Computing the scales</h2>
      <p className="quiet">Spectra, lengths, drift and forcing of the whole record. This takes some seconds.</p>
      <ProgressLine progress={progress ?? { step: "Starting", done: 0, total: 0 }} label="Computing the scales" />
      <div className="sheet-actions">
        <Button onPress={() => bench.scales.cancel()}>Cancel</Button>
      </div>
    </div>
  );
}
