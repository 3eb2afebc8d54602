import {
  type FrequencyWavenumberSpectrum,
  frequencyWavenumberSpectrum,
} from "../../numeric/spectra/frequency-wavenumber";
import { blockMeans } from "./block-means";
import type { PositionTime } from "./drift-picture";
import { mapSpectrumSettings } from "./map-spectra";

/** Most dates transformed, and most frequencies and wavenumbers a side handed on. */
const mostDates = 1000;
const mostFrequencies = 300;
const mostEachSide = 120;

/**
 * Frequency-wavenumber spectrum of a longitude-time picture, each longitude's mean off; frequencies in cycles a day. null
 * where under half of the picture has values or it has under eight dates or longitudes. Gaps of two samples are bridged.
 */
export function waveSpectrum({ values, degrees, metres, days }: PositionTime): FrequencyWavenumberSpectrum | null {
  const columns = degrees.length;
  const blocks = blockMeans(values, columns, days, mostDates);
  const rows = blocks.days.length;
  if (rows < 8 || columns < 8) return null;
  const matrix = new Float64Array(rows * columns);
  for (let position = 0; position < columns; position++) {
    const own = blocks.values.subarray(position * rows, (position + 1) * rows);
    let [sum, count] = [0, 0];
    for (const value of own) {
      if (Number.isNaN(value)) continue;
      sum += value;
      count++;
    }
    for (let date = 0; date < rows; date++) matrix[date * columns + position] = own[date] - sum / count;
  }
  const rowStep = (blocks.days[rows - 1] - blocks.days[0]) / (rows - 1);
  const columnStep = (metres[columns - 1] - metres[0]) / (columns - 1);
  const whole = frequencyWavenumberSpectrum(
    { values: matrix, rows, columns, rowStep, columnStep },
    mapSpectrumSettings,
  );
  return whole.density.some(Number.isNaN) ? null : shown(whole, columns);
}

function shown(whole: FrequencyWavenumberSpectrum, columns: number): FrequencyWavenumberSpectrum {
  const zero = Math.floor(columns / 2);
  const from = Math.max(0, zero - mostEachSide);
  const to = Math.min(columns, zero + mostEachSide + 1);
  const frequencies = Math.min(mostFrequencies, whole.frequency.length);
  const density = new Float64Array(frequencies * (to - from));
  for (let f = 0; f < frequencies; f++) {
    density.set(whole.density.subarray(f * columns + from, f * columns + to), f * (to - from));
  }
  return {
    frequency: whole.frequency.slice(0, frequencies),
    wavenumber: whole.wavenumber.slice(from, to),
    density,
    share: whole.share,
  };
}
