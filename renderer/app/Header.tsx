import { Button } from "../controls/Button";
import { useBench, useBenchState } from "./bench-context";
import { GridChoice } from "./GridChoice";
import { GroundSwitch } from "./GroundSwitch";
import { Tabs } from "./Tabs";
import type { GroundChoice } from "./theme";

interface HeaderProps {
  readonly view: string;
  readonly groundChoice: GroundChoice;
  readonly onGround: (choice: GroundChoice) => void;
}

export function Header({ view, groundChoice, onGround }: HeaderProps) {
  const bench = useBench();
  const title = useBenchState((state) => state.studies?.present.study.title ?? "");
  const canUndo = useBenchState((state) => (state.studies?.past.length ?? 0) > 0);
  const canRedo = useBenchState((state) => (state.studies?.future.length ?? 0) > 0);
  return (
    <header className="header">
      <h1>Strake</h1>
      {title !== "" ? (
        <span className="study-title" title={title.slice(0, 200)}>
          {title}
        </span>
      ) : null}
      <Tabs view={view} />
      <div className="header-end">
        <GridChoice />
        <Button onPress={() => bench.undo()} disabled={!canUndo}>
          Undo
        </Button>
        <Button onPress={() => bench.redo()} disabled={!canRedo}>
          Redo
        </Button>
        <GroundSwitch choice={groundChoice} onChoose={onGround} />
      </div>
    </header>
  );
}
