import { StrictMode } from "react";
import { createRoot } from "react-dom/client";
import { App } from "./app/App";
import { BenchContext } from "./app/bench-context";
import type { Door } from "./bridge/door";
import { engineLink } from "./bridge/engine-link";
import { createBench } from "./state/bench";
import { drafts } from "./state/draft";
import "./styles/fonts.css";
import "./styles/theme.css";
import "./styles/base.css";
import "./styles/controls.css";
import "./styles/app.css";
import "./styles/latitudes.css";
import "./styles/jets.css";
import "./styles/settings.css";
import "./styles/scales.css";
import "./styles/sources.css";

/** Puts the app into `root`, its engine behind `door`. */
export function startApp(root: HTMLElement, door: Door): void {
  const bench = createBench(engineLink(door), drafts(browserStorage()));
  createRoot(root).render(
    <StrictMode>
      <BenchContext value={bench}>
        <App />
      </BenchContext>
    </StrictMode>,
  );
}

/** The page's storage; null where the browser refuses even to name it. */
function browserStorage(): Storage | null {
  try {
    return window.localStorage;
  } catch {
    return null;
  }
}
