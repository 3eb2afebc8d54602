interface Choice<Value extends string> {
  readonly value: Value;
  readonly title: string;
}

interface SelectProps<Value extends string> {
  readonly label: string;
  readonly value: Value;
  /** Choices, or choices under headings. */
  readonly choices: readonly (
    | Choice<Value>
    | { readonly heading: string; readonly choices: readonly Choice<Value>[] }
  )[];
  readonly onChoose: (value: Value) => void;
  readonly disabled?: boolean;
}

export function Select<Value extends string>({ label, value, choices, onChoose, disabled }: SelectProps<Value>) {
  return (
    <select
      className="input"
      aria-label={label}
      value={value}
      disabled={disabled}
      onChange={(event) => onChoose(event.target.value as Value)}
    >
      {choices.map((choice) =>
        "heading" in choice ? (
          <optgroup key={choice.heading} label={choice.heading}>
            {choice.choices.map(option)}
          </optgroup>
        ) : (
          option(choice)
        ),
      )}
    </select>
  );
}

function option<Value extends string>({ value, title }: Choice<Value>) {
  return (
    <option key={value} value={value}>
      {title}
    </option>
  );
}
