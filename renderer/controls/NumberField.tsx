import { type KeyboardEvent, useState } from "react";

interface NumberFieldProps {
  readonly label: string;
  readonly value: number;
  readonly least: number;
  readonly most: number;
  readonly onCommit: (value: number) => void;
}

/** A number that takes effect on Enter or when the field is left; anything out of range goes back to what it was. */
export function NumberField({ label, value, least, most, onCommit }: NumberFieldProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const text = draft ?? String(value);
  const number = Number(text.replace("−", "-").replace(",", "."));
  const valid = text.trim() !== "" && Number.isFinite(number) && number >= least && number <= most;
  const finish = (): void => {
    if (draft !== null && valid && number !== value) onCommit(number);
    setDraft(null);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.key === "Enter") finish();
    if (event.key === "Escape") setDraft(null);
  };
  return (
    <input
      type="text"
      inputMode="decimal"
      className="input"
      aria-label={`${label}, ${least} to ${most}`}
      aria-invalid={!valid}
      value={text}
      onChange={(event) => setDraft(event.target.value)}
      onBlur={finish}
      onKeyDown={onKeyDown}
    />
  );
}
