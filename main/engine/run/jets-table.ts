import type { TimeAxis } from "../../../core/model/axis";
import { formatDay } from "../../../core/model/calendar";
import type { EddyTestResult, JetRow, JetsResult } from "../../../core/model/jets-result";

type Column = readonly [header: string, value: (jet: JetRow) => string | number | undefined];

function leadsText(leads: boolean | undefined): string | undefined {
  if (leads === undefined) return undefined;
  return leads ? "yes" : "no";
}

/** jets.csv: one row a jet, south to north, with what the eddy test made of it; empty where a number could not be had. */
export function jetsTable({ jets }: JetsResult, eddyTest: EddyTestResult | null, time: TimeAxis): string {
  const verdicts = new Map(eddyTest?.verdicts.map((verdict) => [verdict.jet, verdict]));
  const columns: readonly Column[] = [
    ["jet [1]", ({ id }) => id],
    ["direction", ({ sign }) => (sign === 1 ? "eastward" : "westward")],
    ["latitude [degrees_north]", ({ meanLatitude }) => meanLatitude],
    ["southernmost [degrees_north]", ({ southernmost }) => southernmost],
    ["northernmost [degrees_north]", ({ northernmost }) => northernmost],
    ["mean speed [m s-1]", ({ meanSpeed }) => meanSpeed],
    ["peak speed [m s-1]", ({ peakSpeed }) => peakSpeed],
    ["width [km]", ({ meanWidthKm }) => meanWidthKm],
    ["zonal extent [1]", ({ zonalExtent }) => zonalExtent],
    ["tilt [km km-1]", ({ tilt }) => tilt],
    ["first date", ({ firstDay }) => formatDay(time.calendar, firstDay)],
    ["last date", ({ lastDay }) => formatDay(time.calendar, lastDay)],
    ["lifetime [days]", ({ lifetimeDays }) => lifetimeDays],
    ["share of days present [1]", ({ shareOfDaysPresent }) => shareOfDaysPresent],
    ["drift [degrees_north year-1]", ({ driftDegreesPerYear }) => driftDegreesPerYear.value],
    ["drift low 95 % [degrees_north year-1]", ({ driftDegreesPerYear }) => driftDegreesPerYear.low95],
    ["drift high 95 % [degrees_north year-1]", ({ driftDegreesPerYear }) => driftDegreesPerYear.high95],
    ["drift [m s-1]", ({ driftMetresPerSecond }) => driftMetresPerSecond.value],
    ["e-folding time [days]", ({ eFoldingDays }) => eFoldingDays],
    ["integral time [days]", ({ integralDays }) => integralDays],
    ["effective sample size [1]", ({ effectiveSize }) => effectiveSize],
    ["beginning", ({ beginning }) => beginning],
    ["ending", ({ ending }) => ending],
    ["oceans as strong [1]", ({ id }) => verdicts.get(id)?.oceansAsStrong],
    ["p against eddies [1]", ({ id }) => verdicts.get(id)?.p],
    ["p corrected over jets [1]", ({ id }) => verdicts.get(id)?.adjustedP],
    ["leads its neighbourhood", ({ id }) => leadsText(verdicts.get(id)?.leads)],
    ["verdict", ({ id }) => verdicts.get(id)?.verdict],
  ];
  const cell = (value: string | number | undefined) =>
    value === undefined || (typeof value === "number" && !Number.isFinite(value)) ? "" : String(value);
  const lines = jets.map((jet) => columns.map(([, value]) => cell(value(jet))).join(","));
  return `${[columns.map(([header]) => header).join(","), ...lines].join("\n")}\n`;
}
