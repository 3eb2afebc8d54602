import { type PointerEvent, type ReactNode, useRef, useState } from "react";
import type { PanelFrame, Scene } from "../../core/figure/scene";
import { CursorLines } from "./CursorLines";
import { HoverBox } from "./HoverBox";
import { type Pointed, pointAt } from "./pointing";

interface OverlayProps {
  readonly scene: Scene;
  readonly latitude: number;
  /** Date of the cursor in days since 1970-01-01. */
  readonly day: number;
  /** What to show beside the pointer; null for nothing. */
  readonly readout: (pointed: Pointed) => { readonly value: string; readonly place: string } | null;
  readonly onPoint: (pointed: Pointed) => void;
  /** Where the pointer rests, for whoever shows it elsewhere; null when it has left. */
  readonly onHover?: (pointed: Pointed | null) => void;
  readonly children?: ReactNode;
}

interface Hover {
  readonly x: number;
  readonly y: number;
  readonly pointed: Pointed;
}

/** What moves above a drawn Scene: cursor lines, pointer readout and whatever handles are given as children. */
export function Overlay({ scene, latitude, day, readout, onPoint, onHover, children }: OverlayProps) {
  const svg = useRef<SVGSVGElement>(null);
  const [hover, setHover] = useState<Hover | null>(null);
  const shown = hover ? readout(hover.pointed) : null;

  const follow = (panel: PanelFrame, event: PointerEvent<SVGRectElement>): Pointed | null => {
    const frame = svg.current?.getBoundingClientRect();
    if (!frame) return null;
    const x = event.clientX - frame.left;
    const y = event.clientY - frame.top;
    const pointed = pointAt(panel, x, y);
    setHover({ x, y, pointed });
    onHover?.(pointed);
    return pointed;
  };
  const onDown = (panel: PanelFrame) => (event: PointerEvent<SVGRectElement>) => {
    if (event.button !== 0) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    const pointed = follow(panel, event);
    if (pointed) onPoint(pointed);
  };
  const onMove = (panel: PanelFrame) => (event: PointerEvent<SVGRectElement>) => {
    const pointed = follow(panel, event);
    if (pointed && event.currentTarget.hasPointerCapture(event.pointerId)) onPoint(pointed);
  };
  const onLeave = (): void => {
    setHover(null);
    onHover?.(null);
  };

  return (
    <>
      <svg ref={svg} className="overlay" width={scene.width} height={scene.height} aria-label="Cursor and band">
        {scene.panels.filter(pointsAtSomething).map((panel) => (
          <rect
            key={panel.id}
            className="hit"
            data-panel={panel.id}
            x={panel.x}
            y={panel.y}
            width={panel.width}
            height={panel.height}
            onPointerDown={onDown(panel)}
            onPointerMove={onMove(panel)}
            onPointerLeave={onLeave}
          />
        ))}
        <CursorLines scene={scene} latitude={latitude} day={day} />
        {children}
      </svg>
      {hover && shown ? <HoverBox x={hover.x} y={hover.y} bounds={scene} {...shown} /> : null}
    </>
  );
}

function pointsAtSomething(panel: PanelFrame): boolean {
  return panel.vertical.kind === "latitude" || panel.horizontal.kind === "time";
}
