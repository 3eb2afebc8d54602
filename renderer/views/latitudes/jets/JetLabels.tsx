import type { Scene } from "../../../../core/figure/scene";
import { textWidth } from "../../../../core/figure/text-width";
import { useBench } from "../../../app/bench-context";

const labelId = /^jet-label-(\d+)$/;

/** Makes the jets' labels beside the picture pick their jets. A second way for the pointer; keys have the table. */
export function JetLabels({ scene, selected }: { readonly scene: Scene; readonly selected: number | null }) {
  const bench = useBench();
  return (
    <g>
      {scene.marks.map((mark) => {
        const match = mark.kind === "text" ? labelId.exec(mark.id) : null;
        if (!match || mark.kind !== "text") return null;
        const id = Number(match[1]);
        const reach = 1.4 * mark.size;
        return (
          // biome-ignore lint/a11y/noStaticElementInteractions: the table is the way for keys and readers
          <rect
            key={id}
            className="jet-hit"
            data-jet={id}
            x={mark.x - reach}
            y={mark.y - 0.97 * mark.size}
            width={reach + textWidth(mark.text, mark.size, 700) + 4}
            height={1.26 * mark.size}
            onClick={() => bench.jets.pick(id === selected ? null : id)}
          />
        );
      })}
    </g>
  );
}
