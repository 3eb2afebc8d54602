import type { Progress } from "../../core/contract/job";
import { progressText } from "../text/progress";

interface ProgressLineProps {
  readonly progress: Progress;
  readonly label: string;
}

/** A bar with the step it stands at; without a known length the bar stays empty. */
export function ProgressLine({ progress, label }: ProgressLineProps) {
  const known = progress.total > 0;
  return (
    <div className="field" role="status">
      <span>{progressText(progress)}</span>
      <progress aria-label={label} max={known ? progress.total : undefined} value={known ? progress.done : undefined} />
    </div>
  );
}
