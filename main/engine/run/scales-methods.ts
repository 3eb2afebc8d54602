import { formatLatitude } from "../../../core/figure/format";
import type { ScalesResult } from "../../../core/model/scales-result";
import type { Study } from "../../../core/study/schema";

/** The paragraph on scales for methods.md; its numbers are the study's and the result's own. */
export function scalesMethods(scales: ScalesResult, { scales: settings }: Study): string[] {
  const { lengths, persistence, mapDates, alongLatitude } = scales;
  const radius = {
    table: "a built-in table of zonal means, off by up to 15 %",
    "wave speed": "a constant first-mode speed over |f|",
    file: "the study's own table",
  }[lengths.deformationSource];
  const transformed =
    mapDates.length > 0
      ? `Wavenumber spectra are of ${mapDates.length} maps evenly over the record, trend off, Hann taper, gaps of two cells bridged; the peak wavelength is that of wavenumber times density, with limits from 1000 resamples of blocks of dates (Künsch 1989), no closer than half a step of wavenumber. `
      : "";
  return [
    `${transformed}The Rhines scale takes the rms speed of ${settings.rhinesSpeed === "total" ? "the whole flow" : "the departures from each cell's time mean"} ` +
      `(Rhines 1975; Vallis & Maltrud 1993, also for the boundary between waves and turbulence); the deformation radius is from ${radius}. ` +
      `Drift is the slope of the lines of largest variance in the longitude-time picture of northward velocity at ${formatLatitude(alongLatitude, 2)}, each longitude's mean off, and in the latitude-time picture of zonal-mean eastward velocity with only its overall mean off, so that standing jets have speed zero; limits are no closer than half a step of angle. ` +
      "Eddy forcing is minus the divergence of the zonal mean of u′v′ about each date's zonal mean, on the earth chosen; its regression on the flow counts effective pairs (Bretherton et al. 1999). " +
      `The sign of the flow ${persistence.inBand ? "in the band" : "as it stands"} was followed on maps ${Number(persistence.stepDays.toFixed(2))} days apart.`,
    "",
  ];
}

/** The works that `scalesMethods` names and no other paragraph does, in alphabetical order. */
export function scalesReferences({ mapDates }: Pick<ScalesResult, "mapDates">): string[] {
  return [
    ...(mapDates.length > 0 ? ["Künsch, H. R. (1989). Ann. Stat. 17, 1217–1241."] : []),
    "Rhines, P. B. (1975). J. Fluid Mech. 69, 417.",
    "Vallis, G. K., and Maltrud, M. E. (1993). J. Phys. Oceanogr. 23, 1346.",
  ];
}
