import { Segments } from "../controls/Segments";
import { gridTitle } from "../text/record";
import { useBench, useBenchState } from "./bench-context";

/** Which grid is on the bench; a plain chip where there is only one. */
export function GridChoice() {
  const bench = useBench();
  const study = useBenchState((state) => state.studies?.present.study ?? null);
  const grid = useBenchState((state) => state.grid);
  const record = useBenchState((state) => state.record);
  if (!study) return null;
  if (study.grids.length > 1) {
    const choices = study.grids.map(({ id }) => ({
      value: id,
      title: gridTitle(study, id, null),
      short: `Grid ${id}`,
    }));
    return <Segments label="Grid" value={grid} choices={choices} onChoose={(id) => bench.chooseGrid(id)} />;
  }
  const text = gridTitle(study, study.grids[0].id, record);
  return (
    <span className="chip" title={text}>
      <span>{text}</span>
    </span>
  );
}
