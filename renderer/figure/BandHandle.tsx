import { type KeyboardEvent, type PointerEvent, useRef } from "react";
import { counted } from "../../core/figure/format";
import type { PanelFrame } from "../../core/figure/scene";
import { type BandEdge, stepPeriod } from "../state/band-edges";

interface BandHandleProps {
  readonly edge: BandEdge;
  readonly days: number;
  /** Nothing is taken off on this side; moving the handle closes it. */
  readonly isOpen: boolean;
  readonly range: readonly [number, number];
  readonly panel: PanelFrame;
  /** Pixel of the edge. */
  readonly x: number;
  /** Middle of the part to take hold of. */
  readonly gripY: number;
  /** The other handle is so near that only the grip may be taken hold of, not the whole line. */
  readonly crowded: boolean;
  /** Period in days at a pixel of the overlay. */
  readonly daysAt: (x: number) => number;
  readonly onMove: (days: number) => void;
  readonly onEnd: () => void;
}

/** Pixels before a handle that is pulled closes an open side: a click alone must not. */
const leastPull = 4;

const names = { shortestDays: "Shortest period kept", longestDays: "Longest period kept" } as const;

/** One end of the pass band: dragged with the pointer or moved with the arrow keys. */
export function BandHandle(props: BandHandleProps) {
  const { edge, days, isOpen, range, panel, x, gripY, crowded, daysAt, onMove, onEnd } = props;
  /** Pointer offset and scale at the grab: the axis may widen under a moving edge, which must not feed back. */
  const grab = useRef<{
    readonly from: number;
    readonly offset: number;
    readonly daysAt: (x: number) => number;
  } | null>(null);

  const onPointerDown = (event: PointerEvent<SVGGElement>): void => {
    if (event.button !== 0) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    event.currentTarget.focus();
    grab.current = { from: event.clientX, offset: event.clientX - x, daysAt };
  };
  const onPointerMove = (event: PointerEvent<SVGGElement>): void => {
    if (!grab.current || (isOpen && Math.abs(event.clientX - grab.current.from) < leastPull)) return;
    onMove(grab.current.daysAt(event.clientX - grab.current.offset));
  };
  const release = (): void => {
    if (!grab.current) return;
    grab.current = null;
    onEnd();
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const next = keyPeriod(event.key, days, range, panel);
    if (next === null) return;
    event.preventDefault();
    event.stopPropagation();
    onMove(next);
  };

  return (
    <g
      className="edge"
      data-edge={edge}
      role="slider"
      tabIndex={0}
      aria-label={names[edge]}
      aria-valuemin={range[0]}
      aria-valuemax={range[1]}
      aria-valuenow={days}
      aria-valuetext={isOpen ? "open" : counted(days, "day")}
      onPointerDown={onPointerDown}
      onPointerMove={onPointerMove}
      onPointerUp={release}
      onLostPointerCapture={release}
      onKeyDown={onKeyDown}
      onKeyUp={onEnd}
    >
      <rect
        className="reach"
        x={x - 9}
        y={crowded ? gripY - 15 : panel.y - 4}
        width={18}
        height={crowded ? 30 : panel.height + 8}
      />
      <line className="edge-line" x1={x} x2={x} y1={panel.y} y2={panel.y + panel.height} />
      <rect className="grip" x={x - 5} y={gripY - 14} width={10} height={28} rx={3} />
    </g>
  );
}

/** The period a key leads to, in the direction it has on screen; null for keys that are not the handle's. */
function keyPeriod(key: string, days: number, range: readonly [number, number], panel: PanelFrame): number | null {
  const rightward = panel.horizontal.to > panel.horizontal.from ? 1 : -1;
  if (key === "ArrowUp") return stepPeriod(days, 1);
  if (key === "ArrowDown") return stepPeriod(days, -1);
  if (key === "ArrowRight") return stepPeriod(days, rightward);
  if (key === "ArrowLeft") return stepPeriod(days, rightward === 1 ? -1 : 1);
  if (key === "Home") return range[0];
  return key === "End" ? range[1] : null;
}
