/** What kind of thing is at fault; decides the exit code and the notice's heading. */
export type FaultTag =
  | "study"
  | "file"
  | "region"
  | "period"
  | "band"
  | "memory"
  | "output"
  | "request"
  | "cancelled"
  | "internal";

/** The parts of an error that cross process borders (structured clone drops an Error's own fields). */
export interface FaultData {
  readonly tag: FaultTag;
  /** File, study key or place concerned, e.g. "grid/a.nc" or "band.shortestDays". */
  readonly where: string;
  readonly expected: string;
  readonly got: string;
  /** What the reader can do about it. */
  readonly advice: string;
}

/** The one error class of Strake: says where, what was expected, what was got and what to do. */
export class Fault extends Error implements FaultData {
  readonly tag: FaultTag;
  readonly where: string;
  readonly expected: string;
  readonly got: string;
  readonly advice: string;

  constructor(data: FaultData, options?: { cause?: unknown }) {
    super(faultLine(data), options);
    this.name = "Fault";
    this.tag = data.tag;
    this.where = data.where;
    this.expected = data.expected;
    this.got = data.got;
    this.advice = data.advice;
  }

  toData(): FaultData {
    const { tag, where, expected, got, advice } = this;
    return { tag, where, expected, got, advice };
  }
}

/** One line for a terminal or a notice: "where: expected …, got …; advice". Line breaks in the parts become spaces. */
export function faultLine(data: FaultData): string {
  const parts = `${data.where}: expected ${data.expected}, got ${data.got}; ${data.advice}`;
  return parts.replace(/\s+/g, " ").trim();
}

/** True for errors that the person can mend (exit 2); false for a fault of ours (exit 1). */
export function isUserFault(error: unknown): error is Fault {
  return error instanceof Fault && error.tag !== "internal";
}

/** Any thrown value as data that can cross a process border. */
export function faultData(error: unknown): FaultData {
  if (error instanceof Fault) return error.toData();
  const message = error instanceof Error ? `${error.name}: ${error.message}` : String(error);
  return {
    tag: "internal",
    where: "Strake",
    expected: "no fault of its own",
    got: message,
    advice: "please report this with the study that led to it",
  };
}
