import type { ComponentType } from "react";
import type { OpenStudy } from "../../../../core/contract/engine";
import type { Study } from "../../../../core/study/schema";
import { BackgroundSettings } from "./BackgroundSettings";
import { CurrentsSettings } from "./CurrentsSettings";
import { ErrorSettings } from "./ErrorSettings";
import { FilterSettings } from "./FilterSettings";
import { SpaceSettings } from "./SpaceSettings";
import { backgroundSummary, currentsSummary, errorSummary, filterSummary, spaceSummary } from "./summaries";

/** A part of the study's settings as the side panel shows it. */
export interface SettingsSection {
  readonly id: string;
  readonly title: string;
  /** The settings in a line, for the closed section. */
  readonly summary: (study: Study) => string;
  readonly Body: ComponentType<{ readonly open: OpenStudy }>;
}

/** The sections from top to bottom, in the order in which heights pass through them. A further section is one line here. */
export const settingsSections: readonly SettingsSection[] = [
  { id: "background", title: "Taken off before filtering", summary: backgroundSummary, Body: BackgroundSettings },
  { id: "space", title: "In space", summary: spaceSummary, Body: SpaceSettings },
  { id: "filter", title: "Filter", summary: filterSummary, Body: FilterSettings },
  { id: "currents", title: "Currents from height", summary: currentsSummary, Body: CurrentsSettings },
  { id: "error", title: "Height error", summary: errorSummary, Body: ErrorSettings },
];
