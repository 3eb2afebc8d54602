import type { GridAxes } from "../../model/axis";
import { Fault } from "../../model/errors";
import { coriolisParameter, type EarthSettings, planetaryVorticityGradient } from "../../ocean/earth";
import { type DriftSurvey, type HeightAnomalies, surveyDrift } from "./drift";
import { envelopeFoldingShare, envelopeMeanSquare } from "./eddy-life";
import { defaultEddySearch, type EddySearch, findEddies, type SeenEddy } from "./find-eddies";
import { type LatitudeTable, sameEverywhere } from "./latitude-table";
import { type LocalGrid, localGrid } from "./local-grid";
import { checkPopulation, defaultRampShare, type EddyPopulation } from "./population";
import { quantileAt, quantilesOf } from "./quantile-table";

export interface EstimateSettings {
  readonly search: EddySearch;
  /** Dates looked at for eddies, and pairs of dates for their drift, evenly over the record. */
  readonly mostDates: number;
  /** Internal wave speed for the long Rossby speed, taken where no drift can be followed, m s-1. */
  readonly waveSpeedMetresPerSecond: number;
}

/** 40 dates; 2.7 m/s, a middling first internal mode [from memory, Chelton et al. 1998, J. Phys. Oceanogr. 28, 433-460]. */
export const defaultEstimate: EstimateSettings = {
  search: defaultEddySearch,
  mostDates: 40,
  waveSpeedMetresPerSecond: 2.7,
};

/**
 * The population of eddies that a record shows, its maps' smoothing included: sizes and number from single maps
 * (`findEddies`), drift and lasting from lagged correlation (`surveyDrift`). Amplitudes seen are raised to
 * full height by the rms of the life's envelope; energy is left to `matchEnergy`. Errors: Fault (tag "region") where no eddy is found, or none lasts a step.
 */
export function estimatePopulation(
  heights: HeightAnomalies,
  axes: GridAxes,
  earth: EarthSettings,
  settings: EstimateSettings = defaultEstimate,
  poll: () => void = () => undefined,
): EddyPopulation {
  const grid = localGrid(axes, earth);
  const { eddies, dates, density } = census(heights, grid, settings, poll);
  const drift = surveyDrift(heights, grid, lagsFor(heights), datesOf(heights, settings.mostDates), poll);
  const life = lifetime(drift);
  const speed = speeds(drift, earth, settings.waveSpeedMetresPerSecond);
  // Seen at random moments of life: their mean square is the full height's times that of the envelope.
  const growing = Math.sqrt(envelopeMeanSquare(defaultRampShare));
  const amplitudes = eddies.map(({ amplitudeMetres }) => Math.abs(amplitudeMetres) / growing);
  const radii = eddies.map(({ radiusMetres }) => radiusMetres);
  const least = settings.search.leastAmplitudeMetres;
  const seen = `${eddies.length} eddies on ${dates} maps`;
  const population: EddyPopulation = {
    amplitudeMetres: quantilesOf(amplitudes),
    radiusMetres: quantilesOf(radii),
    densityPerMillionKm2: density,
    shareHigh: eddies.filter(({ amplitudeMetres }) => amplitudeMetres > 0).length / eddies.length,
    lifetimeDays: life.days,
    rampShare: defaultRampShare,
    speedMetresPerSecond: speed.table,
    amplitudeFactor: sameEverywhere(1),
    notes: {
      amplitude: `Gaussian hills fitted to ${seen} that stand out by ${tidy(100 * least)} cm or more, growth and decay made good; median ${tidy(100 * median(amplitudes))} cm`,
      radius: `from the same fits; median ${tidy(median(radii) / 1000)} km`,
      density: `${seen}, over the sea searched`,
      lifetime: life.note,
      speed: speed.note,
      energy: "not matched: amplitudes and number as counted",
    },
  };
  checkPopulation(population);
  return population;
}

function census(heights: HeightAnomalies, grid: LocalGrid, { search, mostDates }: EstimateSettings, poll: () => void) {
  const eddies: SeenEddy[] = [];
  let searchedKm2 = 0;
  const chosen = datesOf(heights, mostDates);
  for (const date of chosen) {
    poll();
    const found = findEddies(heights.plane(date), grid, search);
    eddies.push(...found.eddies);
    searchedKm2 += found.searchedKm2;
  }
  if (eddies.length === 0) {
    throw new Fault({
      tag: "region",
      where: "eddyTest, the eddies of the data",
      expected: `hills or hollows of ${tidy(100 * search.leastAmplitudeMetres)} cm or more on at least one map`,
      got: `none on ${chosen.length} maps`,
      advice: "choose a larger region or a lower least amplitude, or set the eddies by hand",
    });
  }
  return { eddies, dates: chosen.length, density: eddies.length / (searchedKm2 / 1e6) };
}

/** At most `most` dates with data, evenly over them. */
function datesOf({ dates, hasData }: HeightAnomalies, most: number): number[] {
  const known = Array.from({ length: dates }, (_, date) => date).filter((date) => hasData[date]);
  const count = Math.min(most, known.length);
  return Array.from({ length: count }, (_, i) => known[Math.floor(((i + 0.5) * known.length) / count)]);
}

/** Some 16 lags, denser at first, to a third of the record and at most a year. */
function lagsFor({ dates, stepDays }: HeightAnomalies): number[] {
  const longest = Math.max(1, Math.floor(Math.min(dates / 3, 365 / stepDays)));
  const lags = Array.from({ length: 16 }, (_, i) => Math.max(1, Math.round(longest ** ((i + 1) / 16))));
  return [...new Set(lags)];
}

/** Life from the lag at which the pattern, moving with its drift, resembles itself by 1/e; belts counted alike. */
function lifetime({ lagDays, belts }: DriftSurvey): { days: number; note: string } {
  const share = envelopeFoldingShare(defaultRampShare);
  let before = { days: 0, correlation: 1 };
  for (let i = 0; i < lagDays.length; i++) {
    const known = belts.map(({ correlation }) => correlation[i]).filter((value) => !Number.isNaN(value));
    if (known.length === 0) continue;
    const here = { days: lagDays[i], correlation: known.reduce((sum, value) => sum + value, 0) / known.length };
    if (here.correlation <= 1 / Math.E) {
      const part = (before.correlation - 1 / Math.E) / (before.correlation - here.correlation);
      const folding = before.days + part * (here.days - before.days);
      return { days: folding / share, note: `the moving pattern resembles itself by 1/e after ${tidy(folding)} days` };
    }
    before = here;
  }
  if (before.days === 0) {
    throw new Fault({
      tag: "period",
      where: "eddyTest, lifetime of the eddies",
      expected: "two maps with data one lag apart",
      got: "none",
      advice: "choose a longer period, or set the lifetime by hand",
    });
  }
  const folding = -before.days / Math.log(Math.min(0.99, before.correlation));
  const note = `the moving pattern still resembles itself by ${before.correlation.toFixed(2)} after ${tidy(before.days)} days; carried on as an exponential`;
  return { days: folding / share, note };
}

function speeds(
  { belts }: DriftSurvey,
  earth: EarthSettings,
  waveSpeed: number,
): { table: LatitudeTable; note: string } {
  let fallbacks = 0;
  const values = belts.map(({ latitudeDegrees, speedMetresPerSecond }) => {
    if (Number.isFinite(speedMetresPerSecond)) return speedMetresPerSecond;
    fallbacks++;
    return longRossbySpeed(latitudeDegrees, earth, waveSpeed);
  });
  const table = { latitudesDegrees: belts.map(({ latitudeDegrees }) => latitudeDegrees), values };
  const followed = "drift of height anomalies by lagged correlation along longitude, by latitude";
  const rest = `the long Rossby speed in ${fallbacks} of ${belts.length} belts, where none could be followed`;
  return { table, note: fallbacks === 0 ? followed : `${followed}; ${rest}` };
}

/**
 * Speed of long Rossby waves, -beta (c / f)², in m s-1, not beyond 0.3 near the equator where the formula runs away.
 */
export function longRossbySpeed(
  latitudeDegrees: number,
  earth: EarthSettings,
  waveSpeedMetresPerSecond: number,
): number {
  const radius = waveSpeedMetresPerSecond / coriolisParameter(latitudeDegrees, earth.omega);
  return Math.max(-0.3, -planetaryVorticityGradient(latitudeDegrees, earth) * radius * radius);
}

function median(values: readonly number[]): number {
  return quantileAt(Float64Array.from(values).sort(), 0.5);
}

function tidy(value: number): string {
  return String(Number(value.toPrecision(3)));
}
