import { pixelX, valueAtX } from "../../core/figure/panel";
import type { PanelFrame } from "../../core/figure/scene";
import { type BandEdge, type BandEdges, type BandLimits, edgeRange } from "../state/band-edges";
import { BandHandle } from "./BandHandle";

interface BandHandlesProps {
  readonly panel: PanelFrame;
  readonly band: BandEdges;
  readonly limits: BandLimits;
  readonly onMove: (edge: BandEdge, days: number) => void;
  readonly onEnd: () => void;
}

const edges: readonly BandEdge[] = ["longestDays", "shortestDays"];

/** Both ends of the pass band on the spectrum, whose horizontal scale is the period in days. */
export function BandHandles({ panel, band, limits, onMove, onEnd }: BandHandlesProps) {
  const inside = (x: number): number => Math.min(panel.x + panel.width, Math.max(panel.x, x));
  const places = edges.map((edge) => inside(pixelX(panel, band[edge])));
  // Handles that would cover each other stand one above the other, so that both can be taken hold of.
  const crowded = Math.abs(places[1] - places[0]) < 18;
  const aside = crowded ? 16 : 0;
  return edges.map((edge, index) => (
    <BandHandle
      key={edge}
      edge={edge}
      days={band[edge]}
      range={edgeRange(band, edge, limits)}
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
