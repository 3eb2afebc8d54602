import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { ScalesResult } from "../../core/model/scales-result";
import { geometryOf } from "../../core/study/geometry";
import { deformationRadiusAt } from "../../core/study/scales/deformation";
import { energyPlane } from "../../core/study/scales/energy-plane";
import { flowSpeeds } from "../../core/study/scales/flow-speeds";
import { lengthsByLatitude, scaleLengths } from "../../core/study/scales/lengths";
import { gridSpacing } from "../../core/study/scales/map-spectra";
import { scaleNotes } from "../../core/study/scales/notes";
import { latitudePositions, longitudePositions } from "../../core/study/scales/positions";
import { waveSettingAt, waveSpeeds, withCurves, zonalPeak } from "../../core/study/scales/waves";
import { deformationChoice } from "./deformation-table";
import type { Job } from "./job";
import { fieldArguments, fieldStages, pictureSeries } from "./latitudes";
import { noBackground } from "./prepared";
import { flowPass, persistencePass } from "./scales-passes";
import { mapSpectraOf, noMapSpectra } from "./scales-spectra";
import type { Workspace } from "./workspace";

export interface ScalesRequest {
  readonly open: OpenStudy;
  readonly grid: string;
  /** Row for waves and drift; the middle one if left out. */
  readonly latitude?: number;
}

/** Days between "weeks" and "months", and the longest "months" of a study without a longest period. */
const weeksDays = 30;
const monthsDays = 540;

/**
 * What sets the flow's scales, for the study's grid. Errors: what loading, band and background say; Fault "request" for a
 * latitude outside the region; Fault "file" for a table of radii that cannot be read.
 */
export async function scalesResult(workspace: Workspace, request: ScalesRequest, job: Job): Promise<ScalesResult> {
  const { open, grid } = request;
  const { study } = open;
  const { pool } = workspace;
  const deformation = await deformationChoice(open);
  const inBand = study.band.filter !== "none";
  const stages = await fieldStages(workspace, open, grid, { quantity: "u", inBand }, job);
  const { record, reduction } = stages;
  const { dates, rows } = record.cube;
  const geometry = geometryOf(record.axes, study.geostrophy);
  const latitude = record.axes.latitude.values;
  const row = rowAt(latitude, request.latitude);
  const { basis } = await workspace.background(open, grid, job);

  const plain = { ...fieldArguments(stages, study, false), background: noBackground };
  const flow = await flowPass(pool, plain, row, reduction.sampleCells, job);
  const spacing = gridSpacing(record.axes, geometry);
  const field = { ...fieldArguments(stages, study, inBand), quantity: "u" };
  const banded = inBand ? field : null;
  const ends = stages.filter?.ends(record.hasData) ?? new Uint8Array(dates);
  const maps = spacing ? await mapSpectraOf(pool, plain, banded, ends, flow.moments, spacing, job) : noMapSpectra;
  const every = Int32Array.from({ length: dates }, (_, date) => date);
  const picture = await pictureSeries(pool, stages, field, every, job);
  const persistence = await persistencePass(pool, field, picture, job);

  const days = record.time.values;
  const longitudes = longitudePositions(record.axes.longitude.values, geometry.east[row]);
  const series = {
    u: reduction.samples,
    v: flow.samples,
    cellWeights: Float64Array.from(reduction.sampleCells, (cell) => geometry.east[Math.floor(cell / geometry.columns)]),
    days,
    stepDays: record.time.step,
    even: record.time.even && dates > 1,
    basis,
    weeksDays,
    monthsDays: Math.max(2 * weeksDays, (inBand ? study.band.longestDays : null) ?? monthsDays),
  };
  const { geostrophy } = study;
  const even = series.even && record.axes.longitude.even;
  const [fromSeries, along, acrossLatitudes, forcing] = await job.step("Following waves, drift and forcing", 4, () =>
    Promise.all([
      pool.run("scaleSeries", series, job),
      pool.run("scaleAlong", { quantity: "v", values: flow.alongRow, ...longitudes, days, basis, even }, job),
      pool.run(
        "scaleDrift",
        { quantity: "u", values: picture, ...latitudePositions(latitude, geometry.north), days },
        job,
      ),
      pool.run("scaleForcing", { flow: reduction.zonal, flux: flow.flux, days, latitude, geostrophy }, job),
    ]),
  );

  const speeds = flowSpeeds(flow.moments, geometry.east);
  const radii = latitude.map((value) => deformationRadiusAt(deformation, value, geostrophy));
  const byLatitude = lengthsByLatitude(speeds, geometry.beta, radii);
  const middle = rows >> 1;
  const lengths = scaleLengths({
    profile: forcing.meanFlow,
    bandPicture: inBand ? picture : null,
    latitude,
    speeds,
    beta: geometry.beta[middle],
    radius: radii[middle],
    deformation,
    peak: maps.peak,
    meanPeak: maps.meanPeak,
    gridWavelength: 2 * (spacing?.north ?? Number.NaN),
    study,
  });
  const setting = waveSettingAt(row, geometry.beta[row], radii[row], forcing.meanFlow, forcing.gradient);
  const boundarySpeed = study.scales.rhinesSpeed === "total" ? speeds.total : speeds.eddy;
  const waves = waveSpeeds(setting, zonalPeak(along.spectrum), lengths.peakWavelength.value);
  const result = {
    latitude,
    middleLatitude: latitude[middle],
    alongLatitude: latitude[row],
    period: fromSeries.period,
    zonal: maps.zonal,
    meridional: maps.meridional,
    mapDates: maps.dates,
    plane:
      spacing && maps.energy && boundarySpeed > 0
        ? energyPlane(maps.energy, spacing, boundarySpeed, geometry.beta[middle])
        : null,
    frequencyWavenumber: withCurves(along.spectrum, setting, lengths.peakWavelength.value),
    lengths,
    byLatitude,
    zonality: fromSeries.zonality,
    energy: fromSeries.energy,
    drift: { alongLatitude: along.drift, acrossLatitudes },
    waves,
    forcing,
    persistence,
  };
  return { ...result, notes: scaleNotes(result) };
}

/** Row nearest to a latitude, the middle one where none is asked for. */
function rowAt(latitude: Float64Array, wanted: number | undefined): number {
  if (wanted === undefined) return latitude.length >> 1;
  let best = 0;
  for (let row = 1; row < latitude.length; row++) {
    if (Math.abs(latitude[row] - wanted) < Math.abs(latitude[best] - wanted)) best = row;
  }
  const [south, north] = [latitude[0], latitude[latitude.length - 1]];
  const step = (north - south) / (latitude.length - 1);
  if (Math.abs(latitude[best] - wanted) <= step) return best;
  throw new Fault({
    tag: "request",
    where: "latitude",
    expected: `a latitude from ${south} to ${north}`,
    got: String(wanted),
    advice: "choose a latitude of the region",
  });
}
