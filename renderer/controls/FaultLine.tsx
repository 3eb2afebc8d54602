/** A fault inside a sheet, which notices cannot reach: what lies under a modal sheet is inert. */
export function FaultLine({ text }: { readonly text: string | null }) {
  return text === null ? null : (
    <p className="field-fault any-text" role="alert">
      {text}
    </p>
  );
}
