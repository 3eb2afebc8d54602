import type { RecordOverview } from "../../../core/contract/engine";
import { periodText } from "../../text/record";

const mostBars = 600;

/** Share of cells with data through time; dates without any in red. */
export function CoverageBar({ record }: { readonly record: RecordOverview }) {
  const bars = coverageBars(record.coverage, mostBars);
  return (
    <svg
      className="coverage"
      viewBox={`0 0 ${bars.length} 100`}
      preserveAspectRatio="none"
      role="img"
      aria-label={`Share of cells with data, ${periodText(record.time)}`}
      shapeRendering="crispEdges"
    >
      {bars.map((share, index) => (
        <rect
          // biome-ignore lint/suspicious/noArrayIndexKey: a bar is its place in time
          key={index}
          className={share > 0 ? "bar" : "gap"}
          x={index}
          y={share > 0 ? 100 - 90 * share : 0}
          width={1}
          height={share > 0 ? 90 * share : 100}
        />
      ))}
    </svg>
  );
}

/** Coverage thinned to at most `most` bars; a bar shows the least of its dates, so that no gap is hidden. */
export function coverageBars(coverage: ArrayLike<number>, most: number): readonly number[] {
  const count = Math.min(most, coverage.length);
  return Array.from({ length: count }, (_, bar) => {
    const from = Math.floor((bar * coverage.length) / count);
    const to = Math.floor(((bar + 1) * coverage.length) / count);
    let least = coverage[from];
    for (let index = from + 1; index < to; index++) least = Math.min(least, coverage[index]);
    return least;
  });
}
