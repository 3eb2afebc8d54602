import { pixelX, valueAtX } from "../../core/figure/panel";
import type { PanelFrame } from "../../core/figure/scene";
import { type BandEdge, type BandLimits, edgeRange, shownEdges } from "../state/band-edges";
import { BandHandle } from "./BandHandle";

interface BandHandlesProps {
  readonly panel: PanelFrame;
  /** null: that side is open; its handle stands at the frame's side, as the figure shows it. */
  readonly band: { readonly shortestDays: number | null; readonly longestDays: number | null };
  readonly limits: BandLimits;
  readonly onMove: (edge: BandEdge, days: number) => void;
  readonly onEnd: () => void;
}

const edges: readonly BandEdge[] = ["longestDays", "shortestDays"];

/** Both ends of the pass band on the spectrum, whose horizontal scale is the period in days. */
export function BandHandles({ panel, band, limits, onMove, onEnd }: BandHandlesProps) {
  const inside = (x: number): number => Math.min(panel.x + panel.width, Math.max(panel.x, x));
  const shown = shownEdges(band, limits);
  const sides = { longestDays: panel.horizontal.from, shortestDays: panel.horizontal.to };
  const places = edges.map((edge) => inside(pixelX(panel, band[edge] ?? sides[edge])));
  // Handles that would cover each other stand one above the other, so that both can be taken hold of.
  const crowded = Math.abs(places[1] - places[0]) < 18;
  const aside = crowded ? 16 : 0;
  return edges.map((edge, index) => (
    <BandHandle
      key={edge}
      edge={edge}
      days={shown[edge]}
      isOpen={band[edge] === null}
      range={edgeRange(shown, edge, limits)}
      panel={panel}
      x={places[index]}
      crowded={crowded}
      gripY={panel.y + panel.height / 2 + (index === 0 ? -aside : aside)}
      daysAt={(x) => valueAtX(panel, inside(x))}
      onMove={(days) => onMove(edge, days)}
      onEnd={onEnd}
    />
  ));
}
