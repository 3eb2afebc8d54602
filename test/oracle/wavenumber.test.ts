import { describe, expect, test } from "vitest";
import { oneSidedAxis } from "../../core/numeric/spectra/density";
import { frequencyWavenumberSpectrum } from "../../core/numeric/spectra/frequency-wavenumber";
import { lombScargle } from "../../core/numeric/spectra/lomb-scargle";
import { planeSpectrum } from "../../core/numeric/spectra/plane";
import type { Taper } from "../../core/numeric/spectra/tapers";
import { meridionalSpectrum, type WavenumberSettings, zonalSpectrum } from "../../core/numeric/spectra/wavenumber";
import { welchSpectrum } from "../../core/numeric/welch";
import { expectAllClose } from "../expect-close";
import { referenceJson, withNaN } from "../reference-json";

interface Reference {
  readonly planes: {
    readonly rows: number;
    readonly columns: number;
    readonly plane: number[][];
    readonly rowWeights: number[];
    readonly columnStep: number;
    readonly rowStep: number;
    readonly timeStep: number;
    readonly zonalWavenumber: number[];
    readonly meridionalWavenumber: number[];
    readonly centredZonal: number[];
    readonly centredMeridional: number[];
    readonly frequency: number[];
    readonly spectra: {
      readonly taper: Taper;
      readonly zonal: number[];
      readonly meridional: number[];
      readonly plane: number[][];
      readonly frequencyWavenumber: number[][];
    }[];
  }[];
  readonly gappy: {
    readonly rows: number;
    readonly columns: number;
    readonly plane: (number | null)[][];
    readonly columnStep: number;
    readonly bridgedCells: number;
    readonly leastShare: number;
    readonly linesKept: number;
    readonly density: number[];
  };
  readonly welch: {
    readonly step: number;
    readonly series: number[];
    readonly spectra: { taper: Taper; segment: number; frequency: number[]; density: number[] }[];
  };
}

const reference = referenceJson<Reference>("wavenumber");
const close = { relative: 1e-9, because: "the bound asked of a spectrum; transforms round differently" };
const exact = { relative: 1e-14, because: "one division" };

describe("wavenumber spectra against numpy.fft", () => {
  const cases = reference.planes.flatMap((plane) =>
    plane.spectra.map((each) => [`${plane.rows} x ${plane.columns}`, JSON.stringify(each.taper), plane, each] as const),
  );

  test.each(cases)("%s, %s", (_, __, given, wanted) => {
    const { rows, columns } = given;
    const values = Float64Array.from(given.plane.flat());
    const settings: WavenumberSettings = { taper: wanted.taper, detrend: "linear", bridgedCells: 0, leastShare: 1 };
    const spacingMetres = new Float64Array(rows).fill(given.columnStep);
    const weights = Float64Array.from(given.rowWeights);
    const zonal = zonalSpectrum(values, { columns, spacingMetres, weights }, settings);
    expectAllClose(zonal.wavenumber, given.zonalWavenumber, exact, "zonal axis");
    expectAllClose(zonal.density, wanted.zonal, close, "zonal");
    const meridional = meridionalSpectrum(values, { rows, spacingMetres: given.rowStep }, settings);
    expectAllClose(meridional.wavenumber, given.meridionalWavenumber, exact, "meridional axis");
    expectAllClose(meridional.density, wanted.meridional, close, "meridional");

    const stepped = { values, rows, columns, rowStep: given.rowStep, columnStep: given.columnStep };
    const plane = planeSpectrum(stepped, settings);
    expectAllClose(plane.zonal, given.centredZonal, exact, "centred zonal axis");
    expectAllClose(plane.meridional, given.centredMeridional, exact, "centred meridional axis");
    expectAllClose(plane.density, wanted.plane.flat(), close, "plane");
    const moving = frequencyWavenumberSpectrum({ ...stepped, rowStep: given.timeStep }, settings);
    expectAllClose(moving.frequency, given.frequency, exact, "frequency axis");
    expectAllClose(moving.wavenumber, given.centredZonal, exact, "wavenumber axis");
    expectAllClose(moving.density, wanted.frequencyWavenumber.flat(), close, "frequency-wavenumber");
  });

  test("short gaps are bridged, rows without a long enough stretch are left out", () => {
    const { columns, plane, columnStep, bridgedCells, leastShare, linesKept, density } = reference.gappy;
    const spacingMetres = new Float64Array(plane.length).fill(columnStep);
    const settings: WavenumberSettings = { taper: { kind: "hann" }, detrend: "linear", bridgedCells, leastShare };
    const got = zonalSpectrum(withNaN(plane.flat()), { columns, spacingMetres }, settings);
    expect(got.lines).toBe(linesKept);
    expectAllClose(got.density, density, close);
  });
});

describe("period spectra against scipy", () => {
  test.each(reference.welch.spectra.map((each) => [JSON.stringify(each.taper), each.segment, each] as const))(
    "welch, %s, segments of %i",
    (_, segment, { taper, frequency, density }) => {
      const series = Float64Array.from(reference.welch.series);
      const settings = { segment, overlap: 0.5, detrend: "linear", taper } as const;
      const got = welchSpectrum(series, reference.welch.step, settings);
      expectAllClose(got.frequency, frequency, exact, "frequency");
      expectAllClose(got.density, density, close, "density");
    },
  );

  interface Filters {
    readonly stepDays: number;
    readonly input: number[];
    readonly periodograms: {
      readonly count: number;
      readonly window: "boxcar" | "hann";
      readonly detrend: "constant" | "linear";
      readonly frequencyPerDay: number[];
      readonly density: number[];
    }[];
    readonly lombScargle: {
      readonly timeDays: number[];
      readonly input: number[];
      readonly frequencyPerDay: number[];
      readonly power: number[];
      readonly normalised: number[];
    }[];
  }
  const filters = referenceJson<Filters>("filters");

  test.each(filters.periodograms.map((each) => [each.count, each.window, each.detrend, each] as const))(
    "periodogram of %i samples, %s, %s taken off",
    (count, kind, detrend, { frequencyPerDay, density }) => {
      const series = Float64Array.from(filters.input.slice(0, count));
      const settings = { segment: count, overlap: 0, detrend, taper: { kind } };
      const got = welchSpectrum(series, filters.stepDays, settings);
      expectAllClose(got.frequency, frequencyPerDay, exact, "frequency");
      expectAllClose(got.density, density, close, "density");
    },
  );

  test.each(filters.lombScargle.map((each) => [each.timeDays.length, each] as const))(
    "Lomb-Scargle of %i uneven samples, in units and as a share",
    (_, { timeDays, input, frequencyPerDay, power, normalised }) => {
      const { power: got, share } = lombScargle(
        Float64Array.from(timeDays),
        Float64Array.from(input),
        Float64Array.from(frequencyPerDay),
      );
      expectAllClose(got, power, close, "power");
      expectAllClose(share, normalised, close, "share");
    },
  );

  test("Lomb-Scargle on even sampling is the periodogram, and sums to the variance", () => {
    const series = Float64Array.from(filters.input.slice(0, 97));
    const mean = series.reduce((sum, value) => sum + value, 0) / 97;
    const anomaly = series.map((value) => value - mean);
    const times = anomaly.map((_, i) => i * filters.stepDays);
    const { power } = lombScargle(times, anomaly, oneSidedAxis(97, filters.stepDays).subarray(1));
    const variance = anomaly.reduce((sum, value) => sum + value * value, 0) / 97;
    const integral = (power.reduce((sum, value) => sum + value, 0) * 2) / 97;
    expectAllClose([integral], [variance], { relative: 1e-10, because: "float64 sums" });
  });
});
