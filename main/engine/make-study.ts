import { dirname } from "node:path";
import type { OpenStudy } from "../../core/contract/engine";
import { Fault } from "../../core/model/errors";
import type { FileReport, GridFileReport } from "../../core/model/source";
import { readStudy } from "../../core/study/read";

/** Days of record from which an annual cycle can be told from a slow change. */
const annualFromDays = 730;

/**
 * A study around data files: grids of equal cells and steps joined under one id, all region, all period, and a band and
 * background that the record can carry. Error: no grid among the files.
 */
export function studyAround(reports: readonly FileReport[]): OpenStudy {
  const grids = new Map<string, GridFileReport[]>();
  for (const report of reports) {
    if (report.kind !== "grid") continue;
    const key = JSON.stringify([shape(report), report.height.name, report.height.reference]);
    grids.set(key, [...(grids.get(key) ?? []), report]);
  }
  const tracks = reports.filter((report) => report.kind === "track");
  if (grids.size === 0) {
    throw new Fault({
      tag: "file",
      where: reports[0]?.path ?? "files",
      expected: "at least one file of gridded heights",
      got: tracks.length > 0 ? "along-track passes only" : "none",
      advice: "name a grid as well; tracks are compared with a grid",
    });
  }
  const groups = [...grids.values()];
  const study = readStudy(
    {
      strake: 1,
      title: groups[0][0].title.slice(0, 200),
      grids: groups.map((group, i) => ({
        id: identifier(i),
        label: group[0].title.slice(0, 120),
        files: group.map((report) => report.path),
        height: group[0].height.name,
      })),
      tracks: tracks.length > 0 ? [{ id: "T", files: tracks.map((report) => report.path) }] : [],
      ...carriedBy(groups[0]),
    },
    "new study",
  );
  return { study, folder: dirname(groups[0][0].path), path: "" };
}

function shape({ latitude, longitude }: GridFileReport): number[] {
  const corner = (values: Float64Array) =>
    [values.length, values[0], values[values.length - 1]].map((v) => Number(v.toFixed(4)));
  return [...corner(latitude.values), ...corner(longitude.values)];
}

/** Band and background for the length and sampling of a record. */
function carriedBy(group: readonly GridFileReport[]): object {
  const days = group.flatMap((report) => Array.from(report.time.values)).sort((a, b) => a - b);
  const span = days[days.length - 1] - days[0];
  const hasYears = span >= annualFromDays;
  const step = days.length > 1 ? span / (days.length - 1) : Number.POSITIVE_INFINITY;
  const fits = span >= 540 && step * 2 <= 90;
  return {
    background: { mean: days.length > 1, trend: days.length > 2, annual: hasYears, semiannual: hasYears },
    band: { filter: fits ? "lanczos" : "none" },
  };
}

function identifier(i: number): string {
  return i < 26 ? String.fromCharCode(65 + i) : `G${i + 1}`;
}
