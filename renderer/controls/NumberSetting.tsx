import { type KeyboardEvent, useId, useState } from "react";
import { type NumberRule, readNumber } from "../state/number-text";

interface NumberSettingProps<Value extends number | null> {
  readonly title: string;
  readonly value: Value;
  readonly rule: NumberRule & { readonly optional?: null extends Value ? true : false };
  readonly onCommit: (value: Value) => void;
  /** Name by which it is known outside of its section; the title where left out. */
  readonly label?: string;
  /** What a blank field stands for. */
  readonly placeholder?: string;
}

/**
 * A titled number that takes effect on Enter or when the field is left. What cannot be used stays in the field with a
 * sentence below it; Escape, or the setting changing elsewhere, brings the value back.
 */
export function NumberSetting<Value extends number | null>(props: NumberSettingProps<Value>) {
  const { title, value, rule, onCommit, label, placeholder } = props;
  const id = useId();
  const [draft, setDraft] = useState<{ readonly text: string; readonly of: Value } | null>(null);
  const held = draft !== null && Object.is(draft.of, value) ? draft.text : null;
  const text = held ?? (value === null ? "" : String(value));
  const reading = readNumber(text, rule);
  const fault = held !== null && "fault" in reading ? reading.fault : null;
  const finish = (): void => {
    if (held === null || "fault" in reading) return;
    setDraft(null);
    // The rule tells whether a blank field is a value.
    if (reading.value !== value) onCommit(reading.value as Value);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.key === "Enter") finish();
    if (event.key === "Escape") setDraft(null);
  };
  return (
    <div className="setting">
      <label htmlFor={id}>{title}</label>
      <input
        id={id}
        type="text"
        inputMode="decimal"
        autoComplete="off"
        className="input"
        aria-label={label}
        aria-invalid={fault !== null}
        aria-describedby={fault === null ? undefined : `${id}-fault`}
        placeholder={placeholder}
        value={text}
        onChange={(event) => setDraft({ text: event.target.value, of: value })}
        onBlur={finish}
        onKeyDown={onKeyDown}
      />
      {fault === null ? null : (
        <p className="field-fault" id={`${id}-fault`} role="alert">
          {fault}
        </p>
      )}
    </div>
  );
}
