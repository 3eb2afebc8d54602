import type { RulerLength, ScaleLengths } from "../../model/scales-result";

/** The lengths that go on one ruler, all as half-wavelengths in metres; unknown ones are left out. */
export function rulerOf(lengths: Omit<ScaleLengths, "ruler">): RulerLength[] {
  const { peakWavelength, rhines, rhinesSpeed } = lengths;
  const speed = rhinesSpeed === "total" ? "the whole flow" : "the eddies";
  const row = (id: string, title: string, value: number, basis: string): RulerLength => ({
    id,
    title,
    halfWavelength: { value, low95: Number.NaN, high95: Number.NaN },
    basis,
  });
  const entries = [
    row("spacing", "Jets of the mean", lengths.meanSpacing / 2, "half the mean distance of extremes of one sign"),
    row("band-spacing", "Jets in the band", lengths.bandSpacing / 2, "half the mean distance of extremes of one sign"),
    {
      ...row(
        "peak",
        "Peak of each map's u",
        peakWavelength.value / 2,
        "half the wavelength of most variance; limits of sampling, and at least half a step of wavenumber",
      ),
      halfWavelength: {
        value: peakWavelength.value / 2,
        low95: peakWavelength.low95 / 2,
        high95: peakWavelength.high95 / 2,
      },
    },
    row(
      "mean-peak",
      "Peak of the mean's u",
      lengths.timeMeanPeakWavelength / 2,
      "half the wavelength of most variance",
    ),
    row("rhines", "π √(U/β)", rhines["root-width"][rhinesSpeed], `U is the rms speed of ${speed}`),
    row("rhines-two", "π √(2U/β)", rhines["root-two-width"][rhinesSpeed], `U is the rms speed of ${speed}`),
    row(
      "deformation",
      "π times deformation radius",
      Math.PI * lengths.deformationRadius,
      "half of 2π times the radius",
    ),
    row("resolved", "Resolved by the mapping", lengths.resolvedWavelength / 2, "half the wavelength the study names"),
    row("grid", "Resolved by the grid", lengths.gridWavelength / 2, "the spacing of the cells"),
  ];
  return entries.filter(({ halfWavelength }) => halfWavelength.value > 0);
}
