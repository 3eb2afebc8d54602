import { ascentShare, descentShare } from "../../../../core/figure/marks";
import type { Scene } from "../../../../core/figure/scene";
import { textWidth } from "../../../../core/figure/text-width";

export interface TextBox {
  readonly id: string;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Boxes of all texts by the font's widths; the scene has no turned text. */
export function textBoxes(scene: Scene): TextBox[] {
  return scene.marks.flatMap((mark) => {
    if (mark.kind !== "text" || mark.text === "") return [];
    const width = textWidth(mark.text, mark.size, mark.weight);
    const left = mark.x - { start: 0, middle: width / 2, end: width }[mark.anchor];
    const [top, bottom] = [mark.y - ascentShare * mark.size, mark.y + descentShare * mark.size];
    return [{ id: mark.id, left, right: left + width, top, bottom }];
  });
}

export function overlaps(boxes: readonly TextBox[]): string[] {
  return boxes.flatMap((first, index) =>
    boxes
      .slice(index + 1)
      .filter(
        (second) =>
          first.left < second.right &&
          second.left < first.right &&
          first.top < second.bottom &&
          second.top < first.bottom,
      )
      .map((second) => `${first.id} and ${second.id}`),
  );
}
