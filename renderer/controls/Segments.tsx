import { useId } from "react";

interface SegmentsProps<Value extends string> {
  readonly label: string;
  readonly value: Value;
  /** `short` stands in for the title where the window is narrow. */
  readonly choices: readonly { readonly value: Value; readonly title: string; readonly short?: string }[];
  readonly onChoose: (value: Value) => void;
}

/** A few alternatives side by side: native radio buttons, so that arrow keys and screen readers work as usual. */
export function Segments<Value extends string>({ label, value, choices, onChoose }: SegmentsProps<Value>) {
  const name = useId();
  return (
    <div className="segments" role="radiogroup" aria-label={label}>
      {choices.map((choice) => (
        <label key={choice.value} title={choice.short && choice.title}>
          <input
            type="radio"
            name={name}
            value={choice.value}
            checked={choice.value === value}
            onChange={() => onChoose(choice.value)}
          />
          {choice.short ? (
            <>
              <span className="when-wide">{choice.title}</span>
              <span className="when-narrow">{choice.short}</span>
            </>
          ) : (
            choice.title
          )}
        </label>
      ))}
    </div>
  );
}
