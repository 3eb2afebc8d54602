import type { ReactNode } from "react";
import { createElement } from "react";
import type { Ground } from "../app/theme";
import { LatitudesView } from "./latitudes/LatitudesView";
import { ScalesView } from "./scales/ScalesView";
import { SourcesView } from "./sources/SourcesView";

export interface View {
  readonly id: string;
  readonly title: string;
  readonly show: (ground: Ground) => ReactNode;
}

/** The views, in the order of their tabs. A further view is one line here. */
export const views: readonly View[] = [
  { id: "sources", title: "Sources", show: () => createElement(SourcesView) },
  { id: "latitudes", title: "Latitudes", show: (ground) => createElement(LatitudesView, { ground }) },
  { id: "scales", title: "Scales", show: (ground) => createElement(ScalesView, { ground }) },
];
