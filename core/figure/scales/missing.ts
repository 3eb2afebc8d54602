import type { ScalesResult } from "../../model/scales-result";

/** How each missing part is spoken of in a result's notes. */
const words = {
  plane: /two-dimensional|spectrum in space/,
  space: /spectrum in space/,
  period: /spectrum by period/,
  waves: /frequency-wavenumber/,
  along: /drift along/,
  across: /drift across/,
} as const;

/** Why a part is missing: the note that speaks of it, or that none does. */
export function missingReason({ notes }: Pick<ScalesResult, "notes">, part: keyof typeof words): string {
  return notes.find((note) => words[part].test(note)) ?? "The record cannot tell.";
}
