import type { Theme } from "./colour/theme";
import type { Scene } from "./scene";

/** A figure as a study names it: one file "<id>-figure.ts", one line in the index. */
export interface FigureDefinition<Id extends string, Input, Size> {
  readonly id: Id;
  readonly title: string;
  /** What it shows, in one line for menus and help. */
  readonly summary: string;
  /** Height over width on paper; left out: that of a row of panels. */
  readonly heightShare?: number;
  /** Pure function of results, size and theme. */
  readonly scene: (input: Input, size: Size, theme?: Theme) => Scene;
}
