import { type Box, type TypeSizes, tickLabelDrop, typeSizes } from "../latitudes/layout";
import { ascentShare, descentShare } from "../marks";
import { textWidth } from "../text-width";
import type { ScalesSize } from "./input";

export type CellId =
  | "energy"
  | "wavelengths"
  | "period"
  | "time-scales"
  | "zonality"
  | "waves"
  | "drift-along"
  | "drift-across"
  | "mean-flow"
  | "push"
  | "gradient"
  | "persistence"
  | "longest-run"
  | "ruler"
  | "facts"
  | "fact-rows"
  | "wave-facts";

/** A place for one panel: the frame, the base lines over it and the room left of it for the labels of its ticks. */
export interface Cell {
  readonly id: CellId;
  readonly frame: Box;
  readonly headingBase: number;
  readonly subheadingBase: number;
  /** Pixels left of the frame that belong to the cell; next to none where the panel shares its neighbour's axis. */
  readonly inset: number;
  /** Pixels right of the frame and under it that are nobody else's. */
  readonly outset: number;
  readonly foot: number;
  /** From one column of the grid to the next. */
  readonly pitch: number;
}

export interface ScalesLayout {
  readonly sizes: TypeSizes;
  readonly cells: readonly Cell[];
}

/** A stretch of a row: one panel a column, or panels that share one axis over several columns. */
interface Stretch {
  readonly ids: readonly CellId[];
  readonly columns: number;
}

interface Row {
  /** Share of the height left for frames. */
  readonly weight: number;
  readonly stretches: readonly Stretch[];
  /** Rows of facts in a row of words alone, which is as high as they are. */
  readonly factRows?: number;
}

const profiles: readonly CellId[] = ["mean-flow", "push", "gradient"];
const profilesAndMap: readonly CellId[] = [...profiles, "persistence", "longest-run"];
/** A map beside profiles is so many times as wide as each of them. */
const widthShares: Readonly<Partial<Record<CellId, number>>> = { persistence: 2 };

function row(weight: number, ...stretches: readonly (CellId | Stretch)[]): Row {
  return {
    weight,
    stretches: stretches.map((each) => (typeof each === "string" ? { ids: [each], columns: 1 } : each)),
  };
}

/** A row of words under the panels, over all columns. */
function words(id: CellId, columns: number, factRows: number): Row {
  return { weight: 0, stretches: [{ ids: [id], columns }], factRows };
}

function tallWith(ids: readonly CellId[]): readonly Row[] {
  return [
    row(1.25, "energy", "wavelengths", "ruler"),
    row(1, "period", "time-scales", "zonality"),
    row(1, "waves", "drift-along", "drift-across"),
    row(1, { ids, columns: 3 }),
    words("fact-rows", 3, 2),
  ];
}

const arrangements = {
  wide: [
    row(1, "energy", "wavelengths", "zonality", "ruler"),
    row(1, "waves", "drift-along", "drift-across", "period"),
    row(1, { ids: profiles, columns: 2 }, "facts", "time-scales"),
  ],
  tall: tallWith(profilesAndMap),
  narrow: tallWith(profiles),
  lengths: [row(1.15, "energy", "wavelengths", "ruler"), row(1, "period", "time-scales", "zonality")],
  waves: [row(1, "waves", "drift-along", "drift-across"), words("wave-facts", 3, 2)],
  forcing: [row(1, { ids: profilesAndMap, columns: 3 }), words("fact-rows", 3, 2)],
} as const;

/** Width over height above which all panels lie in four columns. */
const wideShape = 1.15;
/** Width over the size of headings under which five panels side by side do not hold their headings. */
const narrowHeadings = 50;
/** The widest label left of a frame. */
const widestLabel = "40° N";
const tickLength = 4;

function arrangementOf({ part = "all", width, height }: ScalesSize, { heading }: TypeSizes): readonly Row[] {
  if (part !== "all") return arrangements[part];
  if (width > wideShape * height) return arrangements.wide;
  return width < narrowHeadings * heading ? arrangements.narrow : arrangements.tall;
}

/** Height that a fact takes: its label, its value, a note and the space to the next. */
export function factHeight({ heading, small }: TypeSizes): number {
  return Math.ceil(1.25 * heading + 3.1 * small);
}

/** Lays the panels out on a grid: frames of a column share their left edge, those of a row their top. Whole pixels. */
export function scalesLayout(size: ScalesSize): ScalesLayout {
  const sizes = typeSizes(size);
  const { heading, small } = sizes;
  const rows = arrangementOf(size, sizes);
  const margin = Math.round(heading);
  const inset = Math.ceil(textWidth(widestLabel, small, 400) + tickLength + 6);
  const gap = Math.round(1.4 * heading);
  const head = Math.ceil(ascentShare * heading + 1.4 * small + (descentShare + 0.6) * small);
  const foot = Math.ceil(tickLabelDrop(sizes) + descentShare * small);
  const rowGap = Math.round(1.1 * heading);

  const count = Math.max(...rows.map(columnsOf));
  const pitch = (size.width - 2 * margin + gap) / count;
  const weights = rows.reduce((sum, { weight }) => sum + weight, 0);
  const fixed = rows.map(({ factRows }) => (factRows === undefined ? head + foot : factRows * factHeight(sizes)));
  const taken = fixed.reduce((sum, height) => sum + height, (rows.length - 1) * rowGap);
  const frames = size.height - 1.7 * margin - taken;
  const cells: Cell[] = [];
  let top = margin;
  for (const [index, { weight, stretches, factRows }] of rows.entries()) {
    const height = factRows === undefined ? Math.max(1, Math.floor((frames * weight) / weights)) : fixed[index] - head;
    let column = 0;
    for (const { ids, columns } of stretches) {
      for (const { id, x, width, own } of split(ids, columns, { left: margin + column * pitch, pitch, inset, gap })) {
        cells.push({
          id,
          frame: { x, y: top + head, width, height },
          headingBase: top + ascentShare * heading,
          subheadingBase: top + ascentShare * heading + 1.4 * small,
          inset: own,
          outset: x + width + gap > size.width - margin ? margin - 2 : gap,
          foot: factRows === undefined ? foot : 0,
          pitch,
        });
      }
      column += columns;
    }
    top += (factRows === undefined ? head + height + foot : fixed[index]) + rowGap;
  }
  return { sizes, cells };
}

function columnsOf({ stretches }: Row): number {
  return stretches.reduce((sum, { columns }) => sum + columns, 0);
}

interface Columns {
  readonly left: number;
  readonly pitch: number;
  readonly inset: number;
  readonly gap: number;
}

/** Frames of a stretch: on the grid's columns where there is one for each, else by their shares with a gap between. */
function split(ids: readonly CellId[], columns: number, { left, pitch, inset, gap }: Columns) {
  const onGrid = ids.length === columns;
  const first = Math.round(left + inset);
  const last = Math.round(left + columns * pitch - gap);
  const shareOf = (id: CellId) => widthShares[id] ?? 1;
  const shares = ids.reduce((sum, id) => sum + shareOf(id), 0);
  const even = Math.floor((last - first - (ids.length - 1) * gap) / shares);
  let next = first;
  return ids.map((id, index) => {
    const x = onGrid ? Math.round(left + index * pitch + inset) : next;
    const width = onGrid ? Math.round(left + (index + 1) * pitch - gap) - x : even * shareOf(id);
    next = x + width + gap;
    return { id, x, width, own: index === 0 || onGrid ? inset : gap };
  });
}
