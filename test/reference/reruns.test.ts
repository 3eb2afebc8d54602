import { execFileSync } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, test } from "vitest";
import { python } from "../setup/python";

const folder = fileURLToPath(new URL(".", import.meta.url));
const scripts = readdirSync(folder).filter((name) => name.endsWith(".py"));
const checkable = scripts.filter((name) =>
  readFileSync(`${folder}${name}`, "utf8").includes("write_or_check(__file__"),
);

describe("the Python reference scripts still give the values committed beside them", () => {
  test.each(checkable)("%s", (name) => {
    // Exit 1 with the first difference fails the test with that line.
    execFileSync(python, ["-W", "ignore", `${folder}${name}`, "--check"], { stdio: ["ignore", "pipe", "pipe"] });
  });

  test("every script is rerun here, but the one that writes and the one that a run's own test calls", () => {
    expect(scripts.filter((name) => !checkable.includes(name))).toEqual(["reference_file.py", "sample_run.py"]);
  });
});
