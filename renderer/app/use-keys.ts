import { useEffect } from "react";
import { type BandEdge, recordLimits, shownEdges, stepPeriod } from "../state/band-edges";
import type { Bench } from "../state/bench";
import { type KeyAction, type KeyPress, keyAction } from "../state/keys";

/** Listens to the keyboard for the whole window. */
export function useKeys(bench: Bench): void {
  useEffect(() => {
    const onDown = (event: KeyboardEvent): void => {
      if (event.defaultPrevented || document.querySelector("dialog[open]")) return;
      const action = keyAction({
        key: event.key,
        shift: event.shiftKey,
        command: event.ctrlKey || event.metaKey,
        alt: event.altKey,
        focus: focusKind(event.target),
      });
      const benchKeys = bench.store.getState().view === "latitudes";
      if (!action || (!benchKeys && action.kind !== "undo" && action.kind !== "redo" && action.kind !== "keys")) return;
      event.preventDefault();
      perform(bench, action);
    };
    const onUp = (): void => bench.endGesture();
    window.addEventListener("keydown", onDown);
    window.addEventListener("keyup", onUp);
    return () => {
      window.removeEventListener("keydown", onDown);
      window.removeEventListener("keyup", onUp);
    };
  }, [bench]);
}

function perform(bench: Bench, action: KeyAction): void {
  if (action.kind === "latitude") bench.stepLatitude(action.steps);
  else if (action.kind === "date") bench.stepDate(action.steps);
  else if (action.kind === "edge") stepEdge(bench, action.edge, action.direction);
  else if (action.kind === "play") bench.togglePlay();
  else if (action.kind === "keys") bench.set({ keysShown: true });
  else if (action.kind === "undo") bench.undo();
  else bench.redo();
}

function stepEdge(bench: Bench, edge: BandEdge, direction: 1 | -1): void {
  const { studies, record } = bench.store.getState();
  if (!studies || !record) return;
  const edges = shownEdges(studies.present.study.band, recordLimits(record.time));
  bench.setEdge(edge, stepPeriod(edges[edge], direction), `key ${edge}`);
}

function focusKind(target: EventTarget | null): KeyPress["focus"] {
  if (!(target instanceof Element)) return "other";
  if (target.matches("textarea, input:not([type=checkbox]):not([type=radio])")) return "text";
  if (target.matches("select, input[type=radio], [role=tab], .profile-scroll")) return "choice";
  if (target.matches("button, summary, input[type=checkbox]")) return "button";
  return target.matches("[role=slider]") ? "slider" : "other";
}
