import type { Axis, TimeAxis } from "../../core/model/axis";
import { evenTolerance } from "../../core/model/axis";
import { Fault } from "../../core/model/errors";
import type { GridFileReport } from "../../core/model/source";
import { textAttribute } from "./attributes";
import { fileFault } from "./faults";
import type { GridFileContents, GridFilePlan, ReadChoices } from "./grid-file";
import { readGridFile, storedAs } from "./grid-file";
import { openContainer } from "./index";
import { joinTimes } from "./join-times";
import type { Recognised } from "./recognise";
import { recognise } from "./recognise";

/** Many files joined in time, as one grid. Plain data: crosses thread borders; holds no open file. */
export interface GridIndex {
  readonly id: string;
  readonly height: GridFileReport["height"];
  /** Ascending, whatever the files' order; so are all planes read through the index. */
  readonly latitude: Axis;
  readonly longitude: Axis;
  /** With a regular step: missing dates are present. */
  readonly time: TimeAxis;
  readonly timeDeviationDays: number;
  /** For each date the file and the index in it; -1 where no file has the date. */
  readonly fileOf: Int32Array;
  readonly localOf: Int32Array;
  readonly files: readonly GridFilePlan[];
  readonly bytes: number;
  readonly notes: readonly string[];
}

export interface IndexOptions extends ReadChoices {
  /** Name of the height variable, or "auto". */
  readonly height: string;
  readonly id: string;
  /** Called before each file; may throw to stop. */
  readonly onFile?: (done: number, total: number) => void;
}

/** Coordinates of two files closer than this are the same. */
const jitterDegrees = 1e-6;

/**
 * Scans the headers of `paths` once and joins them in time. The first file decides the grid, the height's name and what it
 * is measured from; each file keeps its own packing and units. Throws a Fault (tag "file") that names both files where grids,
 * calendars or heights differ.
 */
export async function indexGrid(paths: readonly string[], options: IndexOptions): Promise<GridIndex> {
  if (paths.length === 0) {
    const advice = 'correct "files" in the study';
    throw new Fault({ tag: "study", where: `grids.${options.id}`, expected: "at least one file", got: "none", advice });
  }
  const contents: GridFileContents[] = [];
  const notes = new Set<string>();
  let height: GridIndex["height"] | null = null;
  for (const [i, path] of paths.entries()) {
    options.onFile?.(i, paths.length);
    const container = await openContainer(path);
    try {
      const found = recognise(container, options.height);
      if (found.kind === "track") throw notAGrid(path, found);
      const file = readGridFile(container, found, options);
      height ??= heightOf(found, file);
      if (i > 0) checkJoins(contents[0], file, height, found);
      contents.push(i === 0 ? file : { ...file, latitude: contents[0].latitude, longitude: contents[0].longitude });
      for (const note of file.notes) notes.add(note);
    } finally {
      container.close();
    }
  }
  const [first] = contents;
  const times = joinTimes(
    contents.map(({ plan, days }) => ({ path: plan.path, days })),
    first.calendar,
  );
  const packings = new Set(contents.map(({ plan }) => storedAs(plan.packing)));
  if (packings.size > 1) notes.add(`the files are packed in ${packings.size} ways; each is unpacked by its own`);
  return {
    id: options.id,
    height: height as GridIndex["height"],
    latitude: first.latitude,
    longitude: first.longitude,
    time: times.axis,
    timeDeviationDays: times.deviationDays,
    fileOf: times.fileOf,
    localOf: times.localOf,
    files: contents.map(({ plan }) => plan),
    bytes: contents.reduce((sum, { plan }) => sum + plan.bytes, 0),
    notes: [...notes, ...times.notes],
  };
}

function heightOf({ height, foundBy, reference }: Recognised, { plan }: GridFileContents): GridIndex["height"] {
  const text = (name: string) => textAttribute(height.attributes, name);
  return {
    name: height.name,
    standardName: text("standard_name"),
    longName: text("long_name"),
    fileUnits: text("units"),
    foundBy,
    reference,
    storedAs: storedAs(plan.packing),
  };
}

function checkJoins(
  first: GridFileContents,
  file: GridFileContents,
  height: GridIndex["height"],
  found: Recognised,
): void {
  const { path } = file.plan;
  const other = first.plan.path;
  if (found.reference !== height.reference) {
    const expected = `a height above ${height.reference} as ${height.name} in ${other}`;
    const got = `${found.height.name} above ${found.reference}`;
    throw fileFault(path, expected, got, 'name one height for all files as "height" in the study');
  }
  if (file.calendar !== first.calendar) {
    const got = `the ${file.calendar} calendar`;
    throw fileFault(path, `the ${first.calendar} calendar of ${other}`, got, "give these files to two grids");
  }
  checkSameAxis(first.latitude, file.latitude, other, path);
  checkSameAxis(first.longitude, file.longitude, other, path);
}

function checkSameAxis(first: Axis, axis: Axis, firstPath: string, path: string): void {
  const advice = "bring the files to one grid, or give them to two grids";
  const { kind } = axis;
  if (axis.values.length !== first.values.length) {
    const expected = `${first.values.length} ${kind}s as in ${firstPath}`;
    throw fileFault(path, expected, `${axis.values.length}`, advice);
  }
  // One file may store as float32 what the other stores as float64.
  const tolerance = Math.max(jitterDegrees, evenTolerance(first.values), evenTolerance(axis.values));
  const turns = kind === "longitude" ? Math.round((axis.values[0] - first.values[0]) / 360) * 360 : 0;
  const different = axis.values.findIndex((value, i) => Math.abs(value - turns - first.values[i]) > tolerance);
  if (different < 0) return;
  const expected = `${kind} ${first.values[different]} at index ${different} as in ${firstPath}`;
  throw fileFault(path, expected, `${axis.values[different]}`, advice);
}

function notAGrid(path: string, { height }: Recognised): Fault {
  const got = `along-track points of ${height.name}`;
  return fileFault(path, "gridded maps", got, 'list along-track files under "tracks" in the study');
}
