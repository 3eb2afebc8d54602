import type { OpenStudy } from "../../../../core/contract/engine";
import { counted, formatNumber, formatSignificant } from "../../../../core/figure/format";
import type { EddyTestResult } from "../../../../core/model/jets-result";
import type { EddyTestSettings } from "../../../../core/study/schema";
import { useBench, useBenchState } from "../../../app/bench-context";
import { NumberSetting } from "../../../controls/NumberSetting";
import { Section } from "../../../controls/Section";
import { withEddyTest } from "../../../state/jets-state";
import { type PopulationNumber, populationNumbers, shownNumber, withPopulationNumber } from "./population-numbers";

const sectionId = "eddies";

/** How many oceans are drawn, and the eddies in them: estimated from the maps unless a number is set by hand. */
export function EddySettings({ open }: { readonly open: OpenStudy }) {
  const bench = useBench();
  const opened = useBenchState((state) => state.openSections);
  const estimates = useBenchState((state) => state.jets.tested?.result.population ?? null);
  const { eddyTest } = open.study;
  const edit = (change: Partial<EddyTestSettings>): void => bench.edit(withEddyTest(open, change));
  const others = opened.filter((each) => each !== sectionId);
  return (
    <Section
      title="Oceans and eddies"
      summary={summary(eddyTest)}
      open={opened.includes(sectionId)}
      onToggle={(isOpen) => {
        if (isOpen !== opened.includes(sectionId))
          bench.set({ openSections: isOpen ? [...others, sectionId] : others });
      }}
    >
      <NumberSetting
        title="Random oceans"
        value={eddyTest.oceans}
        rule={{ unit: "oceans", least: 1, most: 20_000, whole: true }}
        onCommit={(oceans) => edit({ oceans })}
      />
      <NumberSetting
        title="Seed"
        value={eddyTest.seed}
        rule={{ unit: "", least: 0, most: 4_294_967_295, whole: true }}
        onCommit={(seed) => edit({ seed })}
      />
      <p className="quiet">Eddies: a blank field is estimated from the maps.</p>
      {populationNumbers.map((number) => (
        <PopulationField
          key={number.key}
          number={number}
          population={eddyTest.population}
          estimates={estimates}
          onCommit={(shown) => edit({ population: withPopulationNumber(eddyTest.population, number, shown) })}
        />
      ))}
      {estimates ? (
        <p className="quiet any-text">
          {formatNumber(100 * estimates.shareHigh, 0)} % of them are highs. Energy: {estimates.notes.energy}.
        </p>
      ) : null}
    </Section>
  );
}

interface PopulationFieldProps {
  readonly number: PopulationNumber;
  readonly population: EddyTestSettings["population"];
  /** Of the last test; null before there was one. */
  readonly estimates: EddyTestResult["population"] | null;
  readonly onCommit: (shown: number | null) => void;
}

/** One number of the population, with how the last test found it. */
function PopulationField({ number, population, estimates, onCommit }: PopulationFieldProps) {
  const stored = population[number.key];
  const { unit, least, most } = number;
  return (
    <div>
      <NumberSetting<number | null>
        title={number.title}
        value={stored === undefined ? null : shownNumber(number, stored)}
        rule={{ unit, least, most, optional: true }}
        placeholder={estimates ? formatSignificant(estimates[number.key] * number.scale, 3) : "estimated"}
        onCommit={onCommit}
      />
      {estimates ? <p className="quiet any-text found-how">{capital(estimates.notes[number.note] ?? "")}</p> : null}
    </div>
  );
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function summary({ oceans, seed, population }: EddyTestSettings): string {
  const byHand = Object.values(population).filter((each) => each !== undefined).length;
  const eddies = byHand === 0 ? "eddies estimated" : `${byHand} of the eddies’ numbers set`;
  return `${counted(oceans, "ocean")}, seed ${seed}, ${eddies}`;
}
