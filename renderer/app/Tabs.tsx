import type { KeyboardEvent } from "react";
import { views } from "../views/index";
import { useBench } from "./bench-context";

/** The views as tabs; left and right arrows go from one to the next. */
export function Tabs({ view }: { readonly view: string }) {
  const bench = useBench();
  const onKeyDown = (event: KeyboardEvent): void => {
    const step = event.key === "ArrowRight" ? 1 : event.key === "ArrowLeft" ? -1 : 0;
    if (step === 0) return;
    event.preventDefault();
    event.stopPropagation();
    const at = views.findIndex((candidate) => candidate.id === view);
    const next = views[(at + step + views.length) % views.length];
    bench.set({ view: next.id });
    document.getElementById(`tab-${next.id}`)?.focus();
  };
  return (
    <div className="tabs" role="tablist" aria-label="Views" onKeyDown={onKeyDown}>
      {views.map(({ id, title }) => (
        <button
          key={id}
          id={`tab-${id}`}
          type="button"
          role="tab"
          className="tab"
          aria-selected={id === view}
          aria-controls="view"
          tabIndex={id === view ? 0 : -1}
          onClick={() => bench.set({ view: id })}
        >
          {title}
        </button>
      ))}
    </div>
  );
}
