import { Select } from "./Select";

interface ChoiceSettingProps<Value extends string> {
  readonly title: string;
  readonly value: Value;
  readonly choices: readonly { readonly value: Value; readonly title: string }[];
  readonly onChoose: (value: Value) => void;
}

/** A titled choice among a few. */
export function ChoiceSetting<Value extends string>({ title, value, choices, onChoose }: ChoiceSettingProps<Value>) {
  return (
    <div className="setting">
      <span>{title}</span>
      <Select label={title} value={value} choices={choices} onChoose={onChoose} />
    </div>
  );
}
