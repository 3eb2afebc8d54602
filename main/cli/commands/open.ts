import { openCommand } from "../open";
import { type Command, parseWords, wrongWords } from "./command";

const usage = "open [STUDY or FILE…] [--web] [--port N]";

/** Opens the window: on the desktop where it can, else in the browser. */
export const open: Command = {
  name: "open",
  usage,
  summary: "open a study, data files, or the sample",
  details: [
    "",
    "  --web      in the local browser even where the desktop window could open",
    "  --port N   the port the browser connects to (with --web; any free one otherwise)",
  ],
  run: async (words) => {
    const { values, positionals } = parseWords(usage, words, { web: { type: "boolean" }, port: { type: "string" } });
    const port = values.port === undefined ? undefined : Number(values.port);
    if (port !== undefined && !(Number.isInteger(port) && port >= 0 && port <= 65535)) {
      throw wrongWords(usage, `the port "${values.port}"`);
    }
    return openCommand(
      { paths: positionals, web: values.web === true || port !== undefined, ...(port ? { port } : {}) },
      {
        out: (line) => process.stdout.write(`${line}\n`),
        err: (line) => process.stderr.write(`${line}\n`),
      },
    );
  },
};
