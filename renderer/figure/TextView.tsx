import type { TextMark } from "../../core/figure/scene";
import { superscriptRise, superscriptRuns, superscriptScale } from "../../core/figure/text-width";

/** A line of text; superscripts are set as raised small figures, as everywhere a Scene is drawn. */
export function TextView({ mark }: { readonly mark: TextMark }) {
  const { x, y, size, rotate } = mark;
  const runs = superscriptRuns(mark.text);
  return (
    <text
      data-mark={mark.id}
      x={x}
      y={y}
      fontSize={size}
      fontWeight={mark.weight}
      textAnchor={mark.anchor}
      fill={mark.fill}
      transform={rotate ? `rotate(${rotate} ${x} ${y})` : undefined}
    >
      {runs.length === 1 && !runs[0].raised
        ? mark.text
        : runs.map((run, index) => {
            const previous = index > 0 && runs[index - 1].raised;
            const rise = superscriptRise * size;
            const shift = run.raised === previous ? 0 : run.raised ? -rise : rise;
            return (
              // biome-ignore lint/suspicious/noArrayIndexKey: the runs of one text have no other identity
              <tspan key={index} dy={shift || undefined} fontSize={run.raised ? superscriptScale * size : undefined}>
                {run.text}
              </tspan>
            );
          })}
    </text>
  );
}
