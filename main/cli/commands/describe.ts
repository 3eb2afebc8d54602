import { resolve } from "node:path";
import { faultLine } from "../../../core/model/errors";
import { createEngine } from "../../engine/engine";
import { reportLines } from "../report-lines";
import { type Command, parseWords, wrongWords } from "./command";

const usage = "describe FILE… [--json]";

/** Says what is in the files: exit 0, or 2 with the reason for each refused one. */
export const describe: Command = {
  name: "describe",
  usage,
  summary: "say what is in the files",
  details: ["", "  --json   as JSON instead of lines"],
  run: async (words) => {
    const { values, positionals } = parseWords(usage, words, { json: { type: "boolean" } });
    if (positionals.length === 0) throw wrongWords(usage, "no file");
    const engine = createEngine({ workers: 1 });
    try {
      const recognised = await engine.describe({ paths: positionals.map((path) => resolve(path)) });
      if (values.json) process.stdout.write(`${JSON.stringify(recognised, plainArrays, 2)}\n`);
      for (const file of recognised) {
        if ("refused" in file) process.stderr.write(`strake: ${faultLine(file.refused)}\n`);
        else if (!values.json) process.stdout.write(`${reportLines(file.report).join("\n")}\n`);
      }
      return recognised.some((file) => "refused" in file) ? 2 : 0;
    } finally {
      await engine.close();
    }
  },
};

/** Typed arrays as plain lists. */
function plainArrays(_key: string, value: unknown): unknown {
  return ArrayBuffer.isView(value) ? Array.from(value as unknown as ArrayLike<number>) : value;
}
