import { quantities } from "../../../core/ocean/quantities/index";

/** Headings of the quantity menu, in its order, and whom they hold. A quantity named nowhere stands under the last. */
const headings: Readonly<Record<string, readonly string[]>> = {
  Height: ["height", "height-laplacian"],
  Currents: [
    "u",
    "v",
    "speed",
    "u-cyclogeostrophic",
    "v-cyclogeostrophic",
    "speed-cyclogeostrophic",
    "cyclogeostrophic-status",
  ],
  "Turning and strain": [
    "vorticity",
    "rossby-number",
    "divergence",
    "normal-strain",
    "shear-strain",
    "strain-rate",
    "okubo-weiss",
  ],
  Energy: ["kinetic-energy", "eddy-kinetic-energy"],
  "Potential vorticity": ["potential-vorticity-gradient"],
};
const otherwise = "Further";

export interface QuantityGroup {
  readonly heading: string;
  readonly choices: readonly { readonly value: string; readonly title: string }[];
}

/** Quantities under their headings, each once, in the order given within a heading; headings without any are left out. */
export function groupQuantities(
  all: readonly { readonly id: string; readonly title: string }[],
): readonly QuantityGroup[] {
  const headingOf = (id: string): string =>
    Object.keys(headings).find((heading) => headings[heading].includes(id)) ?? otherwise;
  return [...Object.keys(headings), otherwise]
    .map((heading) => ({
      heading,
      choices: all.filter(({ id }) => headingOf(id) === heading).map(({ id, title }) => ({ value: id, title })),
    }))
    .filter(({ choices }) => choices.length > 0);
}

export const quantityGroups = groupQuantities(quantities);
