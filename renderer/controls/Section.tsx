import type { ReactNode } from "react";

interface SectionProps {
  readonly title: string;
  /** What it holds, in a line that stands under the title while it is closed. */
  readonly summary: string;
  readonly open: boolean;
  readonly onToggle: (open: boolean) => void;
  readonly children: ReactNode;
}

/** A part of a panel that opens and closes. */
export function Section({ title, summary, open, onToggle, children }: SectionProps) {
  return (
    <details className="section" open={open} onToggle={(event) => onToggle(event.currentTarget.open)}>
      <summary>
        <span className="section-title">{title}</span>
        {open ? null : <span className="section-summary">{summary}</span>}
      </summary>
      {open ? <div className="section-body">{children}</div> : null}
    </details>
  );
}
