import { bridgeGaps } from "../gaps";
import { oneSidedAxis, oneSidedDensity, type Scaling } from "./density";
import { type Detrend, detrended } from "./detrend";
import { addLine, averagedDensity, emptyLineAverage, type LineAverage } from "./line-average";
import { type Taper, taperFamily } from "./tapers";

export interface WavenumberSettings {
  readonly taper: Taper;
  /** Along each line; for a plane, the plane fitted to it. */
  readonly detrend: Detrend;
  /** Gaps up to this many cells are bridged by straight lines along the line. */
  readonly bridgedCells: number;
  /** Least share of a line (or plane) that must be whole after bridging; what has less is left out. */
  readonly leastShare: number;
  /** "power" where none is given. */
  readonly scaling?: Scaling;
}

/** One-sided spectrum along lines, averaged over them. */
export interface WavenumberSpectrum {
  /** Cycles a metre, from 0. */
  readonly wavenumber: Float64Array;
  /** Units² per cycle a metre; its sum times the wavenumber step is the weighted mean variance. NaN where no line entered. */
  readonly density: Float64Array;
  /** Up to here every line resolves the wavenumber; beyond, only the more closely spaced lines contribute. Cycles a metre. */
  readonly resolvedByAll: number;
  /** Lines that entered (over all planes averaged) and the sum of their weights. */
  readonly lines: number;
  readonly weight: number;
}

/** A row-major plane's rows: one spacing and one weight a row. Spacing in metres between neighbours along the row. */
export interface RowLines {
  readonly columns: number;
  readonly spacingMetres: Float64Array;
  /** Equal weights where none are given. */
  readonly weights?: Float64Array;
}

/**
 * Zonal wavenumber spectrum of a plane: along every row, averaged over rows with their weights. Of each row the longest
 * stretch without gaps is used (short ones bridged), detrended and tapered; its weight is the row's times the stretch's share
 * of the row. Rows of unequal spacing are laid onto the axis of the closest-spaced row with their variance kept, so that all
 * planes of a grid share one axis. NaN cells are missing.
 */
export function zonalSpectrum(plane: Float64Array, rows: RowLines, settings: WavenumberSettings): WavenumberSpectrum {
  const { columns, spacingMetres } = rows;
  const closest = spacingMetres.reduce((least, spacing) => Math.min(least, spacing), Number.POSITIVE_INFINITY);
  const widest = spacingMetres.reduce((most, spacing) => Math.max(most, spacing), 0);
  const average = emptyLineAverage(columns, closest);
  for (let row = 0; row < spacingMetres.length; row++) {
    const line = plane.subarray(row * columns, (row + 1) * columns);
    addStretch(average, line, spacingMetres[row], rows.weights?.[row] ?? 1, settings);
  }
  return spectrumOf(average, widest);
}

/** A row-major plane's columns: one spacing for all (metres between rows) and one weight a column. */
export interface ColumnLines {
  readonly rows: number;
  readonly spacingMetres: number;
  readonly weights?: Float64Array;
}

/**
 * Meridional wavenumber spectrum of a plane: along every column, averaged over columns; otherwise as the zonal one. The
 * spacing is taken as even (on the ellipsoid a degree of latitude varies by 1 % from equator to pole).
 */
export function meridionalSpectrum(
  plane: Float64Array,
  lines: ColumnLines,
  settings: WavenumberSettings,
): WavenumberSpectrum {
  const { rows, spacingMetres } = lines;
  const columns = plane.length / rows;
  const average = emptyLineAverage(rows, spacingMetres);
  for (let column = 0; column < columns; column++) {
    const line = Float64Array.from({ length: rows }, (_, row) => plane[row * columns + column]);
    addStretch(average, line, spacingMetres, lines.weights?.[column] ?? 1, settings);
  }
  return spectrumOf(average, spacingMetres);
}

/** Mean of the spectra of planes of one grid (dates), each weighing what its lines weigh times its own weight, if given. */
export function averageSpectra(spectra: readonly WavenumberSpectrum[], weights?: Float64Array): WavenumberSpectrum {
  const density = new Float64Array(spectra[0].density.length);
  let weight = 0;
  let lines = 0;
  spectra.forEach((spectrum, date) => {
    if (spectrum.lines === 0) return;
    const own = spectrum.weight * (weights?.[date] ?? 1);
    for (let k = 0; k < density.length; k++) density[k] += own * spectrum.density[k];
    weight += own;
    lines += spectrum.lines;
  });
  return { ...spectra[0], density: density.map((value) => value / weight), lines, weight };
}

/** The spectrum in cycles a kilometre and units² per cycle a kilometre. */
export function perKilometre(spectrum: WavenumberSpectrum): WavenumberSpectrum {
  return {
    ...spectrum,
    wavenumber: spectrum.wavenumber.map((value) => value * 1000),
    density: spectrum.density.map((value) => value / 1000),
    resolvedByAll: spectrum.resolvedByAll * 1000,
  };
}

function addStretch(
  into: LineAverage,
  line: Float64Array,
  spacing: number,
  weight: number,
  settings: WavenumberSettings,
): void {
  const { values } = bridgeGaps(line, settings.bridgedCells);
  const { from, to } = longestStretch(values);
  const share = (to - from) / line.length;
  if (to - from < 3 || share < settings.leastShare || !(weight > 0)) return;
  const piece = detrended(values.subarray(from, to), settings.detrend);
  const density = oneSidedDensity(piece, taperFamily(settings.taper, piece.length), spacing, settings.scaling);
  addLine(into, density, piece.length, spacing, weight * share);
}

function longestStretch(values: Float64Array): { from: number; to: number } {
  let best = { from: 0, to: 0 };
  let from = 0;
  for (let i = 0; i <= values.length; i++) {
    if (i < values.length && !Number.isNaN(values[i])) continue;
    if (i - from > best.to - best.from) best = { from, to: i };
    from = i + 1;
  }
  return best;
}

function spectrumOf(average: LineAverage, widestSpacing: number): WavenumberSpectrum {
  return {
    wavenumber: oneSidedAxis(average.length, average.spacing),
    density: averagedDensity(average),
    resolvedByAll: 1 / (2 * widestSpacing),
    lines: average.lines,
    weight: average.weight,
  };
}
