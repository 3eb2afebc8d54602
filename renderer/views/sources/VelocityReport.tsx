import type { OpenStudy, SuppliedVelocityReport } from "../../../core/contract/engine";
import { counted, formatCount, formatLatitudeRange, formatSignificant } from "../../../core/figure/format";
import { useBench } from "../../app/bench-context";
import { Button } from "../../controls/Button";
import { withGeostrophy } from "../../state/edit-study";
import { Units } from "../../text/Units";
import { AgreementTable } from "./AgreementTable";
import { Facts, shortened } from "./Facts";
import {
  claimText,
  conventionSettings,
  conventionText,
  differenceText,
  isAboutMean,
  isStudysOwn,
  measured,
  speedUnits,
} from "./velocity-text";

interface VelocityReportProps {
  readonly open: OpenStudy;
  readonly report: SuppliedVelocityReport;
}

const references = {
  geoid: "heights above the geoid",
  "mean-sea-level": "heights above mean sea level",
  ellipsoid: "heights above the ellipsoid",
  unknown: "unknown",
} as const;

/** How supplied velocities agree with ours: in all, by latitude, and which way of computing comes nearest. */
export function VelocityReport({ open, report }: VelocityReportProps) {
  const { agreement, notes } = report;
  return (
    <>
      <Facts
        entries={[
          ["Eastward", report.eastward],
          ["Northward", report.northward],
          ["Found by", report.foundBy],
          ["Reference", `${references[report.reference]}${matchText(report.matchesHeight)}`],
          ["Compared", `${counted(report.dates, "date")} of the record`],
          ["Constant in time", `${formatSignificant(100 * agreement.meanShare, 2)} % of the mean square difference`],
          ["Cells only ours has", formatCount(agreement.oursOnly)],
          ["Cells only theirs has", formatCount(agreement.suppliedOnly)],
        ]}
      />
      <AgreementTable
        caption={`With the study’s own settings, ours minus supplied${isAboutMean(report) ? ", each about its own mean" : ""}`}
        rows={[
          { name: "All", u: measured(report, agreement.u), v: measured(report, agreement.v) },
          ...agreement.bands.map(({ south, north, u, v }) => ({
            name: formatLatitudeRange(south, north),
            u: measured(report, u),
            v: measured(report, v),
          })),
        ]}
      />
      <BestConvention open={open} report={report} />
      {notes.map((note) => (
        <p key={note} className="quiet any-text long-text">
          {shortened(note)}
        </p>
      ))}
    </>
  );
}

function BestConvention({ open, report }: VelocityReportProps) {
  const bench = useBench();
  const [best] = report.conventions;
  if (!best) return null;
  const isOwn = isStudysOwn(best.convention, open.study.geostrophy);
  const settings = conventionSettings(best.convention);
  const difference = isAboutMean(report) ? best.rmsAnomalyDifference : best.rmsDifference;
  return (
    <>
      <p>
        Of {report.conventions.length} ways of computing currents the nearest is{" "}
        <strong>
          <Units text={conventionText(best.convention)} />
        </strong>
        {isOwn ? ", which is the study’s own" : ""}: rms difference{" "}
        <Units text={`${differenceText(difference)} ${speedUnits}`} />. <Units text={claimText(report)} />
      </p>
      {isOwn || !settings ? null : (
        <div>
          <Button onPress={() => bench.edit(withGeostrophy(open, settings))}>Use this convention</Button>
        </div>
      )}
    </>
  );
}

function matchText(matches: boolean | null): string {
  if (matches === null) return "";
  return matches ? ", as the heights here" : ", unlike the heights here";
}
