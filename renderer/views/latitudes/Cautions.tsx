import type { Caution } from "../../../core/contract/engine";

/** What limits the numbers on screen: the standing caution about geostrophic currents first, then what applies here. */
export function Cautions({ cautions }: { readonly cautions: readonly Caution[] }) {
  return (
    <section aria-label="Cautions">
      <h2>Cautions here</h2>
      <ul className="cautions">
        {cautions.map((caution) => (
          <li key={caution.id} className="any-text">
            {caution.text}
          </li>
        ))}
      </ul>
    </section>
  );
}
