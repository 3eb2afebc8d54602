import { resolve } from "node:path";
import { createEngine } from "../../engine/engine";
import { progressPrinter } from "../progress-printer";
import { type Command, parseWords, wrongWords } from "./command";

const usage = "run STUDY --out DIR [--overwrite] [--json]";

/** Runs a study and writes its result folder, whole or not at all. */
export const run: Command = {
  name: "run",
  usage,
  summary: "run a study and write its numbers and figures",
  details: [
    "",
    "  --out DIR     the folder to write; it must not exist",
    "  --overwrite   replace it if it does",
    "  --json        say what was written as JSON",
  ],
  run: async (words) => {
    const { values, positionals } = parseWords(usage, words, {
      out: { type: "string" },
      overwrite: { type: "boolean" },
      json: { type: "boolean" },
    });
    if (positionals.length !== 1) throw wrongWords(usage, `${positionals.length} studies`);
    if (!values.out) throw wrongWords(usage, "no --out");
    const engine = createEngine();
    const stop = new AbortController();
    const interrupt = () => stop.abort();
    process.once("SIGINT", interrupt);
    process.once("SIGTERM", interrupt);
    const progress = progressPrinter(process.stderr);
    try {
      const open = await engine.open({ paths: [resolve(positionals[0])] }, { signal: stop.signal });
      const written = await engine.run(
        { open, folder: resolve(values.out), overwrite: values.overwrite === true },
        { signal: stop.signal, onProgress: progress.show },
      );
      progress.end();
      const text = values.json
        ? JSON.stringify(written, null, 2)
        : `Wrote ${written.files.length} files to ${values.out}`;
      process.stdout.write(`${text}\n`);
      return 0;
    } finally {
      progress.end();
      process.off("SIGINT", interrupt);
      process.off("SIGTERM", interrupt);
      await engine.close();
    }
  },
};
