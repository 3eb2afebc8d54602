import { useEffect, useState } from "react";
import { useBenchState } from "../../app/bench-context";
import { progressText } from "../../text/progress";

const silentMs = 1000;

/** What is being computed, once no new picture has come for a while; until then what stands there otherwise. */
export function ComputingLine({ otherwise }: { readonly otherwise: string }) {
  const computing = useBenchState((state) => state.computing);
  const step = useBenchState((state) => state.computingStep);
  const picture = useBenchState((state) => state.picture);
  const [late, setLate] = useState<unknown>(null);
  useEffect(() => {
    if (!computing) return;
    const timer = setTimeout(() => setLate(picture), silentMs);
    return () => {
      clearTimeout(timer);
      setLate(null);
    };
  }, [computing, picture]);
  if (!computing || late === null) return <span className="period">{otherwise}</span>;
  return (
    <span className="loading" role="status">
      {step ? progressText(step) : "Computing …"}
    </span>
  );
}
