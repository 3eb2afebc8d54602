import { useEffect } from "react";
import { Button } from "../controls/Button";
import type { Notice } from "../state/notices";
import { useBench, useBenchState } from "./bench-context";

const newsMs = 10_000;

/** Faults and news, newest last. A fault stays until it is dismissed; news leaves by itself. */
export function Notices() {
  const notices = useBenchState((state) => state.notices);
  return (
    <div className="notices">
      {notices.map((notice) => (
        <NoticeCard key={notice.id} notice={notice} />
      ))}
    </div>
  );
}

function NoticeCard({ notice }: { readonly notice: Notice }) {
  const bench = useBench();
  const { id, kind } = notice;
  useEffect(() => {
    if (kind !== "news") return;
    const timer = setTimeout(() => bench.dismiss(id), newsMs);
    return () => clearTimeout(timer);
  }, [bench, id, kind]);
  return (
    <div className={`notice ${kind}`} role={kind === "error" ? "alert" : "status"}>
      <h3>{notice.heading}</h3>
      <p className="any-text">{notice.text}</p>
      <Button kind="icon" label="Dismiss" onPress={() => bench.dismiss(id)}>
        ×
      </Button>
    </div>
  );
}
