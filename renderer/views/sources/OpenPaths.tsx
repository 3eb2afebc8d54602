import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { TextField } from "../../controls/TextField";
import { pathsFromText } from "../../state/paths";

/** Opens a study or data files: by the desktop's dialog where there is one, by path everywhere. */
export function OpenPaths() {
  const bench = useBench();
  const desktop = useBenchState((state) => state.door === "desktop");
  const busy = useBenchState((state) => state.loading !== null);
  const text = useBenchState((state) => state.pathsText);
  const paths = pathsFromText(text);
  const choose = async (what: "data" | "folder"): Promise<void> => {
    try {
      const chosen = await bench.link.ask(what);
      if (chosen.length > 0) await bench.loader.open(chosen);
    } catch (error) {
      bench.fail(error);
    }
  };
  return (
    <form
      className="sheet-body"
      onSubmit={(event) => {
        event.preventDefault();
        if (paths.length > 0) void bench.loader.open(paths);
      }}
    >
      {desktop ? (
        <div className="sheet-actions">
          <Button kind="main" onPress={() => void choose("data")}>
            Choose files…
          </Button>
          <Button onPress={() => void choose("folder")}>Choose a folder…</Button>
        </div>
      ) : null}
      <TextField
        title="Paths of a study or of data files, one a line"
        value={text}
        onChange={(pathsText) => bench.set({ pathsText })}
        lines={3}
        placeholder="/data/heights/2031.nc"
      />
      <div className="sheet-actions">
        <button type="submit" className={desktop ? "button" : "button main"} disabled={paths.length === 0 || busy}>
          Open
        </button>
      </div>
    </form>
  );
}
