import type { PathMark } from "../../core/figure/scene";

export function PathView({ mark, clipPrefix }: { readonly mark: PathMark; readonly clipPrefix: string }) {
  return (
    <path
      data-mark={mark.id}
      d={mark.d}
      stroke={mark.stroke}
      strokeWidth={mark.strokeWidth}
      fill={mark.fill}
      strokeDasharray={mark.dash?.join(" ")}
      strokeLinejoin="round"
      clipPath={mark.clip ? `url(#${clipPrefix}${mark.clip})` : undefined}
    />
  );
}
