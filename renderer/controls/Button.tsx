import type { ReactNode } from "react";

interface ButtonProps {
  readonly children: ReactNode;
  readonly onPress: () => void;
  readonly kind?: "plain" | "main" | "icon";
  readonly label?: string;
  readonly disabled?: boolean;
  readonly pressed?: boolean;
}

export function Button({ children, onPress, kind = "plain", label, disabled, pressed }: ButtonProps) {
  return (
    <button
      type="button"
      className={`button ${kind}`}
      onClick={onPress}
      disabled={disabled}
      aria-label={label}
      title={label}
      aria-pressed={pressed}
    >
      {children}
    </button>
  );
}
