import type { RecognisedFile } from "../../../core/contract/engine";
import { counted, formatCount, formatLatitude, formatLongitude, formatNumber } from "../../../core/figure/format";
import { boxText } from "../../../core/figure/record-text";
import { formatDate } from "../../../core/figure/time-ticks";
import type { FileReport, GridFileReport, TrackFileReport } from "../../../core/model/source";
import { faultSentences } from "../../state/notices";
import { fileName } from "../../state/paths";
import { bytesText, datesText, periodText } from "../../text/record";
import { Facts, shortened } from "./Facts";

/** One file: what it was recognised as, or why it was refused. */
export function FileCard({ file }: { readonly file: RecognisedFile }) {
  if ("refused" in file) {
    return (
      <article className="file refused">
        <div className="file-head">
          <h3 className="file-name any-text">{shortened(fileName(file.path))}</h3>
          <span className="quiet">refused</span>
        </div>
        <p className="any-text long-text">{shortened(faultSentences(file.refused))}</p>
      </article>
    );
  }
  const { report } = file;
  return (
    <article className="file">
      <div className="file-head">
        <h3 className="file-name any-text">{shortened(fileName(file.path))}</h3>
        <span className="quiet any-text">
          {[report.format, bytesText(report.bytes), shortened(report.title)].filter((text) => text !== "").join(" · ")}
        </span>
      </div>
      <Facts entries={factsOf(report)} />
      {report.notes.map((note) => (
        <p key={note} className="quiet any-text long-text">
          {shortened(note)}
        </p>
      ))}
    </article>
  );
}

type Fact = readonly [string, string];

function factsOf(report: FileReport): readonly Fact[] {
  return report.kind === "grid" ? gridFacts(report) : trackFacts(report);
}

const references = {
  geoid: "above the geoid: mean jets are in it",
  "mean-sea-level": "above mean sea level: mean jets are not in it",
  ellipsoid: "above the ellipsoid: the geoid is still in it",
  unknown: "unknown reference: mean jets may not be in it",
} as const;

function gridFacts(report: GridFileReport): readonly Fact[] {
  const { height, masked, time } = report;
  const removed = [
    [masked.fill, "fill value"],
    [masked.validRange, "outside the valid range"],
    [masked.notFinite, "not a number"],
  ] as const;
  const counts = removed.filter(([count]) => count > 0).map(([count, rule]) => `${formatCount(count)} ${rule}`);
  return [
    ["Height", `${height.name}, found by ${height.foundBy}`],
    ["Called", height.longName || height.standardName || "not named"],
    ["Units", `${height.fileUnits || "none given"}, stored as ${height.storedAs}`],
    ["Reference", references[height.reference]],
    ["Region", boxText(report)],
    ["Period", `${periodText(time)}, ${datesText(time)}`],
    ["Time", `${report.timeUnits}, ${time.calendar.replace("_", " ")} calendar`],
    ["Left out on the first date", counts.length > 0 ? counts.join(", ") : "nothing"],
  ];
}

function trackFacts(report: TrackFileReport): readonly Fact[] {
  const { box, calendar } = report;
  return [
    ["Height", report.height.name],
    ["Units", report.height.fileUnits || "none given"],
    ["Points", `${counted(report.points, "point")} in ${counted(report.passes, "pass", "passes")}`],
    ["Period", `${formatDate(calendar, report.firstDay)} to ${formatDate(calendar, report.lastDay)}`],
    [
      "Region",
      `${formatLatitude(box.south, 1)} to ${formatLatitude(box.north, 1)}, ${formatLongitude(box.west, 1)} to ${formatLongitude(box.east, 1)}`,
    ],
    ["Points a pass", formatNumber(report.points / Math.max(1, report.passes), 0)],
  ];
}
