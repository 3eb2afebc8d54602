import { type ParseArgsConfig, parseArgs } from "node:util";
import { Fault } from "../../../core/model/errors";

export interface Command {
  readonly name: string;
  readonly usage: string;
  readonly summary: string;
  readonly details: readonly string[];
  /** Runs with the words after the name; gives the exit code. */
  readonly run: (words: readonly string[]) => Promise<number>;
}

/** Parses a command's words; a Fault "request" for an option it does not know. */
export function parseWords<T extends NonNullable<ParseArgsConfig["options"]>>(
  usage: string,
  words: readonly string[],
  options: T,
): ReturnType<typeof parseArgs<{ args: string[]; options: T; allowPositionals: true; strict: true }>> {
  try {
    return parseArgs({ args: [...words], options, allowPositionals: true, strict: true });
  } catch (cause) {
    const got = cause instanceof Error ? cause.message.split(".")[0] : "words that do not fit";
    throw wrongWords(usage, got);
  }
}

export function wrongWords(usage: string, got: string): Fault {
  return new Fault({
    tag: "request",
    where: "command",
    expected: `strake ${usage}`,
    got,
    advice: "correct the command",
  });
}
