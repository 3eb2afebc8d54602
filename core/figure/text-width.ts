/**
 * Advance widths of Atkinson Hyperlegible Next in thousandths of the type size, code points 32 to 126, with tabular
 * figures. Read from the font's own tables (version 2.001, SIL Open Font License).
 */
const regular = [
  280, 286, 301, 651, 592, 919, 731, 160, 299, 299, 485, 606, 210, 362, 210, 387, 632, 632, 632, 632, 632, 632, 632,
  632, 632, 632, 210, 210, 553, 628, 553, 480, 778, 626, 613, 645, 669, 569, 552, 694, 694, 392, 512, 631, 541, 824,
  693, 714, 592, 724, 614, 592, 558, 690, 593, 856, 623, 575, 607, 317, 387, 344, 552, 372, 243, 525, 566, 485, 564,
  538, 314, 558, 550, 252, 245, 492, 262, 845, 550, 548, 566, 574, 349, 471, 326, 540, 461, 684, 481, 449, 460, 344,
  237, 344, 555,
];
const bold = [
  312, 303, 390, 765, 610, 969, 725, 210, 335, 335, 485, 595, 271, 373, 272, 440, 632, 632, 632, 632, 632, 632, 632,
  632, 632, 632, 272, 272, 569, 612, 569, 547, 781, 678, 643, 658, 688, 597, 566, 718, 701, 424, 561, 663, 552, 858,
  717, 746, 629, 756, 650, 610, 607, 686, 644, 886, 685, 650, 618, 340, 440, 344, 582, 400, 288, 552, 596, 510, 596,
  563, 365, 593, 571, 300, 259, 555, 318, 882, 571, 576, 596, 599, 376, 508, 376, 567, 530, 740, 539, 521, 505, 381,
  254, 381, 537,
];
const others: Readonly<Record<string, number>> = {
  "\u00a0": 312,
  "°": 394,
  "·": 294,
  "−": 606,
  "–": 504,
  "×": 536,
  "±": 611,
  "≈": 554,
  "…": 780,
  "“": 479,
  "”": 479,
  "’": 269,
  "√": 685,
  π: 625,
  "∞": 774,
  "∂": 596,
  // Greek letters that the font lacks come from the system's: as wide as its widest usual face has them.
  β: 700,
  θ: 700,
};
/** Letters outside the table are counted as wide as a wide capital, so that a foreign title is never cut off. */
const unknownWidth = 900;

/** Superscripts are set as raised small figures: see superscriptRuns. */
export const superscriptScale = 0.7;
export const superscriptRise = 0.34;

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹⁻";
const plain = "0123456789−";

/** A stretch of text on the base line, or raised. */
export interface TextRun {
  readonly text: string;
  readonly raised: boolean;
}

/**
 * Splits superscript figures off as raised ordinary ones: "cm s⁻¹" gives "cm s" and a raised "−1". The bundled font has
 * no superscript minus, and a glyph that falls back to another font may vanish in print.
 */
export function superscriptRuns(text: string): TextRun[] {
  const runs: { text: string; raised: boolean }[] = [];
  for (const character of text) {
    const place = superscripts.indexOf(character);
    const raised = place >= 0;
    const last = runs.at(-1);
    const shown = raised ? plain[place] : character;
    if (last && last.raised === raised) last.text += shown;
    else runs.push({ text: shown, raised });
  }
  return runs;
}

/** Width in pixels of a line of text at that type size, with tabular figures and no kerning. */
export function textWidth(text: string, size: number, weight: 400 | 700): number {
  const table = weight === 700 ? bold : regular;
  let thousandths = 0;
  for (const run of superscriptRuns(text)) {
    let sum = 0;
    for (const character of run.text) sum += table[character.charCodeAt(0) - 32] ?? others[character] ?? unknownWidth;
    thousandths += run.raised ? superscriptScale * sum : sum;
  }
  return (thousandths * size) / 1000;
}

/**
 * The first of `candidates` (longest first) that fits into `available` pixels; where none does, the last is shortened
 * with an ellipsis, down to nothing.
 */
export function fittingText(
  candidates: readonly string[],
  available: number,
  size: number,
  weight: 400 | 700 = 400,
): string {
  for (const candidate of candidates) if (textWidth(candidate, size, weight) <= available) return candidate;
  const letters = [...(candidates.at(-1) ?? "")];
  while (letters.length > 0) {
    letters.pop();
    const shortened = `${letters.join("").trimEnd()}…`;
    if (textWidth(shortened, size, weight) <= available) return letters.length > 0 ? shortened : "";
  }
  return "";
}
