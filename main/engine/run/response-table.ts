import type { TimeFilter } from "../../../core/study/time-filter";

/** Frequencies in the table, evenly in the logarithm of period. */
const points = 400;

/** filter-response.csv: amplitude and power response of the study's filter, from the longest period the record holds to two dates. */
export function responseTable(filter: TimeFilter, stepDays: number, dates: number): string {
  const lines = Array.from({ length: points }, (_, i) => {
    const samples = dates * (2 / dates) ** (i / (points - 1));
    const amplitude = filter.response(1 / samples);
    return [samples * stepDays, 1 / (samples * stepDays), amplitude, amplitude * amplitude].join(",");
  });
  const header = "period [days],frequency [cycles day-1],amplitude response [1],power response [1]";
  return `${[header, ...lines].join("\n")}\n`;
}
