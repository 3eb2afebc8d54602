import type { FaultData, FaultTag } from "../../core/model/errors";

export interface Notice {
  readonly id: number;
  readonly kind: "error" | "news";
  readonly heading: string;
  readonly text: string;
}

export type NoticeText = Omit<Notice, "id">;

const headings: Readonly<Record<FaultTag, string>> = {
  study: "The study needs a change",
  file: "A file could not be used",
  region: "The region does not fit",
  period: "The period does not fit",
  band: "The band does not fit",
  memory: "This needs more memory than is allowed",
  output: "The result could not be written",
  request: "That could not be done",
  cancelled: "Cancelled",
  internal: "A fault in Strake",
};

/** Heading of the notice that the engine is away; taken down once it is back. */
export const engineStopped = "The engine stopped";

/** Any thrown value as a notice; null for a cancelled call, which the person asked for. */
export function noticeFromError(error: unknown): NoticeText | null {
  if (isFaultData(error)) {
    if (error.tag === "cancelled") return null;
    const away = error.tag === "internal" && error.where === "engine";
    const heading = away ? engineStopped : (headings[error.tag] ?? headings.internal);
    return { kind: "error", heading, text: faultSentences(error) };
  }
  if (error instanceof Error && error.name === "AbortError") return null;
  const got = error instanceof Error ? error.message : String(error);
  return { kind: "error", heading: headings.internal, text: `${capital(oneLine(got))}.` };
}

/** A fault as two sentences: where and what, then what to do. */
export function faultSentences(fault: FaultData): string {
  const what = `${fault.where}: expected ${fault.expected}, got ${fault.got}`;
  return `${closed(oneLine(what))} ${closed(capital(oneLine(fault.advice)))}`.trim();
}

/** Adds a notice; one that says the same as a standing one replaces it, so that a failing drag is told once. */
export function addNotice(notices: readonly Notice[], text: NoticeText): readonly Notice[] {
  const id = notices.reduce((most, notice) => Math.max(most, notice.id), 0) + 1;
  const others = notices.filter((notice) => notice.text !== text.text || notice.heading !== text.heading);
  return [...others, { id, ...text }].slice(-4);
}

export function isFaultData(value: unknown): value is FaultData {
  if (typeof value !== "object" || value === null) return false;
  return (["tag", "where", "expected", "got", "advice"] as const).every(
    (key) => typeof (value as Record<string, unknown>)[key] === "string",
  );
}

function oneLine(text: string): string {
  return text.replace(/\s+/g, " ").trim();
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

function closed(text: string): string {
  return text === "" || /[.!?]$/.test(text) ? text : `${text}.`;
}
