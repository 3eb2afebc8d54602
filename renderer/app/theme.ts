import { useEffect, useLayoutEffect, useState } from "react";
import { type Theme, themes } from "../../core/figure/colour/theme";

export type Ground = Theme["id"];
export type GroundChoice = Ground | "auto";

const key = "strake.ground";
const darkQuery = "(prefers-color-scheme: dark)";

/** The ground in use, the person's choice (kept between visits) and how to change it. */
export function useGround(): { ground: Ground; choice: GroundChoice; choose: (choice: GroundChoice) => void } {
  const [choice, setChoice] = useState<GroundChoice>(keptChoice);
  const [dark, setDark] = useState(() => window.matchMedia(darkQuery).matches);
  useEffect(() => {
    const query = window.matchMedia(darkQuery);
    const update = (): void => setDark(query.matches);
    query.addEventListener("change", update);
    return () => query.removeEventListener("change", update);
  }, []);
  const ground = choice === "auto" ? (dark ? "night" : "paper") : choice;
  useLayoutEffect(() => dress(ground), [ground]);
  const choose = (next: GroundChoice): void => {
    setChoice(next);
    try {
      localStorage.setItem(key, next);
    } catch {
      // Without storage the choice lasts as long as the window.
    }
  };
  return { ground, choice, choose };
}

function keptChoice(): GroundChoice {
  try {
    const kept = localStorage.getItem(key);
    return kept === "paper" || kept === "night" ? kept : "auto";
  } catch {
    return "auto";
  }
}

/** Gives the page the figure's own colours, so that window and figure are of one piece. */
function dress(ground: Ground): void {
  const root = document.documentElement;
  const theme = themes[ground];
  root.dataset.theme = ground;
  const colours = {
    ground: theme.ground,
    surface: theme.panel,
    ink: theme.ink,
    muted: theme.softInk,
    line: theme.rule,
    amber: theme.amber,
    "amber-ink": theme.amberInk,
    "amber-ground": theme.amberTint,
    danger: theme.gap,
    rust: theme.rust,
    teal: theme.teal,
  };
  for (const [name, value] of Object.entries(colours)) root.style.setProperty(`--${name}`, value);
}
