import type { Estimate, PushEstimate, ScalesResult } from "../../model/scales-result";
import { counted, formatLatitude, formatNumber, formatSignificant } from "../format";
import { estimateText, powerText } from "./estimate-text";
import { signChangesText } from "./profile-panels";
import { rhinesSpeedOf, rhinesTitle, rhinesWavelength } from "./rhines";

/** One finding: what it is, its numbers, and what they rest on or stand beside. */
export interface Fact {
  readonly id: string;
  readonly label: string;
  /** Stands in where there is little room. */
  readonly shortLabel?: string;
  /** The longest first. */
  readonly values: readonly string[];
  readonly notes?: readonly string[];
}

const centimetres = (speed: number) => `${formatSignificant(100 * speed, 2)} cm s⁻¹`;

/** What the eddies do to the jets, and how lengths compare; what matters most first. */
export function forcingFacts(result: ScalesResult): Fact[] {
  const { forcing, lengths, middleLatitude } = result;
  const spacing = lengths.meanSpacing > 0 ? lengths.meanSpacing : lengths.bandSpacing;
  const ratio = spacing / rhinesWavelength(lengths);
  const speedOf = lengths.rhinesSpeed === "total" ? "rms of the whole flow" : "rms of the eddies";
  return [
    pushFact(forcing),
    {
      id: "conversion",
      label: "Energy to the mean flow",
      values: [`${powerText(forcing.conversion)} W kg⁻¹`],
    },
    {
      id: "sign-changes",
      label: "Sign changes of β − ∂²U/∂y²",
      values: [signChangesText(forcing.signChanges), `${forcing.signChanges.length}`],
    },
    {
      id: "spacing",
      label: `Jet spacing over ${rhinesTitle}`,
      values: [Number.isFinite(ratio) ? formatNumber(ratio, 2) : "unknown"],
      notes: [`U ${centimetres(rhinesSpeedOf(lengths))}, ${speedOf}`],
    },
    {
      id: "deformation",
      label: "Deformation radius",
      values: [
        lengths.deformationRadius > 0
          ? `${formatNumber(lengths.deformationRadius / 1000, 0)} km at ${formatLatitude(middleLatitude, 1)}`
          : "unknown here",
      ],
      notes: [deformationNote(lengths.deformationSource)],
    },
    persistenceFact(result),
  ];
}

function pushFact({ push, pushOfMeans }: ScalesResult["forcing"]): Fact {
  const { perDay } = push;
  const label =
    perDay.low95 > 0
      ? "Eddies feed the jets"
      : perDay.high95 < 0
        ? "Eddies drain the jets"
        : "Push on the jets: not told from zero";
  return {
    id: "push",
    label,
    shortLabel: label.replace(" on the jets", ""),
    values: pushTexts(push),
    notes: pushTexts(pushOfMeans).map((text) => `of the means ${text}`.replace(" per day", "")),
  };
}

/** "0.042 ± 0.011 per day, r 0.71", and without the correlation. */
function pushTexts({ perDay, correlation }: PushEstimate): string[] {
  if (!Number.isFinite(perDay.value)) return ["unknown"];
  const value = `${perDayText(perDay)} per day`;
  return Number.isFinite(correlation) ? [`${value}, r ${formatNumber(correlation, 2)}`, value] : [value];
}

/** Small rates in powers of ten. */
function perDayText(perDay: Estimate): string {
  const size = Math.max(Math.abs(perDay.value), (perDay.high95 - perDay.low95) / 2 || 0);
  return size < 0.01 ? powerText(perDay) : estimateText(perDay, 1);
}

/** The longest run of one sign of the zonal mean and where; rows that keep theirs through the whole record are as long. */
function persistenceFact({ latitude, persistence }: ScalesResult): Fact {
  const { share, longestDays, sign } = persistence.byLatitude;
  const longest = Math.max(0, ...longestDays.filter(Number.isFinite));
  const rows = [...latitude.keys()].filter((row) => longest > 0 && longestDays[row] === longest);
  const head = { id: "persistence", label: "Longest run of one sign" };
  if (rows.length === 0) return { ...head, values: ["unknown"] };
  const days = counted(formatNumber(longest, 0), "day");
  if (rows.length > 1) {
    const known = share.filter(Number.isFinite).sort();
    return {
      ...head,
      values: [`${days}, on ${rows.length} of ${known.length} rows`, days],
      notes: [`the median row keeps its sign ${shareText(known[Math.floor(known.length / 2)])} of the time`],
    };
  }
  return {
    ...head,
    values: [`${days} at ${formatLatitude(latitude[rows[0]], 1)}`, days],
    notes: [`${shareText(share[rows[0]])} of dates there ${directionText(sign[rows[0]])}`],
  };
}

export const shareText = (share: number): string => `${formatNumber(100 * share, 0)} %`;

/** Of a prevailing sign. */
export function directionText(sign: number): string {
  if (sign === 0) return "neither way";
  return sign > 0 ? "eastward" : "westward";
}

function deformationNote(source: ScalesResult["lengths"]["deformationSource"]): string {
  if (source === "table") return "table, from memory, ±15 %";
  return source === "file" ? "from the study’s file" : "from the study’s wave speed";
}

/** Speeds of waves against the drift that is seen. */
export function waveFacts({ waves, drift, alongLatitude }: ScalesResult): Fact[] {
  const speed = (value: number) => (Number.isFinite(value) ? `${formatNumber(100 * value, 1)} cm s⁻¹` : "unknown");
  const km = (value: number) => (value > 0 ? `${formatNumber(value / 1000, 0)} km` : "unknown");
  const seen = drift.alongLatitude;
  return [
    {
      id: "drift",
      label: `Drift along ${formatLatitude(alongLatitude, 1)}`,
      values: [seen ? `${estimateText(seen.speed, 100)} cm s⁻¹` : "unknown"],
      ...(seen ? { notes: [limitsNote(seen.limits)] } : {}),
    },
    {
      id: "long-wave",
      label: "Long Rossby waves",
      values: [speed(waves.longWave)],
      notes: [`in the mean flow ${speed(waves.longWaveInFlow)}`],
    },
    {
      id: "at-peak",
      label: "Rossby waves of the lengths seen",
      values: [speed(waves.atPeak)],
      notes: [`in the mean flow ${speed(waves.atPeakInFlow)}`],
    },
    {
      id: "lengths",
      label: "Zonal and meridional wavelength",
      values: [`${km(waves.zonalWavelength)}, ${km(waves.meridionalWavelength)}`],
    },
    {
      id: "period",
      label: "Shortest period of waves at rest",
      values: [waves.shortestPeriodDays > 0 ? counted(formatNumber(waves.shortestPeriodDays, 0), "day") : "unknown"],
    },
    { id: "mean-flow", label: "Mean flow there", values: [speed(waves.meanFlow)] },
  ];
}

function limitsNote(limits: "bootstrap" | "peak width"): string {
  return limits === "bootstrap" ? "95 % limits by resampling" : "limits from the width of the peak";
}
