import { useState } from "react";
import type { Choice } from "../../../core/contract/wire";
import { useBench, useBenchState } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { TextField } from "../../controls/TextField";
import { noticeFromError } from "../../state/notices";

interface PlaceFieldProps {
  readonly title: string;
  readonly value: string;
  readonly onChange: (place: string) => void;
  /** Which dialog the desktop shows. */
  readonly what: Choice;
}

/** Where to write: a path, with the system's dialog beside it where the door has one. */
export function PlaceField({ title, value, onChange, what }: PlaceFieldProps) {
  const bench = useBench();
  const desktop = useBenchState((state) => state.door === "desktop");
  const [fault, setFault] = useState<string | null>(null);
  const choose = async (): Promise<void> => {
    try {
      const [chosen] = await bench.link.ask(what);
      if (chosen) onChange(chosen);
      setFault(null);
    } catch (error) {
      setFault(noticeFromError(error)?.text ?? null);
    }
  };
  return (
    <>
      <TextField title={title} value={value} onChange={onChange} fault={fault} />
      {desktop ? (
        <div>
          <Button onPress={() => void choose()}>Choose a place…</Button>
        </div>
      ) : null}
    </>
  );
}
