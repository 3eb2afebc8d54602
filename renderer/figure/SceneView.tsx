import { memo, useId } from "react";
import type { Scene } from "../../core/figure/scene";
import { PathView } from "./PathView";
import { RasterLayer } from "./RasterLayer";
import { TextView } from "./TextView";

interface SceneViewProps {
  readonly scene: Scene;
  /** Ids of marks to leave out: those that something above the Scene draws instead. */
  readonly without: ReadonlySet<string>;
}

/** Draws a Scene and nothing else: rasters on one canvas, paths and text as SVG above it. */
export const SceneView = memo(function SceneView({ scene, without }: SceneViewProps) {
  const prefix = useId();
  return (
    <div className="scene">
      <RasterLayer scene={scene} />
      <svg
        width={scene.width}
        height={scene.height}
        viewBox={`0 0 ${scene.width} ${scene.height}`}
        role="img"
        aria-label={`${scene.title}. ${scene.description}`}
      >
        <defs>
          {scene.panels.map(({ id, x, y, width, height }) => (
            <clipPath key={id} id={`${prefix}${id}`}>
              <rect x={x} y={y} width={width} height={height} />
            </clipPath>
          ))}
        </defs>
        {scene.marks.map((mark, index) => {
          // A Scene is drawn in order and rebuilt as a whole, and ids may repeat: the place in the order is the key.
          if (without.has(mark.id)) return null;
          const key = `${index} ${mark.id}`;
          if (mark.kind === "path") return <PathView key={key} mark={mark} clipPrefix={prefix} />;
          return mark.kind === "text" ? <TextView key={key} mark={mark} /> : null;
        })}
      </svg>
    </div>
  );
});
