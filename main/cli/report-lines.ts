import type { Axis } from "../../core/model/axis";
import { formatDay } from "../../core/model/calendar";
import type { FileReport, GridFileReport, TrackFileReport } from "../../core/model/source";

/** What a file holds, as lines for a person. */
export function reportLines(report: FileReport): string[] {
  const lines = report.kind === "grid" ? gridLines(report) : trackLines(report);
  return [`${report.path}`, ...lines.map((line) => `  ${line}`), ...report.notes.map((note) => `  note: ${note}`)];
}

function gridLines(report: GridFileReport): string[] {
  const { height, latitude, longitude, time, masked } = report;
  const days = time.values;
  const last = days.length - 1;
  return [
    `${report.format} grid, ${(report.bytes / 1e6).toFixed(2)} MB${report.title ? `: ${plain(report.title)}` : ""}`,
    `height     ${plain(height.name)} [${plain(height.fileUnits)}], found by ${height.foundBy}, above ${reference(height.reference)}, stored as ${height.storedAs}`,
    `latitude   ${extent(latitude)}`,
    `longitude  ${extent(longitude)}${longitude.periodic ? ", round the globe" : ""}`,
    `time       ${days.length} ${days.length === 1 ? "date" : "dates"}, ${formatDay(time.calendar, days[0])} to ${formatDay(time.calendar, days[last])}${last > 0 ? `, every ${tidy(time.step)} days` : ""} (${time.calendar} calendar)`,
    `missing on the first date: ${masked.fill} by fill value, ${masked.validRange} by valid range, ${masked.notFinite} not finite`,
  ];
}

function trackLines(report: TrackFileReport): string[] {
  const { box } = report;
  return [
    `${report.format} along-track passes, ${(report.bytes / 1e6).toFixed(2)} MB${report.title ? `: ${plain(report.title)}` : ""}`,
    `height     ${plain(report.height.name)} [${plain(report.height.fileUnits)}]`,
    `points     ${report.points} on ${report.passes} passes`,
    `time       ${formatDay(report.calendar, report.firstDay)} to ${formatDay(report.calendar, report.lastDay)}`,
    `box        ${tidy(box.south)} to ${tidy(box.north)} N, ${tidy(box.west)} to ${tidy(box.east)} E`,
  ];
}

function extent(axis: Axis): string {
  const { values } = axis;
  const spacing = axis.even ? `every ${tidy(Math.abs(axis.step))}°` : "uneven";
  return `${tidy(values[0])} to ${tidy(values[values.length - 1])}, ${values.length} values, ${spacing}`;
}

function reference(of: GridFileReport["height"]["reference"]): string {
  return {
    geoid: "the geoid",
    "mean-sea-level": "mean sea level",
    ellipsoid: "the ellipsoid",
    unknown: "an unstated surface",
  }[of];
}

function tidy(value: number): string {
  return String(Number(value.toFixed(4)));
}

/** Text from a file without control or bidirectional marks, cut to a line. */
function plain(text: string): string {
  return text.replace(/[\p{Cc}\p{Cf}]/gu, " ").slice(0, 160);
}
