import { faultData, faultLine, isUserFault } from "../../core/model/errors";
import { commands, commandUsage, usage } from "./commands";

/** Entry of the command: exit 0 done, 2 the person's study or file is at fault, 1 a fault of ours. */
async function main(words: readonly string[]): Promise<number> {
  const [name, ...rest] = words;
  if (name === undefined || name === "--help" || name === "-h" || name === "help") {
    process.stdout.write(`${usage()}\n`);
    return name === undefined ? 2 : 0;
  }
  const command = commands.find((candidate) => candidate.name === name);
  if (!command) {
    process.stderr.write(
      `strake: "${name}" is not a command; it knows ${commands.map((each) => each.name).join(", ")}\n`,
    );
    return 2;
  }
  if (rest.includes("--help") || rest.includes("-h")) {
    process.stdout.write(`${commandUsage(command)}\n`);
    return 0;
  }
  return command.run(rest);
}

main(process.argv.slice(2)).then(
  (code) => {
    process.exitCode = code;
  },
  (error: unknown) => {
    process.stderr.write(`strake: ${faultLine(faultData(error))}\n`);
    process.exitCode = isUserFault(error) ? 2 : 1;
  },
);
