import { Button } from "../controls/Button";
import { useBench, useBenchState } from "./bench-context";

/** Faults and news, newest last; a fault stays until it is dismissed. */
export function Notices() {
  const bench = useBench();
  const notices = useBenchState((state) => state.notices);
  return (
    <div className="notices" data-notices={notices.length}>
      {notices.map((notice) => (
        <div key={notice.id} className={`notice ${notice.kind}`} role={notice.kind === "error" ? "alert" : "status"}>
          <h3>{notice.heading}</h3>
          <p className="any-text">{notice.text}</p>
          <Button kind="icon" label="Dismiss" onPress={() => bench.dismiss(notice.id)}>
            ×
          </Button>
        </div>
      ))}
    </div>
  );
}
