import { useEffect, useState } from "react";
import { formatLatitude } from "../../../core/figure/format";
import { useBenchState } from "../../app/bench-context";
import { rowAt } from "../../figure/cell-values";
import type { Picture } from "../../state/bench-state";
import { spokenCursor } from "../../text/spoken";
import { dateText, meanStyle, onDateText } from "./readout";

const restMs = 300;

/** Says where the cursor is once it has come to rest; nothing to see. */
export function Spoken({ picture }: { readonly picture: Picture }) {
  const cursor = useBenchState((state) => state.cursor);
  const playing = useBenchState((state) => state.playing);
  const [text, setText] = useState("");
  useEffect(() => {
    if (!cursor || playing) return;
    const timer = setTimeout(() => {
      const value = onDateText(picture, rowAt(picture, cursor.latitude), meanStyle(picture));
      setText(spokenCursor(formatLatitude(cursor.latitude, 2), dateText(picture, picture.result.dateIndex), value));
    }, restMs);
    return () => clearTimeout(timer);
  }, [cursor, playing, picture]);
  return (
    <p className="heard" role="status" aria-live="polite" data-spoken="cursor">
      {text}
    </p>
  );
}
