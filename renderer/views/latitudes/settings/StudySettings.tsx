import type { OpenStudy } from "../../../../core/contract/engine";
import { useBench, useBenchState } from "../../../app/bench-context";
import { Section } from "../../../controls/Section";
import { settingsSections } from "./index";

/** The study's settings in sections, closed at first; each change is a new study that Undo takes back. */
export function StudySettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const opened = useBenchState((state) => state.openSections);
  const toggle = (id: string, isOpen: boolean): void => {
    if (isOpen === opened.includes(id)) return;
    bench.set({ openSections: isOpen ? [...opened, id] : opened.filter((each) => each !== id) });
  };
  return (
    <section className="settings" aria-label="Settings">
      {settingsSections.map(({ id, title, summary, Body }) => (
        <Section
          key={id}
          title={title}
          summary={summary(open.study)}
          open={opened.includes(id)}
          onToggle={(isOpen) => toggle(id, isOpen)}
        >
          <Body open={open} />
        </Section>
      ))}
    </section>
  );
}
