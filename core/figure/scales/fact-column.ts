import { textMark } from "../marks";
import type { Mark } from "../scene";
import { fittingText } from "../text-width";
import type { PanelMarks } from "./cell-marks";
import type { Fact } from "./facts";
import type { Drawing } from "./input";
import { type Cell, factHeight } from "./layout";

/** From a label's base line to its value's in headings, from there to the note's in small type sizes. */
const valueDrop = 1.25;
const noteDrop = 1.2;
/** Between one fact and the next, in small type sizes above the label's own height. */
const [leastGap, mostGap] = [0.8, 2.2];

/** Findings as words and numbers under one another, from the heading's line down; the last are left out where there is no room. */
export function factColumn(cell: Cell, facts: readonly Fact[], drawing: Drawing): PanelMarks {
  const { heading, small } = drawing.sizes;
  const heights = facts.map(({ notes }) => valueDrop * heading + (notes ? noteDrop * small : 0) + 0.8 * small);
  const height = cell.frame.y + cell.frame.height + cell.foot - cell.headingBase + 0.6 * small;
  let count = facts.length;
  const taken = () => heights.slice(0, count).reduce((sum, each) => sum + each, 0);
  while (count > 1 && taken() + (count - 1) * leastGap * small > height) count--;
  const gap = Math.min(mostGap * small, (height - taken()) / Math.max(1, count - 1));
  let base = cell.headingBase;
  const marks: Mark[] = [];
  for (const [index, fact] of facts.slice(0, count).entries()) {
    marks.push(...factMarks(cell.id, fact, { x: cell.frame.x, base, width: cell.frame.width }, drawing));
    base += heights[index] + gap;
  }
  return { panels: [], marks };
}

/** The same in rows under the panels, one fact a column of the grid. */
export function factRows(cell: Cell, facts: readonly Fact[], drawing: Drawing): PanelMarks {
  const columns = Math.max(1, Math.round((cell.frame.width + cell.inset) / cell.pitch));
  const width = cell.frame.width - (columns - 1) * cell.pitch;
  const rows = Math.ceil(facts.length / columns);
  return {
    panels: [],
    marks: facts.flatMap((fact, index) => {
      const x = cell.frame.x + Math.floor(index / rows) * cell.pitch;
      const base = cell.headingBase + (index % rows) * factHeight(drawing.sizes);
      return factMarks(cell.id, fact, { x, base, width }, drawing);
    }),
  };
}

function factMarks(
  cell: string,
  { id, label, shortLabel = label, values, notes }: Fact,
  { x, base, width }: { readonly x: number; readonly base: number; readonly width: number },
  { sizes, theme }: Drawing,
): Mark[] {
  const { heading, small } = sizes;
  const grey = { size: small, fill: theme.softInk };
  const value = base + valueDrop * heading;
  const marks: Mark[] = [
    textMark(`${cell}-${id}-label`, x, base, fittingText([label, shortLabel], width, small), grey),
    textMark(`${cell}-${id}`, x, value, fittingText(values, width, heading, 700), {
      size: heading,
      weight: 700,
      fill: theme.ink,
    }),
  ];
  if (!notes) return marks;
  return [
    ...marks,
    textMark(`${cell}-${id}-note`, x, value + noteDrop * small, fittingText(notes, width, small), grey),
  ];
}
