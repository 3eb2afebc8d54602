/** The triangle that points where a jet flows. */
export function JetSign({ sign }: { readonly sign: 1 | -1 }) {
  return (
    <svg className="jet-sign" viewBox="0 0 8 8" aria-hidden="true">
      <path d={sign === 1 ? "M1 0.5L7.5 4L1 7.5Z" : "M7 0.5L0.5 4L7 7.5Z"} />
    </svg>
  );
}
