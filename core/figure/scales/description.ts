import { formatNumber } from "../format";
import { estimateText } from "./estimate-text";
import { type Fact, forcingFacts, waveFacts } from "./facts";
import type { ScalesInput } from "./input";

/** For people who cannot see the figure, and for the file's desc element: the numbers as sentences. */
export function descriptionOf({ result, region, grid }: ScalesInput): string {
  const { plane, lengths, notes } = result;
  const km = (value: number) => `${formatNumber(value / 1000, 0)} km`;
  const sentences = [
    `${grid}, ${region}`,
    ...(lengths.peakWavelength.value > 0
      ? [`Along meridians u varies most at a wavelength of ${estimateText(lengths.peakWavelength, 0.001)} km`]
      : []),
    ...(lengths.meanSpacing > 0 ? [`The jets of the mean are ${km(lengths.meanSpacing)} apart`] : []),
    ...(plane
      ? [`${formatNumber(100 * plane.shareInside, 0)} % of the kinetic energy lies inside the boundary of waves`]
      : []),
    ...[...forcingFacts(result), ...waveFacts(result)].map(factSentence),
  ];
  return [...sentences.map((sentence) => `${sentence}.`), ...notes].join(" ");
}

function factSentence({ label, values, notes }: Fact): string {
  return `${label}: ${values[0]}${notes ? ` (${notes[0]})` : ""}`;
}
