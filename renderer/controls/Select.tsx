interface SelectProps<Value extends string> {
  readonly label: string;
  readonly value: Value;
  readonly choices: readonly { readonly value: Value; readonly title: string }[];
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
      {choices.map((choice) => (
        <option key={choice.value} value={choice.value}>
          {choice.title}
        </option>
      ))}
    </select>
  );
}
