import { paper, type Theme } from "./colour/theme";
import type { FigureDefinition } from "./figure-definition";
import type { PanelMarks } from "./scales/cell-marks";
import { descriptionOf } from "./scales/description";
import { driftAcrossPanel, driftAlongPanel } from "./scales/drift-panels";
import { energyPanel } from "./scales/energy-panel";
import { factColumn, factRows } from "./scales/fact-column";
import { forcingFacts, waveFacts } from "./scales/facts";
import type { Drawing, ScalesInput, ScalesSize } from "./scales/input";
import { type Cell, type CellId, scalesLayout } from "./scales/layout";
import { periodPanel } from "./scales/period-panel";
import { persistencePanel } from "./scales/persistence-panel";
import { gradientPanel, longestRunPanel, meanFlowPanel, pushPanel } from "./scales/profile-panels";
import { rulerPanel } from "./scales/ruler-panel";
import { timeScaleBars } from "./scales/time-scale-bars";
import { wavePanel } from "./scales/wave-panel";
import { wavelengthPanel } from "./scales/wavelength-panel";
import { zonalityPanel } from "./scales/zonality-panel";
import type { Scene } from "./scene";

export type { ScalesInput, ScalesPart, ScalesSize } from "./scales/input";

/** What draws each cell of the layout. */
const panels: Readonly<Record<CellId, (cell: Cell, drawing: Drawing) => PanelMarks>> = {
  energy: energyPanel,
  wavelengths: wavelengthPanel,
  period: periodPanel,
  "time-scales": timeScaleBars,
  zonality: zonalityPanel,
  waves: wavePanel,
  "drift-along": driftAlongPanel,
  "drift-across": driftAcrossPanel,
  "mean-flow": meanFlowPanel,
  push: pushPanel,
  gradient: gradientPanel,
  persistence: persistencePanel,
  "longest-run": longestRunPanel,
  ruler: rulerPanel,
  facts: (cell, drawing) => factColumn(cell, forcingFacts(drawing.input.result), drawing),
  "fact-rows": (cell, drawing) => factRows(cell, forcingFacts(drawing.input.result), drawing),
  "wave-facts": (cell, drawing) => factRows(cell, waveFacts(drawing.input.result), drawing),
};

/**
 * What sets the flow's scales: spectra, spacing against theory, waves and drift, forcing by the eddies. A pure function: the
 * same input, size and theme give the same scene. All panels want 1300 × 700, or 640 × 860 where the figure is taller than
 * wide; a page of them 640 × 480. Parts that a record cannot have are a sentence with the reason.
 */
export function scalesScene(input: ScalesInput, size: ScalesSize, theme: Theme = paper): Scene {
  const { sizes, cells } = scalesLayout(size);
  const drawing = { input, sizes, theme };
  const drawn = cells.map((cell) => panels[cell.id](cell, drawing));
  return {
    width: size.width,
    height: size.height,
    background: theme.ground,
    title: `Scales of the flow, ${input.region}`,
    description: descriptionOf(input),
    marks: drawn.flatMap(({ marks }) => marks),
    panels: drawn.flatMap((each) => each.panels),
  };
}

export const scalesFigure: FigureDefinition<"scales", ScalesInput, ScalesSize> = {
  id: "scales",
  title: "Scales",
  summary: "Spectra, spacing of jets against theory, drift and waves, forcing by the eddies",
  // A full page with its caption.
  heightShare: 1.35,
  scene: scalesScene,
};
