import { useId } from "react";

interface TextFieldProps {
  readonly title: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly fault?: string | null;
  readonly placeholder?: string;
  readonly lines?: number;
}

/** A labelled line (or several) of text with its fault below it. */
export function TextField({ title, value, onChange, fault, placeholder, lines = 1 }: TextFieldProps) {
  const id = useId();
  const shared = {
    id,
    className: "input",
    value,
    placeholder,
    spellCheck: false,
    autoComplete: "off",
    "aria-invalid": Boolean(fault),
    "aria-describedby": fault ? `${id}-fault` : undefined,
  };
  return (
    <div className="field">
      <label htmlFor={id} className="quiet">
        {title}
      </label>
      {lines > 1 ? (
        <textarea {...shared} rows={lines} onChange={(event) => onChange(event.target.value)} />
      ) : (
        <input type="text" {...shared} onChange={(event) => onChange(event.target.value)} />
      )}
      {fault ? (
        <p className="field-fault" id={`${id}-fault`}>
          {fault}
        </p>
      ) : null}
    </div>
  );
}
