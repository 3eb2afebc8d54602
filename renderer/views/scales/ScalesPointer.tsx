import { type PointerEvent, useState } from "react";
import { valueAtX, valueAtY } from "../../../core/figure/panel";
import type { PanelFrame, Scene } from "../../../core/figure/scene";
import { HoverBox } from "../../figure/HoverBox";
import type { ScalesPicture } from "../../state/scales";
import { scalesReadout } from "./scales-readout";

interface ScalesPointerProps {
  readonly scene: Scene;
  readonly picture: ScalesPicture;
}

/** What lies under the pointer, told beside it. */
export function ScalesPointer({ scene, picture }: ScalesPointerProps) {
  const [hover, setHover] = useState<{ readonly panel: PanelFrame; readonly x: number; readonly y: number } | null>(
    null,
  );
  const follow = (panel: PanelFrame) => (event: PointerEvent<SVGRectElement>) => {
    const frame = event.currentTarget.ownerSVGElement?.getBoundingClientRect();
    if (frame) setHover({ panel, x: event.clientX - frame.left, y: event.clientY - frame.top });
  };
  const shown = hover
    ? scalesReadout(picture, hover.panel.id, valueAtX(hover.panel, hover.x), valueAtY(hover.panel, hover.y))
    : null;
  return (
    <>
      <svg className="overlay" width={scene.width} height={scene.height} aria-hidden="true">
        {scene.panels.map((panel) => (
          <rect
            key={panel.id}
            className="hit"
            data-panel={panel.id}
            x={panel.x}
            y={panel.y}
            width={panel.width}
            height={panel.height}
            onPointerMove={follow(panel)}
            onPointerLeave={() => setHover(null)}
          />
        ))}
      </svg>
      {hover && shown ? <HoverBox x={hover.x} y={hover.y} bounds={scene} {...shown} /> : null}
    </>
  );
}
