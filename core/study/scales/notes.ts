import type { ScalesResult } from "../../model/scales-result";

/** Sentences on what a result lacks and why, and on what rests on memory. */
export function scaleNotes(result: Omit<ScalesResult, "notes">): string[] {
  const { lengths, drift, alongLatitude } = result;
  const known = lengths.deformationRadius > 0;
  const boundarySpeed = lengths.rhinesSpeed === "total" ? lengths.totalSpeed : lengths.eddySpeed;
  const whose = lengths.rhinesSpeed === "total" ? "the whole flow" : "the eddies";
  const at = `${Math.abs(alongLatitude).toFixed(2)}° ${alongLatitude < 0 ? "S" : "N"}`;
  const notes: [applies: boolean, text: string][] = [
    [
      lengths.deformationSource === "table",
      "The deformation radius is from a built-in table of zonal means that is off by up to 15 %.",
    ],
    [
      lengths.deformationSource === "table" && known,
      "The long Rossby speed is the first baroclinic mode's, from a table of the real ocean; a sea without stratification has none.",
    ],
    [!known, "The table of deformation radii does not reach the middle latitude: no wave speeds there."],
    [
      result.meridional.eachMap === null,
      "No spectrum in space: the grid's steps are uneven, or no line across it has values on half its length.",
    ],
    [
      Number.isNaN(lengths.eddySpeed) && lengths.totalSpeed > 0,
      "No speed of the eddies: no cell has values on two dates, and no Rhines scale follows from it.",
    ],
    [
      result.plane === null && result.meridional.eachMap !== null && !(boundarySpeed > 0),
      `No two-dimensional spectrum: its boundary of waves rests on the speed of ${whose}, which is unknown or zero.`,
    ],
    [
      result.plane === null && result.meridional.eachMap !== null && boundarySpeed > 0,
      "No two-dimensional spectrum: no map has values on half its cells.",
    ],
    [result.period === null, "No spectrum by period: fewer than 16 dates, or gaps in every segment."],
    [
      result.period !== null && result.energy === null,
      "No energy by time scale: it wants dates an even step apart and without long gaps.",
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
