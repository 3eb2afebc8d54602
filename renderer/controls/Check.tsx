interface CheckProps {
  readonly title: string;
  readonly checked: boolean;
  readonly onChange: (checked: boolean) => void;
}

export function Check({ title, checked, onChange }: CheckProps) {
  return (
    <label className="check">
      <input type="checkbox" checked={checked} onChange={(event) => onChange(event.target.checked)} />
      {title}
    </label>
  );
}
