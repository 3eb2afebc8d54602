import type { ScalesResult } from "../../model/scales-result";

/** Sentences on what a result lacks and why, and on what rests on memory. */
export function scaleNotes(result: Omit<ScalesResult, "notes">): string[] {
  const { lengths, drift, alongLatitude } = result;
  const known = lengths.deformationRadius > 0;
  const at = `${Math.abs(alongLatitude).toFixed(2)}° ${alongLatitude < 0 ? "S" : "N"}`;
  const notes: [applies: boolean, text: string][] = [
    [
      lengths.deformationSource === "table",
      "The deformation radius is from a built-in table of zonal means that is off by up to 15 %.",
    ],
    [!known, "The table of deformation radii does not reach the middle latitude: no wave speeds there."],
    [
      result.meridional.eachMap === null,
      "No spectrum in space: the grid's steps are uneven, or no line across it has values on half its length.",
    ],
    [
      result.plane === null && result.meridional.eachMap !== null,
      "No two-dimensional spectrum: no map has values on half its cells.",
    ],
    [
      result.period === null,
      "No spectrum by period: fewer than 16 dates an even step apart, or gaps in every segment.",
    ],
    [
      result.frequencyWavenumber === null,
      `No frequency-wavenumber spectrum along ${at}: too few dates, uneven steps, or values on under half of the picture.`,
    ],
    [drift.alongLatitude === null, `No drift along ${at}: nothing that varies there, or too few dates.`],
    [drift.acrossLatitudes === null, "No drift across latitudes: nothing that varies, or too few dates."],
    [Number.isNaN(lengths.meanSpacing), "No spacing of jets: under two extremes of one sign in the mean profile."],
    [
      lengths.meanSpacing > 0 && lengths.meanSpacing < lengths.resolvedWavelength,
      "The mean spacing of jets is below what the study says the mapping resolves.",
    ],
  ];
  return notes.flatMap(([applies, text]) => (applies ? [text] : []));
}
