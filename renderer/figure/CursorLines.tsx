import { formatLatitude } from "../../core/figure/format";
import { pixelX, pixelY } from "../../core/figure/panel";
import type { Scene, TextMark } from "../../core/figure/scene";
import { textWidth } from "../../core/figure/text-width";

interface CursorLinesProps {
  readonly scene: Scene;
  readonly latitude: number;
  /** Days since 1970-01-01. */
  readonly day: number;
}

const tagHeight = 20;
const tagSize = 12;

/** The held latitude as one line through every panel that has a latitude axis, the held date through those with time. */
export function CursorLines({ scene, latitude, day }: CursorLinesProps) {
  const { panels, marks } = scene;
  const rows = panels.filter((panel) => panel.vertical.kind === "latitude");
  const times = panels.filter((panel) => panel.horizontal.kind === "time");
  const left = Math.min(...rows.map((panel) => panel.x));
  const right = Math.max(...rows.map((panel) => panel.x + panel.width));
  const y = rows.length > 0 ? Math.round(pixelY(rows[0], latitude)) + 0.5 : 0;
  const text = formatLatitude(latitude, 2);
  const width = textWidth(text, tagSize, 700) + 12;
  const tagLeft = Math.max(2, left - 5 - width);
  // A label half under the tag would read as a wrong number beside it: what the tag touches is covered whole.
  const covered = marks.filter(
    (mark): mark is TextMark =>
      mark.kind === "text" && rows.some(({ id }) => mark.id.startsWith(`${id}-y-`)) && touches(mark, tagLeft, width, y),
  );
  return (
    <g>
      {times.map((panel) => {
        const x = Math.round(pixelX(panel, day)) + 0.5;
        const reach = panel.vertical.kind === "latitude" ? 0 : 4;
        return (
          <line
            key={panel.id}
            className="cursor-line"
            data-cursor={`date ${panel.id}`}
            x1={x}
            x2={x}
            y1={panel.y - reach}
            y2={panel.y + panel.height + reach}
          />
        );
      })}
      {rows.length > 0 ? (
        <>
          <line className="cursor-line" data-cursor="latitude" x1={left - 5} x2={right + 4} y1={y} y2={y} />
          {covered.map((mark) => (
            <rect key={mark.id} className="cursor-cover" {...boxOf(mark)} />
          ))}
          <g className="cursor-tag" transform={`translate(${tagLeft} ${y - tagHeight / 2})`}>
            <rect width={width} height={tagHeight} rx={4} />
            <text x={width / 2} y={14} textAnchor="middle">
              {text}
            </text>
          </g>
        </>
      ) : null}
    </g>
  );
}

/** Around a label set to end at its place, as those left of a panel are. */
function boxOf({ x, y, text, size, weight }: TextMark) {
  const width = textWidth(text, size, weight) + 2;
  return { x: x - width, y: y - 0.85 * size, width: width + 1, height: 1.15 * size };
}

function touches(mark: TextMark, tagLeft: number, tagWidth: number, middle: number): boolean {
  const { x, y, width, height } = boxOf(mark);
  const acrossMeets = x < tagLeft + tagWidth && x + width > tagLeft;
  return acrossMeets && y < middle + tagHeight / 2 + 1 && y + height > middle - tagHeight / 2 - 1;
}
