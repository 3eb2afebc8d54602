import { useEffect } from "react";
import { views } from "../views/index";
import { useBench, useBenchState } from "./bench-context";
import { Header } from "./Header";
import { KeysSheet } from "./KeysSheet";
import { Notices } from "./Notices";
import { useGround } from "./theme";
import { useKeys } from "./use-keys";

export function App() {
  const bench = useBench();
  const { ground, choice, choose } = useGround();
  const viewId = useBenchState((state) => state.view);
  const keysShown = useBenchState((state) => state.keysShown);
  const title = useBenchState((state) => state.studies?.present.study.title ?? "");
  useKeys(bench);
  useEffect(() => {
    document.title = title === "" ? "Strake" : `${title} · Strake`;
  }, [title]);
  const view = views.find((candidate) => candidate.id === viewId) ?? views[0];
  return (
    <div className="app">
      <Header groundChoice={choice} onGround={choose} view={view.id} />
      <main id="view" role="tabpanel" aria-labelledby={`tab-${view.id}`} className="view">
        {view.show(ground)}
      </main>
      <Notices />
      {keysShown ? <KeysSheet onClose={() => bench.set({ keysShown: false })} /> : null}
    </div>
  );
}
