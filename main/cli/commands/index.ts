import type { Command } from "./command";
import { describe } from "./describe";
import { open } from "./open";
import { run } from "./run";

/** Every command word: one file each, one line here. */
export const commands: readonly Command[] = [describe, run, open];

export function usage(): string {
  const lines = commands.map((command) => `  strake ${command.usage.padEnd(42)} ${command.summary}`);
  return ["Strake: are the streaks in sea-surface height jets, where, how strong, how lasting?", "", ...lines].join(
    "\n",
  );
}

export function commandUsage(command: Command): string {
  return [`strake ${command.usage}`, "", command.summary, ...command.details].join("\n");
}
