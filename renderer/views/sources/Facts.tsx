interface FactsProps {
  readonly entries: readonly (readonly [title: string, text: string])[];
}

/** Titled short texts. They may come from files: shown as text, never longer than a few lines. */
export function Facts({ entries }: FactsProps) {
  return (
    <dl className="facts">
      {entries.map(([title, text]) => (
        <div key={title}>
          <dt>{title}</dt>
          <dd className="any-text long-text">{shortened(text)}</dd>
        </div>
      ))}
    </dl>
  );
}

const mostLetters = 400;

/** A text that may be a megabyte long, cut to what is worth showing. */
export function shortened(text: string): string {
  return text.length > mostLetters ? `${text.slice(0, mostLetters)}…` : text;
}
