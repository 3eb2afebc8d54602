import { useState } from "react";
import type { OpenStudy } from "../../../core/contract/engine";
import { useBench } from "../../app/bench-context";
import { TextField } from "../../controls/TextField";
import { withExtent } from "../../state/edit-study";
import { draftOf, type ExtentDraft, readExtent } from "./extent-draft";

const fields: readonly (readonly [keyof ExtentDraft, string, string])[] = [
  ["west", "West, °E", "all"],
  ["east", "East, °E", "all"],
  ["south", "South, °N", "all"],
  ["north", "North, °N", "all"],
  ["from", "First date", "YYYY-MM-DD"],
  ["to", "Last date", "YYYY-MM-DD"],
];

/** Region and period of the study. Applied together, once the fields can be read and the engine agrees. */
export function ExtentForm({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const [draft, setDraft] = useState(() => draftOf(open.study.region, open.study.period));
  const [busy, setBusy] = useState(false);
  const { region, period, faults } = readExtent(draft);
  const next = withExtent(open, region, period);
  const changed = JSON.stringify(draft) !== JSON.stringify(draftOf(open.study.region, open.study.period));
  const usable = Object.keys(faults).length === 0;

  const apply = async (): Promise<void> => {
    setBusy(true);
    try {
      const study = await bench.link.engine.check({ study: next.study });
      bench.edit({ ...open, study });
    } catch (error) {
      bench.fail(error);
    } finally {
      setBusy(false);
    }
  };
  return (
    <section aria-label="Region and period">
      <div>
        <h2>Region and period</h2>
        <p className="quiet">Left blank: all of the first grid.</p>
      </div>
      <form
        className="sheet-body"
        onSubmit={(event) => {
          event.preventDefault();
          void apply();
        }}
      >
        <div className="form-grid">
          {fields.map(([key, title, placeholder]) => (
            <TextField
              key={key}
              title={title}
              value={draft[key]}
              placeholder={placeholder}
              fault={changed ? faults[key] : null}
              onChange={(value) => setDraft({ ...draft, [key]: value })}
            />
          ))}
        </div>
        <div className="sheet-actions">
          <button type="submit" className="button main" disabled={!changed || !usable || busy}>
            Apply
          </button>
        </div>
      </form>
    </section>
  );
}
