import type { JetRow } from "../../../../core/model/jets-result";
import type { Picture } from "../../../state/bench-state";
import { type FoundJets, jetsKey, wantsJets } from "../../../state/jets-state";

const none: readonly JetRow[] = [];

/**
 * The jets to draw over a picture: those found for its own settings, none while others are awaited; undefined where the
 * picture is not of eastward velocity in the band, and takes no room for jets.
 */
export function drawnJets({ open, grid, result }: Picture, found: FoundJets | null): readonly JetRow[] | undefined {
  if (result.choice.quantity !== "u" || !wantsJets(open, result.choice)) return undefined;
  return found && found.key === jetsKey(open, grid) ? found.result.jets : none;
}
