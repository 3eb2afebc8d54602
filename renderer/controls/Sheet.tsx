import { type ReactNode, useEffect, useId, useRef } from "react";

interface SheetProps {
  readonly title: string;
  readonly onClose: () => void;
  readonly children: ReactNode;
}

/** A modal sheet over the page; Escape closes it and focus returns to where it was. */
export function Sheet({ title, onClose, children }: SheetProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const id = useId();
  useEffect(() => {
    const element = dialog.current;
    if (element && !element.open) element.showModal();
  }, []);
  return (
    <dialog ref={dialog} className="sheet" aria-labelledby={id} onClose={onClose}>
      <div className="sheet-body">
        <h2 id={id}>{title}</h2>
        {children}
      </div>
    </dialog>
  );
}
