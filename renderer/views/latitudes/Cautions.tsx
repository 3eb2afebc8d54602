import type { Caution } from "../../../core/contract/engine";

const standing =
  "Geostrophic part of the flow only. Not for navigation: follow local rules and the judgement of licensed mariners.";

/** What limits the numbers on screen. */
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
        <li>{standing}</li>
      </ul>
    </section>
  );
}
