import { formatDay } from "../../../core/model/calendar";
import { bridgedDates, crossingDays } from "../../../core/study/band";
import { cautionsFor } from "../../../core/study/cautions";
import { daysLost } from "../latitudes";
import type { Moments } from "../tasks/moments";
import { type Analysis, mappedQuantities } from "./analysis";
import type { InputFile } from "./fingerprint";
import { jetsSummary } from "./jets-summary";
import { scalesSummary } from "./scales-summary";
import { version } from "./version";

export interface Quantified {
  readonly value: number | null;
  readonly unit: string;
}

/** summary.json as data: headline numbers with units, the full study, versions, inputs, cautions. */
export function summaryOf(analysis: Analysis, inputs: readonly InputFile[], files: readonly string[]): object {
  const { open, stages, loaded } = analysis;
  const { record } = stages;
  const { time, cube, hasData } = record;
  const { latitude, longitude } = record.axes;
  return {
    strake: version,
    title: open.study.title,
    study: open.study,
    inputs,
    grid: {
      id: analysis.grid,
      height: loaded.index.height,
      notes: loaded.index.notes,
      masked: { ...loaded.masked, unit: "cells over all dates" },
    },
    record: {
      from: formatDay(time.calendar, time.values[0]),
      to: formatDay(time.calendar, time.values[cube.dates - 1]),
      calendar: time.calendar,
      dates: cube.dates,
      datesWithData: hasData.reduce((sum, flag) => sum + flag, 0),
      step: number(time.step, "days"),
      largestTimeDeviation: number(loaded.index.timeDeviationDays, "days"),
      south: number(latitude.values[0], "degrees_north"),
      north: number(latitude.values[cube.rows - 1], "degrees_north"),
      west: number(longitude.values[0], "degrees_east"),
      east: number(longitude.values[cube.columns - 1], "degrees_east"),
      rows: cube.rows,
      columns: cube.columns,
      oceanCells: record.ocean.reduce((sum, flag) => sum + flag, 0),
    },
    headline: headlineOf(analysis),
    filter: filterOf(analysis),
    jets: jetsSummary(analysis.jets),
    scales: scalesSummary(analysis.scales),
    errors: errorsOf(analysis),
    suppliedVelocity: suppliedOf(analysis),
    cautions: cautionsFor(open.study, record),
    files,
  };
}

function headlineOf(analysis: Analysis): Record<string, Quantified> {
  const { asItStands, band, moments, stages } = analysis;
  const { latitude } = stages.record.axes;
  const { mean, half95 } = asItStands.profile;
  const fastest = indexOfMost(mean, (value) => value);
  const slowest = indexOfMost(mean, (value) => -value);
  const rms: Record<string, Quantified> = {};
  mappedQuantities.forEach(({ variable, units }, q) => {
    rms[`${variable}RootMeanSquare`] = number(areaRms(moments, q, analysis), units);
    if (band) rms[`${variable}BandRootMeanSquare`] = number(areaRms(band.moments, q, analysis), units);
  });
  return {
    ...rms,
    fastestEastwardMean: number(mean[fastest], "m s-1"),
    fastestEastwardMeanHalf95: number(half95[fastest], "m s-1"),
    fastestEastwardMeanLatitude: number(latitude.values[fastest], "degrees_north"),
    fastestWestwardMean: number(mean[slowest], "m s-1"),
    fastestWestwardMeanHalf95: number(half95[slowest], "m s-1"),
    fastestWestwardMeanLatitude: number(latitude.values[slowest], "degrees_north"),
  };
}

/** Root mean square over cells and dates, each cell with its area's weight. */
function areaRms({ squares, count }: Moments, q: number, { stages }: Analysis): number {
  const { rows, columns } = stages.record.cube;
  const { values } = stages.record.axes.latitude;
  let sum = 0;
  let weight = 0;
  for (let row = 0; row < rows; row++) {
    const area = Math.cos((values[row] * Math.PI) / 180);
    for (let cell = row * columns; cell < (row + 1) * columns; cell++) {
      if (count[q][cell] === 0) continue;
      sum += area * squares[q][cell];
      weight += area * count[q][cell];
    }
  }
  return Math.sqrt(sum / weight);
}

function filterOf({ stages, open }: Analysis): object | null {
  const { filter, record } = stages;
  if (!filter) return null;
  const { time, cube, hasData } = record;
  const days = (level: number) => crossingDays(filter, level, time).map((period) => number(period, "days"));
  return {
    reachEachSide: number(filter.reach * time.step, "days"),
    padding: number(filter.padding, "dates at each end"),
    halfAmplitudePeriods: days(0.5),
    halfPowerPeriods: days(Math.SQRT1_2),
    lostAtEachEnd: number(daysLost(filter, cube.dates, time.step), "days"),
    markedDates: countOnes(filter.ends(hasData)),
    bridgedDates: countOnes(bridgedDates(open.study.band, record)),
  };
}

/** Area means of the standard errors that the height's error leads to. */
function errorsOf({ errors, stages, open }: Analysis): object | null {
  if (!errors) return null;
  const { rows, columns } = stages.record.cube;
  const { values } = stages.record.axes.latitude;
  const typical = (plane: Float64Array) => {
    let [squares, weight] = [0, 0];
    for (let cell = 0; cell < rows * columns; cell++) {
      if (Number.isNaN(plane[cell])) continue;
      const area = Math.cos((values[Math.floor(cell / columns)] * Math.PI) / 180);
      squares += area * plane[cell] * plane[cell];
      weight += area;
    }
    return Math.sqrt(squares / weight);
  };
  return {
    height: number(typical(errors.height), "m"),
    u: number(typical(errors.u), "m s-1"),
    v: number(typical(errors.v), "m s-1"),
    vorticity: number(typical(errors.vorticity), "s-1"),
    correlation: number(open.study.errors.correlationKm, "km"),
  };
}

/** The supplied velocity's agreement with ours; the best of the offered conventions and the study's own first. */
function suppliedOf({ supplied }: Analysis): object | null {
  if (!supplied) return null;
  const { agreement, conventions, ...named } = supplied;
  return {
    ...named,
    unit: "m s-1",
    agreement,
    bestConvention: conventions[0] ?? null,
    conventions: conventions.slice(0, 6),
  };
}

function countOnes(flags: Uint8Array): number {
  return flags.reduce((sum, flag) => sum + flag, 0);
}

function number(value: number, unit: string): Quantified {
  return { value: Number.isFinite(value) ? value : null, unit };
}

function indexOfMost(values: Float64Array, score: (value: number) => number): number {
  let best = -1;
  values.forEach((value, i) => {
    if (!Number.isNaN(value) && (best < 0 || score(value) > score(values[best]))) best = i;
  });
  return best;
}
