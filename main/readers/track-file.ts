import { Fault } from "../../core/model/errors";
import type { TrackFileReport } from "../../core/model/source";
import { textAttribute } from "./attributes";
import { readCoordinate, readTimes } from "./axes";
import type { Container, VariableInfo } from "./container";
import { baseName, readAll } from "./container";
import { fileFault } from "./faults";
import type { ReadChoices } from "./grid-file";
import { noMasked, readPacking, unpack } from "./packing";
import type { Recognised } from "./recognise";
import { metresPerUnit } from "./units";

/** Without pass numbers, a new pass begins after a gap of ten minutes: less than between two orbits, more than over land. */
const passGapDays = 10 / 1440;

/** A track of more points than this is a damaged header. */
const mostPoints = 100_000_000;

/**
 * What was recognised in an along-track file. Points whose latitude, longitude or time is missing or impossible are left out
 * and counted in `notes`; so are missing heights, whose points stay. Passes are counted by pass or track number (with the
 * cycle where there is one), else by gaps of ten minutes. Throws a Fault (tag "file") where no point is left.
 */
export function describeTrackFile(
  container: Container,
  recognised: Recognised,
  choices: ReadChoices = {},
): TrackFileReport {
  const { height, latitude, longitude, time } = recognised;
  const where = `${container.path}: ${height.name}`;
  refuseManyPoints(height, where);
  const units = textAttribute(height.attributes, "units");
  if (units !== "" && metresPerUnit(units) === null) {
    throw fileFault(
      where,
      "a height in metres, centimetres or millimetres",
      `units "${units}"`,
      "choose another variable",
    );
  }
  const latitudes = readCoordinate(container, latitude);
  const longitudes = readCoordinate(container, longitude);
  const { days, calendar } = readTimes(container, time, choices.months);
  const kept: number[] = [];
  for (let i = 0; i < days.length; i++) {
    const isPlace = Math.abs(latitudes[i]) <= 90 && Math.abs(longitudes[i]) <= 720;
    if (isPlace && Number.isFinite(days[i])) kept.push(i);
  }
  const notes = [...recognised.notes];
  const excluded = days.length - kept.length;
  if (excluded > 0) notes.push(`${excluded} of ${days.length} points have no position or time and are left out`);
  if (kept.length === 0)
    throw fileFault(where, "at least one point with position and time", "none", "choose another file");
  const missing = countMissing(container, height, where, choices, notes);
  if (missing > 0) notes.push(`${missing} of ${days.length} heights are missing`);
  const ordered = kept.map((i) => days[i]).sort((a, b) => a - b);
  const [passes, passNote] = countPasses(container, recognised, kept, ordered);
  notes.push(passNote);
  return {
    kind: "track",
    path: container.path,
    format: container.format,
    title: textAttribute(container.attributes, "title"),
    height: { name: height.name, standardName: textAttribute(height.attributes, "standard_name"), fileUnits: units },
    points: kept.length,
    passes,
    firstDay: ordered[0],
    lastDay: ordered[ordered.length - 1],
    calendar,
    box: boxOf(kept, latitudes, longitudes),
    bytes: container.bytes,
    notes,
  };
}

function countMissing(
  container: Container,
  height: VariableInfo,
  where: string,
  choices: ReadChoices,
  notes: string[],
): number {
  const packing = readPacking(height, where, choices);
  const raw = readAll(container, height);
  const counts = noMasked();
  unpack(raw, packing, 1, counts, new Float64Array(raw.length));
  notes.push(...packing.notes.map((note) => `${height.name}: ${note}`));
  return counts.fill + counts.validRange + counts.notFinite;
}

function countPasses(
  container: Container,
  { height }: Recognised,
  kept: readonly number[],
  ordered: readonly number[],
): [passes: number, note: string] {
  const numbers = (names: RegExp) => {
    const found = container.variables.find(
      ({ name, dimensions, shape, type }) =>
        names.test(baseName(name)) &&
        type !== "string" &&
        shape.length === 1 &&
        dimensions[0] === height.dimensions.at(-1),
    );
    return found && { name: found.name, values: readAll(container, found) };
  };
  const pass = numbers(/^(pass|track)(_?number)?$/i);
  if (!pass) {
    const gaps = ordered.filter((day, i) => i > 0 && day - ordered[i - 1] > passGapDays).length;
    return [gaps + 1, "passes are counted by gaps of ten minutes: the file has no pass number"];
  }
  const cycle = numbers(/^cycle(_?number)?$/i);
  const distinct = new Set(kept.map((i) => `${cycle?.values[i] ?? ""}/${pass.values[i]}`));
  return [distinct.size, `passes are counted by ${cycle ? `${cycle.name} and ` : ""}${pass.name}`];
}

/** The smallest box round the points; longitudes run eastward from `west`, which lies within -180 to 180. */
function boxOf(kept: readonly number[], latitudes: Float64Array, longitudes: Float64Array): TrackFileReport["box"] {
  let [south, north] = [90, -90];
  for (const i of kept) {
    south = Math.min(south, latitudes[i]);
    north = Math.max(north, latitudes[i]);
  }
  const around = Float64Array.from(kept, (i) => ((longitudes[i] % 360) + 360) % 360).sort();
  let west = around[0];
  let widest = around[0] + 360 - around[around.length - 1];
  for (let i = 1; i < around.length; i++) {
    if (around[i] - around[i - 1] <= widest) continue;
    widest = around[i] - around[i - 1];
    west = around[i];
  }
  // Points all round the earth leave no gap wider than the distance between passes: there is no edge to name.
  if (widest < 10) return { west: -180, east: 180, south, north };
  const westward = west >= 180 ? west - 360 : west;
  return { west: westward, east: westward + 360 - widest, south, north };
}

function refuseManyPoints({ shape }: VariableInfo, where: string): void {
  const points = shape.reduce((product, length) => product * length, 1);
  if (points <= mostPoints) return;
  const advice = "check the sizes in the file's header, or split the file";
  throw new Fault({ tag: "memory", where, expected: `at most ${mostPoints} points`, got: `${points}`, advice });
}
