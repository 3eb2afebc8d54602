const shapes = {
  back: "M2 2h2v10H2zM13 2v10L5 7z",
  play: "M3 1.5v11L12.5 7z",
  pause: "M3 2h3v10H3zM8 2h3v10H8z",
  on: "M10 2h2v10h-2zM1 2v10l8-5z",
} as const;

export function TransportIcon({ name }: { readonly name: keyof typeof shapes }) {
  return (
    <svg viewBox="0 0 14 14" aria-hidden="true">
      <path d={shapes[name]} />
    </svg>
  );
}
