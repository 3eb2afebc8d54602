import type { RecordOverview } from "../../../../core/contract/engine";
import { counted, formatLatitude, formatNumber } from "../../../../core/figure/format";
import type { JetRow, JetsResult, JetVerdictRow } from "../../../../core/model/jets-result";
import { Units } from "../../../text/Units";
import { directionWord, lifeDatesText, lifeEndText, rateText, redNoiseText, verdictText } from "./jet-texts";

interface JetDetailsProps {
  readonly jet: JetRow;
  readonly result: JetsResult;
  readonly record: RecordOverview;
  readonly verdict: JetVerdictRow | undefined;
  readonly level: number;
}

/** Everything known of one jet. */
export function JetDetails({ jet, result, record, verdict, level }: JetDetailsProps) {
  const latitudeOf = (latitude: number): string => formatLatitude(latitude, 2);
  const noise = redNoiseText(jet, result, record);
  return (
    <section className="jet-details" aria-label="The jet picked">
      <h3>
        {directionWord(jet.sign) === "eastward" ? "Eastward" : "Westward"} jet at {latitudeOf(jet.meanLatitude)}
      </h3>
      <dl className="readout">
        {entries(jet, result, record, latitudeOf).map(([title, value]) => (
          <div className="readout-row" key={title}>
            <dt>{title}</dt>
            <dd>
              <Units text={value} />
            </dd>
          </div>
        ))}
      </dl>
      <p className="quiet">{verdict ? verdictText(verdict, level) : "Not tested against eddies for these settings."}</p>
      {noise === "" ? null : <p className="quiet">{noise}</p>}
    </section>
  );
}

function entries(
  jet: JetRow,
  result: JetsResult,
  record: RecordOverview,
  latitudeOf: (latitude: number) => string,
): readonly (readonly [title: string, value: string])[] {
  const days = (value: number): string => (Number.isFinite(value) ? counted(value, "day") : "–");
  const speeds = `${formatNumber(100 * jet.meanSpeed, 1)}, most ${formatNumber(100 * jet.peakSpeed, 1)} cm s⁻¹`;
  return [
    ["Lives", days(jet.lifetimeDays)],
    ["From", lifeDatesText(jet, record)],
    ["Begins", lifeEndText(jet.beginning, result.jets, latitudeOf)],
    ["Ends", lifeEndText(jet.ending, result.jets, latitudeOf)],
    ["Speed", speeds],
    ["Width", `${formatNumber(jet.meanWidthKm, 0)} km`],
    ["Keeps to", `${formatNumber(jet.southernmost, 2)} to ${latitudeOf(jet.northernmost)}`],
    ["Extent", `${formatNumber(100 * jet.zonalExtent, 0)} % of longitudes`],
    ["Tilt", `${formatNumber(100 * jet.tilt, 1)} km north per 100 km east`],
    ["Drift", `${rateText(jet.driftDegreesPerYear, 1, 2)}° yr⁻¹`],
    ["Drift speed", `${rateText(jet.driftMetresPerSecond, 1000, 2)} mm s⁻¹`],
    ["e-folding time", days(jet.eFoldingDays)],
    ["Integral time", days(jet.integralDays)],
    ["Independent samples", formatNumber(jet.effectiveSize, 1)],
  ];
}
